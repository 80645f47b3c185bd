import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import { DeskError, notFound } from '../errors';
import type { EstimatorsStore } from '../estimators/estimators-store';
import type { Journal } from '../journal/journal';
import type { SignedInPerson } from '../people/person';
import { hashKeyText, isKeyOfHash, newKeyText, parseKeyText } from './key-text';
import type { KeyRecord, KeysStore } from './keys-store';
import { monthOf } from './month';
import type { PartnerKey } from './partner-key';

type Key = components['schemas']['Key'];
type KeyNew = components['schemas']['KeyNew'];
type KeyIssued = components['schemas']['KeyIssued'];

const useNotedEveryMs = 60_000;
/** What a partner may give their own keys; the desk may give more. */
const mostPerMinuteOfPartner = 60;

export interface KeysParts {
  readonly database: Database;
  readonly keys: KeysStore;
  readonly estimators: EstimatorsStore;
  readonly journal: Journal;
  readonly clock: Clock;
}

export class KeysService {
  constructor(private readonly parts: KeysParts) {}

  async issue(person: SignedInPerson, partnerId: string, given: KeyNew): Promise<KeyIssued> {
    const { database, keys, journal, clock } = this.parts;
    const { kind, label, perMinute = 60, monthlyQuota = null, expiresAt = null } = given;
    const { text, publicId } = newKeyText(kind);
    const id = newId();
    await database.unitOfWork(async () => {
      await this.requireOwnPartner(person, partnerId);
      await this.requireSiteFor(kind, partnerId);
      requireModestLimit(person, perMinute);
      const estimatorIds = await this.idsOfScope(given.estimators ?? 'all');
      const columns = {
        id,
        partnerId,
        publicId,
        secretHash: hashKeyText(text),
        lastFour: text.slice(-4),
        kind,
        label,
        perMinute,
        monthlyQuota,
      };
      await keys.insert({
        ...columns,
        expiresAt: this.futureTime(expiresAt),
        createdAt: timeText(clock),
        createdBy: person.id,
        estimatorIds,
      });
      await journal.write({
        actorId: person.id,
        action: 'key-issued',
        subjectKind: 'key',
        subjectId: id,
        summary: `${person.name} issued the ${kind} key ${publicId} (${label})`,
      });
    });
    return { id, key: text, details: this.toAnswer(await this.require(id)) };
  }

  /** Revoking a key twice changes nothing. */
  async revoke(person: SignedInPerson, id: string): Promise<Key> {
    const { database, keys, journal, clock } = this.parts;
    await database.unitOfWork(async () => {
      const key = await this.require(id);
      if (!mayManage(person, key.partnerId)) throw notFound('key');
      if (key.revokedAt !== null) return;
      await keys.revoke(id, timeText(clock));
      await journal.write({
        actorId: person.id,
        action: 'key-revoked',
        subjectKind: 'key',
        subjectId: id,
        summary: `${person.name} revoked the ${key.kind} key ${key.publicId} (${key.label})`,
      });
    });
    return this.toAnswer(await this.require(id));
  }

  /** Newest first, revoked ones included. */
  async listOfPartner(partnerId: string): Promise<Key[]> {
    const keys = await this.parts.keys.listOfPartner(partnerId, monthOf(this.parts.clock));
    return keys.map((key) => this.toAnswer(key));
  }

  /** The key behind a text, or the refusal that says why not. */
  async recognise(text: string): Promise<PartnerKey> {
    const parsed = parseKeyText(text);
    if (!parsed)
      throw new DeskError(
        'key-malformed',
        'Copy the key whole, from the first letter to the last, and send it in X-Api-Key.',
      );
    const row = await this.parts.keys.findForCall(parsed.publicId);
    if (!row || !isKeyOfHash(text, row.secretHash)) throw new DeskError('key-refused', 'Ask the desk for a new key.');
    const now = timeText(this.parts.clock);
    if (row.revokedAt !== null)
      throw new DeskError(
        'key-revoked',
        `It was revoked at ${row.revokedAt}. Use another key, or ask the desk for one.`,
      );
    if (row.expiresAt !== null && row.expiresAt <= now)
      throw new DeskError('key-expired', `It ran out at ${row.expiresAt}. Use another key, or ask the desk for one.`);
    await this.noteUse(row.id, row.lastUsedAt);
    const { id, kind, partnerId, perMinute, monthlyQuota } = row;
    return { id, kind, partnerId, allEstimators: Boolean(row.allEstimators), perMinute, monthlyQuota };
  }

