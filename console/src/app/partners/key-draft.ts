import type { KeyKind, KeyNew } from '../api/contract';
import type { Complaints } from '../ui/entry-form';
import { nameComplaint } from '../ui/text-rules';
import { WholeNumberReading, readWholeNumber } from './whole-number';

/** A key as it is being filled in: what was typed, word for word. */
export interface KeyDraft {
  readonly kind: KeyKind | undefined;
  readonly label: string;
  readonly scope: 'all' | 'chosen';
  readonly chosen: readonly string[];
  readonly perMinute: string;
  readonly monthlyQuota: string;
  /** The last day it works, as a date field gives it; empty for never ending. */
  readonly lastDay: string;
}

export type KeyField = 'kind' | 'label' | 'estimators' | 'perMinute' | 'monthlyQuota' | 'expiresAt';

export const EMPTY_KEY_DRAFT: KeyDraft = {
  kind: undefined,
  label: '',
  scope: 'all',
  chosen: [],
  perMinute: '60',
  monthlyQuota: '',
  lastDay: '',
};

const MOST_PER_MINUTE = 100_000;
const MOST_PER_MONTH = 1_000_000_000;

export function keyComplaints(draft: KeyDraft, now: Date): Complaints<KeyField> {
  return {
    kind: draft.kind === undefined ? 'Choose a kind of key' : undefined,
    label: nameComplaint(draft.label, 'a label that says where the key will be used'),
    estimators: draft.scope === 'chosen' && draft.chosen.length === 0 ? 'Choose at least one estimator' : undefined,
    perMinute: complaintOf(perMinuteOf(draft)),
    monthlyQuota: complaintOf(monthlyQuotaOf(draft)),
    expiresAt: lastDayComplaint(draft.lastDay, now),
  };
}

/** The key to ask for; undefined while there is something to complain about. */
export function keyOf(draft: KeyDraft): KeyNew | undefined {
  const perMinute = perMinuteOf(draft);
  const monthlyQuota = monthlyQuotaOf(draft);
  if (draft.kind === undefined || !('value' in perMinute) || !('value' in monthlyQuota)) return undefined;
  return {
    kind: draft.kind,
    label: draft.label.trim(),
    estimators: draft.scope === 'all' ? 'all' : [...draft.chosen],
    perMinute: perMinute.value ?? undefined,
    monthlyQuota: monthlyQuota.value,
    expiresAt: draft.lastDay === '' ? null : endOf(draft.lastDay).toISOString(),
  };
}

function perMinuteOf({ perMinute }: KeyDraft): WholeNumberReading {
  return readWholeNumber(perMinute, { noun: 'Calls a minute', most: MOST_PER_MINUTE, optional: false });
}

function monthlyQuotaOf({ monthlyQuota }: KeyDraft): WholeNumberReading {
  return readWholeNumber(monthlyQuota, { noun: 'Estimates a month', most: MOST_PER_MONTH, optional: true });
}

function complaintOf(reading: WholeNumberReading): string | undefined {
  return 'complaint' in reading ? reading.complaint : undefined;
}

function lastDayComplaint(lastDay: string, now: Date): string | undefined {
  if (lastDay === '') return undefined;
  const end = endOf(lastDay);
  if (Number.isNaN(end.getTime())) return 'Enter a whole date, or leave it empty';
  return end <= now ? 'The last day must not lie in the past' : undefined;
}

/** A day ends for the person who names it, so it is read in their time zone. */
function endOf(day: string): Date {
  return new Date(`${day}T23:59:59`);
}
