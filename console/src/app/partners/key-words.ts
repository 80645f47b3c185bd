import type { Key, KeyKind } from '../api/contract';
import type { Stamp } from '../ui/status-stamp';

export const KEY_KIND_NAMES: Readonly<Record<KeyKind, string>> = { partner: 'Partner key', embed: 'Embed key' };

export const KEY_KIND_MEANINGS: Readonly<Record<KeyKind, string>> = {
  partner: 'Secret. For a partner’s server, never for a page: whoever holds it can call in the partner’s name.',
  embed: 'May stand in a page for anyone to read. It is answered only when the call comes from a listed site.',
};

export const KEY_STAMPS: Readonly<Record<Key['state'], Stamp>> = {
  live: { word: 'Live', tone: 'good' },
  expired: { word: 'Expired', tone: 'past' },
  revoked: { word: 'Revoked', tone: 'bad' },
};
