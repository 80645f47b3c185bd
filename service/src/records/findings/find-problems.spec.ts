import { boatCount as rowCount, cleanBoats, tableOf } from '../../../../test/support/invented-boats';
import { findProblems } from './find-problems';
import type { Finding, FindingKind } from './finding';

const ofKind = (findings: readonly Finding[], kind: FindingKind) => findings.filter((finding) => finding.kind === kind);

describe('what to look at in a table', () => {
  it('is nothing in a clean one', () => {
    for (const seed of [11, 12, 13, 14, 15]) expect(findProblems(tableOf(cleanBoats(seed)), 'labour')).toEqual([]);
  });

  it.each([
    [1 / 0.3048, 'length'],
    [0.3048, 'beam'],
    [1000, 'draught'],
    [0.1, 'waterline'],
    [25.4, 'length'],
    [0.45359237, 'beam'],
  ] as const)('includes rows that are off by the factor %d', (factor, name) => {
    const boats = cleanBoats();
    const wrong = [3, 77, 410];
    for (const row of wrong) boats[name][row] *= factor;
    const found = ofKind(findProblems(tableOf(boats)), 'unit-mix-up');
    expect(found).toHaveLength(1);
    expect(found[0]).toMatchObject({ columns: [name], rowCount: 3, rows: wrong.map((row) => row + 1) });
    expect(found[0].message).toContain(factor > 1 ? 'larger' : 'smaller');
  });

  it('blames the column that is wrong, not those that go with it', () => {
    const boats = cleanBoats();
    for (let row = 0; row < 30; row++) boats.length[row * 20] /= 0.3048;
    const found = ofKind(findProblems(tableOf(boats)), 'unit-mix-up');
    expect(found.map((finding) => [finding.columns, finding.rowCount])).toEqual([[['length'], 30]]);
  });

  it('includes rows that repeat another, wholly or but for one column', () => {
    const boats = cleanBoats();
    for (const cells of [
      boats.length,
      boats.waterline,
      boats.beam,
      boats.draught,
      boats.labour,
      boats.hulls,
      boats.days,
    ]) {
      cells[100] = cells[40];
      cells[200] = cells[60];
    }
    boats.labour[200] += 5;
    const findings = findProblems(tableOf(boats));
    expect(ofKind(findings, 'repeated-rows')).toMatchObject([{ rowCount: 1, rows: [101] }]);
    expect(ofKind(findings, 'nearly-repeated-rows')).toMatchObject([{ columns: ['labour'], rows: [201] }]);
  });

  it('includes columns that never vary', () => {
    const same = { name: 'yard', kind: 'category' as const, codes: new Int32Array(rowCount), levels: ['north'] };
    const empty = { name: 'note', kind: 'text' as const, values: new Array<null>(rowCount).fill(null) };
    const found = ofKind(findProblems(tableOf(cleanBoats(), [same, empty])), 'constant-column');
    expect(found.map((finding) => finding.columns)).toEqual([['yard'], ['note']]);
  });

  it('includes levels that differ by case or by spaces', () => {
    const boats = { ...cleanBoats(), levels: ['steel', 'Steel ', 'larch'] };
    const found = ofKind(findProblems(tableOf(boats)), 'levels-alike');
    expect(found).toHaveLength(1);
    expect(found[0].message).toContain('“Steel ”');
    expect(found[0].rowCount).toBeLessThan(rowCount / 2);
  });

  it('includes numbers among which a few words stand', () => {
    const levels = ['1.5', '2.5', 'about 3'];
    const codes = Int32Array.from({ length: rowCount }, (_, row) => (row === 9 ? 2 : row % 2));
    const found = ofKind(
      findProblems(tableOf(cleanBoats(), [{ name: 'depth', kind: 'category', codes, levels }])),
      'nearly-numeric',
    );
    expect(found).toMatchObject([{ columns: ['depth'], rows: [10] }]);
  });

  it('includes readings far outside the others', () => {
    const boats = cleanBoats();
    boats.labour[5] = 9999;
    expect(ofKind(findProblems(tableOf(boats)), 'outlying-values')).toMatchObject([{ columns: ['labour'], rows: [6] }]);
  });

  it('includes copies and sums of other columns, each told once', () => {
    const boats = cleanBoats();
    const inches = {
      name: 'length in inches',
      kind: 'numeric' as const,
      values: boats.length.map((metres) => metres / 0.0254),
    };
    const sum = {
      name: 'girth',
      kind: 'numeric' as const,
      values: boats.beam.map((beam, row) => beam + 2 * boats.draught[row]),
    };
    const findings = findProblems(tableOf(boats, [inches, sum]));
    expect(ofKind(findings, 'columns-alike').map((finding) => finding.columns)).toEqual([
      ['length', 'length in inches'],
    ]);
    const combinations = ofKind(findings, 'column-combination');
    expect(combinations).toHaveLength(1);
    expect([...combinations[0].columns].sort()).toEqual(['beam', 'draught', 'girth']);
  });

  it('includes inputs that give the target away', () => {
    const boats = cleanBoats();
    const bill = {
      name: 'bill',
      kind: 'numeric' as const,
      values: boats.labour.map((hours, row) => hours * 41 + (row % 3)),
    };
    expect(
      ofKind(findProblems(tableOf(boats, [bill]), 'labour'), 'leakage-suspect').map((finding) => finding.columns),
    ).toEqual([['bill']]);
    expect(ofKind(findProblems(tableOf(boats, [bill])), 'leakage-suspect')).toEqual([]);
  });

  it('includes spans without a record', () => {
    const boats = cleanBoats();
    for (let row = 300; row < rowCount; row++) boats.days[row] += 60;
    const found = ofKind(findProblems(tableOf(boats)), 'time-gap');
    expect(found).toMatchObject([{ columns: ['day'], rows: [300, 301] }]);
    expect(found[0].message).toContain('61 days');
  });
});
