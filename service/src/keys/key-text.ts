import { createHash, timingSafeEqual } from 'node:crypto';
import { crc32 } from 'node:zlib';
import { customAlphabet } from 'nanoid';
import type { components } from '../../../openapi/types/desk';

export type KeyKind = components['schemas']['KeyKind'];

const base62 = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz';
const publicIdLength = 8;
/** 62³² is about 2¹⁹⁰: far above the 112 bits from which a plain hash at rest is enough (OWASP ASVS 5.0, 6.5.2). */
const secretLength = 32;
const checksumLength = 6;
const prefixes: Readonly<Record<KeyKind, string>> = { partner: 'tbk', embed: 'tbe' };

const newPublicId = customAlphabet(base62, publicIdLength);
const newSecret = customAlphabet(base62, secretLength);
const form = new RegExp(
  `^(tbk|tbe)_([0-9A-Za-z]{${publicIdLength}})_([0-9A-Za-z]{${secretLength}})([0-9A-Za-z]{${checksumLength}})$`,
);

export interface ParsedKey {
  readonly kind: KeyKind;
  /** Not secret: by it the row is found. */
  readonly publicId: string;
}

/** CRC-32 (IEEE 802.3) in six base-62 digits, most significant first. */
function checksumOf(text: string): string {
  let rest = crc32(text);
  let digits = '';
  for (let place = 0; place < checksumLength; place += 1) {
    digits = base62[rest % base62.length] + digits;
    rest = Math.floor(rest / base62.length);
  }
  return digits;
}

/** `tbk_<public id>_<secret><checksum>` for a partner's server, `tbe_…` for a partner's pages. */
export function newKeyText(kind: KeyKind): { readonly text: string; readonly publicId: string } {
  const publicId = newPublicId();
  const body = `${prefixes[kind]}_${publicId}_${newSecret()}`;
  return { text: body + checksumOf(body), publicId };
}

/** Null for what cannot be a key: a typo fails the checksum, so that the database is never asked about it. */
export function parseKeyText(text: string): ParsedKey | null {
  const match = form.exec(text);
  if (!match) return null;
  const [, prefix, publicId] = match;
  if (checksumOf(text.slice(0, -checksumLength)) !== text.slice(-checksumLength)) return null;
  return { kind: prefix === prefixes.embed ? 'embed' : 'partner', publicId };
}

export const hashKeyText = (text: string): string => createHash('sha256').update(text).digest('hex');

export function isKeyOfHash(text: string, hash: string): boolean {
  return timingSafeEqual(Buffer.from(hashKeyText(text), 'hex'), Buffer.from(hash, 'hex'));
}
