import { boatCount, cleanBoats, tableOf, type Boats } from '../../../../test/support/invented-boats';
import type { RecordTable } from '../../regression/records';
import { applySteps } from '../mending/apply-steps';
import { bindCondition } from '../mending/formula-evaluation';
import { findProblems } from './find-problems';
import type { Finding, FindingKind } from './finding';

const seeds = [11, 12, 13, 14, 15, 16, 17, 18] as const;
const ofKind = (table: RecordTable, kind: FindingKind, target?: string): Finding[] =>
  findProblems(table, target).filter((finding) => finding.kind === kind);

function rowsMeeting(where: string, table: RecordTable): number[] {
  const holds = bindCondition(where, table);
  return Array.from({ length: table.rowCount }, (_, row) => row + 1).filter((row) => holds(row - 1));
}

/** Applies the steps of every finding of the kind, in their order. */
function mended(table: RecordTable, findings: readonly Finding[]): RecordTable {
  return applySteps(
    table,
    findings.flatMap((finding) => finding.steps ?? []),
  ).table;
}

type FaultyTable = (seed: number) => RecordTable;
const withFault =
  (put: (boats: Boats) => void): FaultyTable =>
  (seed) => {
    const boats = cleanBoats(seed);
    put(boats);
    return tableOf(boats);
  };
const every = (step: number): number[] =>
  Array.from({ length: Math.floor(boatCount / step) }, (_, at) => at * step + 3);
const scaled = (name: 'length' | 'beam' | 'draught' | 'labour', rows: readonly number[], factor: number): FaultyTable =>
  withFault((boats) => {
    for (const row of rows) boats[name][row] *= factor;
  });
const withColumn =
  (column: (boats: Boats) => RecordTable['columns'][number]): FaultyTable =>
  (seed) => {
    const boats = cleanBoats(seed);
    return tableOf(boats, [column(boats)]);
  };

const faults: readonly (readonly [string, FindingKind, FaultyTable])[] = [
  ['feet among metres', 'unit-mix-up', scaled('length', every(40), 1 / 0.3048)],
  ['pounds among kilograms', 'unit-mix-up', scaled('draught', every(60), 1 / 0.45359237)],
  ['a slipped decimal mark', 'unit-mix-up', scaled('beam', every(100), 0.1)],
  ['readings far out', 'outlying-values', scaled('labour', [5, 60, 200, 201, 400], 90)],
  ['far readings that hide less far ones', 'outlying-values', scaled('labour', every(21), 40)],
  [
    'rows entered twice',
    'repeated-rows',
    withFault(({ length, waterline, beam, draught, labour, hulls, days }) => {
      for (const cells of [length, waterline, beam, draught, labour, hulls, days]) cells.copyWithin(300, 10, 25);
    }),
  ],
  ['a spelling with a space', 'levels-alike', withFault((boats) => (boats.levels = ['oak ', 'Oak', 'larch']))],
  [
    'a column that never varies',
    'constant-column',
    withColumn(() => ({ name: 'yard', kind: 'category', codes: new Int32Array(boatCount), levels: ['north'] })),
  ],
  [
    'words among numbers',
    'nearly-numeric',
    withColumn(() => ({
      ...{ name: 'berth', kind: 'category', levels: ['1', '2', 'see "plan"'] },
      codes: Int32Array.from({ length: boatCount }, (_, row) => (row % 100 === 7 ? 2 : row % 2)),
    })),
  ],
  [
    'a copy in another unit',
    'columns-alike',
    withColumn(({ beam }) => ({ name: 'beam (cm)', kind: 'numeric', values: beam.map((metres) => 100 * metres) })),
  ],
  [
    'a sum of others',
    'column-combination',
    withColumn(({ beam, draught }) => ({
      ...{ name: 'girth', kind: 'numeric' },
      values: beam.map((metres, row) => metres + 2 * draught[row]),
    })),
  ],
];

