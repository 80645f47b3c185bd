import { DeskError } from '../errors';
import type { RevisionRecord } from './records-store';
import { revisionWithRows, withRowsOf } from './required-rows';

const there = { number: 2, recordSetName: 'Boats', erasedAt: null } as RevisionRecord;
const erased = { ...there, erasedAt: '2026-11-03T09:00:00.000Z' };
const holding = (...revisions: readonly (RevisionRecord | null)[]) => {
  const findRevision = jest.fn<Promise<RevisionRecord | null>, [string]>();
  for (const revision of revisions) findRevision.mockResolvedValueOnce(revision);
  return { findRevision };
};
const lost = (): Promise<never> => Promise.reject(new Error('A block of cells is not in the database.'));

describe('rows that work needs', () => {
  it('are asked for before it', async () => {
    expect(await revisionWithRows(holding(there), 'r')).toBe(there);
    await expect(revisionWithRows(holding(null), 'r')).rejects.toMatchObject({ code: 'not-found' });
    await expect(revisionWithRows(holding(erased), 'r')).rejects.toMatchObject({
      code: 'records-erased',
      detail: expect.stringContaining('revision 2 of Boats were erased on 2026-11-03'),
    });
  });

  it('were erased or deleted when it loses them on the way, and that is told', async () => {
    await expect(withRowsOf(holding(there, erased), ['a', 'b'], lost)).rejects.toMatchObject({
      code: 'records-erased',
    });
    await expect(withRowsOf(holding(null), ['a'], lost)).rejects.toMatchObject({ code: 'not-found' });
  });

  it('do not change what is told of anything else that goes wrong', async () => {
    await expect(withRowsOf(holding(there), ['a'], lost)).rejects.toThrow('A block of cells');
    const records = holding(null);
    const refused = (): Promise<never> => Promise.reject(new DeskError('request-invalid', 'Mend step 1.'));
    await expect(withRowsOf(records, ['a'], refused)).rejects.toMatchObject({ code: 'request-invalid' });
    expect(records.findRevision).not.toHaveBeenCalled();
  });
});
