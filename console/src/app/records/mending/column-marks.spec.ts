import type { MendStep } from '../../api/contract';
import { columnMarks } from './column-marks';

const effect = (rowsConcerned: number | null) => ({ told: '', rowsConcerned });
const marksOf = (steps: readonly MendStep[], ...rows: (number | null)[]): object =>
  Object.fromEntries(columnMarks(steps, rows.map(effect)));

describe('what became of columns', () => {
  it('names those that a step changed, and none that it left alone', () => {
    const steps: MendStep[] = [
      { kind: 'convert-unit', column: 'Beam', factor: 0.1 },
      { kind: 'set-missing', column: 'Crew', where: '[Crew] = 999' },
      { kind: 'drop-repeated-rows' },
    ];
    expect(marksOf(steps, 4, 0, 9)).toEqual({ Beam: 'changed' });
  });

  it('follows a column to its new name, and forgets one that was set aside', () => {
    const steps: MendStep[] = [
      { kind: 'derive', name: 'Area', formula: '[Beam] ^ 2' },
      { kind: 'rename', column: 'Area', to: 'Square' },
      { kind: 'rename', column: 'Beam', to: 'Width' },
      { kind: 'set-unit', column: 'Crew', unit: 'persons' },
      { kind: 'set-aside', column: 'Crew' },
    ];
    expect(marksOf(steps, null, null, null, null, null)).toEqual({ Square: 'new', Width: 'new name' });
  });

  it('says nothing of steps that were not done', () => {
    expect(
      marksOf(
        [
          { kind: 'set-aside', column: 'Crew' },
          { kind: 'rename', column: 'A', to: 'B' },
        ],
        null,
      ),
    ).toEqual({});
  });
});
