import { EMPTY_KEY_DRAFT, KeyDraft, keyComplaints, keyOf } from './key-draft';

const now = new Date(2026, 10, 3, 12);
const draft: KeyDraft = { ...EMPTY_KEY_DRAFT, kind: 'embed', label: ' Boat pages ' };

describe('drafting a key', () => {
  it('has nothing to complain about once kind and label are given', () => {
    expect(Object.values(keyComplaints(draft, now)).filter(Boolean)).toEqual([]);
  });

  it('asks for what is sent: every estimator, 60 a minute, no quota, no end', () => {
    expect(keyOf(draft)).toEqual({
      kind: 'embed',
      label: 'Boat pages',
      estimators: 'all',
      perMinute: 60,
      monthlyQuota: null,
      expiresAt: null,
    });
  });

  it('sends the estimators chosen, the quota and the end of the last day', () => {
    const key = keyOf({
      ...draft,
      scope: 'chosen',
      chosen: ['refit-labour'],
      monthlyQuota: '20,000',
      lastDay: '2027-03-31',
    });
    expect(key).toMatchObject({ estimators: ['refit-labour'], monthlyQuota: 20_000 });
    expect(new Date(key?.expiresAt ?? '')).toEqual(new Date(2027, 2, 31, 23, 59, 59));
  });

  it('lets today be the last day, and no day before it', () => {
    expect(keyComplaints({ ...draft, lastDay: '2026-11-03' }, now).expiresAt).toBeUndefined();
    expect(keyComplaints({ ...draft, lastDay: '2026-11-02' }, now).expiresAt).toBeDefined();
  });

  it.each<[keyof ReturnType<typeof keyComplaints>, Partial<KeyDraft>]>([
    ['kind', { kind: undefined }],
    ['label', { label: ' ' }],
    ['estimators', { scope: 'chosen' }],
    ['perMinute', { perMinute: '' }],
    ['monthlyQuota', { monthlyQuota: 'lots' }],
    ['expiresAt', { lastDay: '2026-13-45' }],
  ])('complains about %s', (field, change) => {
    expect(keyComplaints({ ...draft, ...change }, now)[field]).toBeDefined();
  });
});