  async isSiteOf(key: PartnerKey, origin: string): Promise<boolean> {
    return this.parts.keys.isSiteOf(key.partnerId, origin);
  }

  /** Whether any partner lists this origin: all that can be asked before the key itself comes. */
  async isSiteOfAnyone(origin: string): Promise<boolean> {
    return this.parts.keys.isSiteOfAnyone(origin);
  }

  /** At most one write a minute and key. */
  private async noteUse(id: string, lastUsedAt: string | null): Promise<void> {
    const now = this.parts.clock.now();
    if (lastUsedAt !== null && now.getTime() - Date.parse(lastUsedAt) < useNotedEveryMs) return;
    await this.parts.keys.noteUse(id, now.toISOString());
  }

  private async require(id: string): Promise<KeyRecord> {
    const key = await this.parts.keys.find(id, monthOf(this.parts.clock));
    if (!key) throw notFound('key');
    return key;
  }

  /** Another partner does not exist for a partner developer. */
  private async requireOwnPartner(person: SignedInPerson, partnerId: string): Promise<void> {
    if (!mayManage(person, partnerId) || !(await this.parts.keys.partnerExists(partnerId))) throw notFound('partner');
  }

  private async requireSiteFor(kind: KeyNew['kind'], partnerId: string): Promise<void> {
    if (kind !== 'embed' || (await this.parts.keys.hasSite(partnerId))) return;
    const detail = 'An embed key works only from listed sites. List the site that will carry the form first.';
    throw new DeskError('request-invalid', detail, { errors: [{ pointer: '#/kind', detail }] });
  }

  private async idsOfScope(scope: NonNullable<KeyNew['estimators']>): Promise<readonly string[] | null> {
    if (scope === 'all') return null;
    const ids = await this.parts.estimators.idsOfSlugs(scope);
    const errors = scope.flatMap((slug, at) =>
      ids.has(slug) ? [] : [{ pointer: `#/estimators/${at}`, detail: `There is no estimator ${slug}.` }],
    );
    if (errors.length > 0)
      throw new DeskError(
        'estimator-unknown',
        'Name estimators by their public names, as the list of estimators shows them.',
        { errors },
      );
    return [...ids.values()];
  }

  private futureTime(given: string | null): string | null {
    if (given === null) return null;
    const time = new Date(given);
    if (time.getTime() > this.parts.clock.now().getTime()) return time.toISOString();
    const detail = 'Give a time in the future, or null for a key that does not run out.';
    throw new DeskError('request-invalid', detail, { errors: [{ pointer: '#/expiresAt', detail }] });
  }

  private toAnswer(key: KeyRecord): Key {
    const { secretHash: _hash, partnerId: _partner, allEstimators, slugs, ...rest } = key;
    const expired = key.expiresAt !== null && key.expiresAt <= timeText(this.parts.clock);
    const state = key.revokedAt !== null ? 'revoked' : expired ? 'expired' : 'live';
    return { ...rest, createdBy: { ...key.createdBy }, estimators: allEstimators ? 'all' : [...slugs], state };
  }
}

function mayManage(person: SignedInPerson, partnerId: string): boolean {
  return person.roles.includes('administrator') || person.partnerId === partnerId;
}

/** A partner developer issues keys of their own, and must not set their own limits aside. */
function requireModestLimit(person: SignedInPerson, perMinute: number): void {
  if (person.roles.includes('administrator') || perMinute <= mostPerMinuteOfPartner) return;
  throw new DeskError(
    'request-invalid',
    `Ask the desk for a key of more than ${mostPerMinuteOfPartner} calls a minute.`,
    {
      errors: [{ pointer: '#/perMinute', detail: `at most ${mostPerMinuteOfPartner}; the desk can give more` }],
    },
  );
}
