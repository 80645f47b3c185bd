import { requireExpectedNewest } from './newest-guard';
import type { RevisionRecord } from './records-store';

const revision = (number: number): RevisionRecord =>
  ({
    number,
    recordSetName: 'Refits',
    createdAt: '2026-11-03T09:05:00.000Z',
    createdBy: { id: 'someone', name: 'Ina Marrow' },
  }) as RevisionRecord;
const holding = (...numbers: number[]) => ({ revisionsOf: async () => numbers.map(revision) });

describe('the guard of the newest revision', () => {
  it('lets through who knows the newest revision, and who does not say what they know', async () => {
    await expect(requireExpectedNewest(holding(3, 2, 1), 'set', 3)).resolves.toMatchObject({ number: 3 });
    await expect(requireExpectedNewest(holding(3, 2, 1), 'set', undefined)).resolves.toMatchObject({ number: 3 });
  });

  it('names who added which revision when, and what to do', async () => {
    await expect(requireExpectedNewest(holding(3, 2, 1), 'set', 2)).rejects.toMatchObject({
      code: 'record-set-changed',
      status: 409,
      detail:
        'Ina Marrow added revision 3 to Refits at 2026-11-03 09:05 UTC, after you had read revision 2. Look at revision 3 first; if yours is still wanted, send it again.',
    });
  });

  it('says when the revision that the caller knew is gone', async () => {
    await expect(requireExpectedNewest(holding(1), 'set', 2)).rejects.toMatchObject({
      code: 'record-set-changed',
      detail: expect.stringContaining('Revision 2 has been deleted'),
    });
  });

  it('finds no set where there is no revision', async () => {
    await expect(requireExpectedNewest(holding(), 'set', undefined)).rejects.toMatchObject({ code: 'not-found' });
  });
});