describe.each(faults)('the remedy for %s', (_what, kind, faulty) => {
  it('leaves nothing of the kind to find', () => {
    for (const seed of seeds) {
      const table = faulty(seed);
      const found = ofKind(table, kind, 'labour');
      expect(found).not.toEqual([]);
      for (const finding of found) expect(finding.steps).toHaveLength(1);
      expect(ofKind(mended(table, found), kind, 'labour')).toEqual([]);
    }
  });

  it('concerns exactly the rows that meet the condition, where there is one', () => {
    for (const finding of ofKind(faulty(11), kind)) {
      if (finding.where === undefined) continue;
      const rows = rowsMeeting(finding.where, faulty(11));
      expect(rows).toHaveLength(finding.rowCount ?? 0);
      expect(finding.rows).toEqual(rows.slice(0, 100));
    }
  });
});

describe('the remedy of a finding', () => {
  it('puts readings in another unit back where they were', () => {
    const clean = tableOf(cleanBoats());
    const table = scaled('length', every(40), 1 / 0.3048)(11);
    const { columns } = mended(table, ofKind(table, 'unit-mix-up'));
    const [now, before] = [columns[0], clean.columns[0]];
    if (now.kind !== 'numeric' || before.kind !== 'numeric') throw new Error('The length is a measure.');
    now.values.forEach((value, row) => expect(value).toBeCloseTo(before.values[row], 10));
  });

  it('is the unit’s alone for readings that lie apart because of it', () => {
    const table = scaled('length', every(40), 1000)(11);
    expect(ofKind(table, 'unit-mix-up').map(({ rowCount }) => rowCount)).toEqual([15]);
    expect(ofKind(table, 'outlying-values')).toEqual([]);
  });

  it('takes in every row, not only those that are listed', () => {
    const table = scaled('draught', every(5), 1000)(11);
    const [finding] = ofKind(table, 'unit-mix-up');
    expect(finding.rows).toHaveLength(100);
    expect(finding.steps).toMatchObject([{ rows: every(5).map((row) => row + 1) }]);
  });

  it('never sets the target aside', () => {
    const copy = withColumn(({ labour }) => ({ name: 'bill', kind: 'numeric', values: labour.map((h) => 41 * h) }))(11);
    expect(ofKind(copy, 'columns-alike', 'bill')).toMatchObject([
      { columns: ['bill', 'labour'], steps: [{ kind: 'set-aside', column: 'labour' }] },
    ]);
    expect(ofKind(copy, 'leakage-suspect', 'bill')).toMatchObject([
      { steps: [{ kind: 'set-aside', column: 'labour' }] },
    ]);
    const sum = withColumn(({ beam, draught }) => ({
      ...{ name: 'girth', kind: 'numeric' },
      values: beam.map((metres, row) => metres + 2 * draught[row]),
    }))(11);
    expect(ofKind(sum, 'column-combination', 'girth')).toMatchObject([
      { steps: [{ kind: 'set-aside', column: 'draught' }] },
    ]);
  });

  it('tells of several copies each once, so that none is set aside twice', () => {
    const { length } = cleanBoats();
    const copies = ['a', 'b'].map((name, at) => ({
      ...{ name, kind: 'numeric' as const },
      values: length.map((metres) => (at + 2) * metres),
    }));
    const table = tableOf(cleanBoats(), copies);
    const found = ofKind(table, 'columns-alike');
    expect(found.map(({ columns }) => columns)).toEqual([
      ['length', 'a'],
      ['length', 'b'],
    ]);
    expect(ofKind(mended(table, found), 'columns-alike')).toEqual([]);
  });

  it('does not make words of numbers with decimal commas, which would all be lost', () => {
    const levels = ['1,5', '2,5', 'see plan'];
    const codes = Int32Array.from({ length: boatCount }, (_, row) => (row === 9 ? 2 : row % 2));
    const table = tableOf(cleanBoats(), [{ name: 'depth', kind: 'category', codes, levels }]);
    expect(ofKind(table, 'nearly-numeric')).toMatchObject([{ rows: [10], steps: [] }]);
  });

  it('is a matter for a person where rows are nearly repeated or days are lacking', () => {
    const boats = cleanBoats();
    for (let row = 300; row < boatCount; row++) boats.days[row] += 60;
    const [gap] = ofKind(tableOf(boats), 'time-gap');
    expect(gap.steps ?? []).toEqual([]);
    expect(rowsMeeting(gap.where ?? '', tableOf(boats))).toEqual([300, 301]);
  });
});
