import { marksComplaint, marksOf, marksText } from './missing-marks';
import { nameFromFile } from './file-complaint';
import { basisWords, seenWords, wantsALook } from './seen-words';
import { PROPOSAL, proposedColumn } from './testing/incoming';

describe('words about a file that is brought in', () => {
  it('take marks apart by semicolons, each once', () => {
    expect(marksOf(' 999; not counted ;;999')).toEqual(['999', 'not counted']);
    expect(marksText(['999', 'not counted'])).toBe('999; not counted');
  });

  it('complain about too many marks and too long ones', () => {
    expect(marksComplaint(['999'])).toBeUndefined();
    expect(marksComplaint(Array.from({ length: 21 }, String))).toContain('20 marks at most; these are 21');
    expect(marksComplaint(['x'.repeat(41)])).toContain('40 characters at most');
  });

  it('suggest a name from the file’s, packed or not', () => {
    expect(nameFromFile('refits_nine-yards.csv.gz')).toBe('refits nine yards');
    expect(nameFromFile('jobs.xlsx')).toBe('jobs');
  });

  it('say of a unit what becomes of its readings', () => {
    const units = [
      { unit: 'kg', count: 4, factor: null },
      { unit: 'cm', count: 1, factor: 0.01 },
    ];
    const column = proposedColumn('length', 0, { unit: 'm', unitsInCells: units });
    expect(seenWords(column)).toEqual([
      '“kg” stands behind 4 numbers and cannot be converted to m.',
      '“cm” stands behind 1 number: multiplied by 0.01 to give m.',
    ]);
    expect(wantsALook(column)).toBe(true);
    expect(wantsALook(proposedColumn('crew', 1, { missingCount: 9 }))).toBe(false);
  });

  it('say what the counts rest on', () => {
    expect(basisWords(PROPOSAL)).toBe('300 rows, all that the file has');
    expect(basisWords({ ...PROPOSAL, complete: false })).toContain('the first 300 rows');
  });
});
