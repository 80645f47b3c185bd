import { createHash } from 'node:crypto';
import { newId } from '../../service/src/database/new-id';
import { codesToCells, numbersToCells } from '../../service/src/records/cell-blocks';
import type { TestPerson, TestService } from './test-service';

export interface NumericColumn {
  readonly name: string;
  readonly unit?: string;
  /** NaN: missing. */
  readonly values: readonly number[];
}

export interface CategoryColumn {
  readonly name: string;
  readonly levels: readonly string[];
  readonly codes: readonly number[];
}

type FixtureColumn = NumericColumn | CategoryColumn;

interface StoredColumn {
  readonly kind: 'numeric' | 'category';
  readonly unit: string | null;
  readonly missingCount: number;
  readonly minimum: number | null;
  readonly maximum: number | null;
  readonly levels: readonly { readonly value: string; readonly count: number }[];
  readonly cells: Buffer;
}

function stored(column: FixtureColumn): StoredColumn {
  if ('codes' in column) {
    const levels = column.levels.map((value, code) => ({
      value,
      count: column.codes.filter((other) => other === code).length,
    }));
    const missingCount = column.codes.filter((code) => code < 0).length;
    return {
      kind: 'category',
      unit: null,
      missingCount,
      minimum: null,
      maximum: null,
      levels,
      cells: codesToCells(Int32Array.from(column.codes)),
    };
  }
  const given = column.values.filter((value) => !Number.isNaN(value));
  const [minimum, maximum] =
    given.length > 0
      ? [given.reduce((least, value) => Math.min(least, value)), given.reduce((most, value) => Math.max(most, value))]
      : [null, null];
  const missingCount = column.values.length - given.length;
  return {
    kind: 'numeric',
    unit: column.unit ?? null,
    missingCount,
    minimum,
    maximum,
    levels: [],
    cells: numbersToCells(Float64Array.from(column.values)),
  };
}

/** A revision of a new record set, as an upload leaves it. Gives its id. */
export async function addRevision(
  service: TestService,
  person: TestPerson,
  columns: readonly FixtureColumn[],
): Promise<string> {
  const { knex } = service.services;
  const at = service.clock.now().toISOString();
  const [recordSetId, id] = [newId(), newId()];
  const rowCount = 'codes' in columns[0] ? columns[0].codes.length : columns[0].values.length;
  const by = { createdAt: at, createdBy: person.id };
  await knex('recordSets').insert({ id: recordSetId, name: `Records ${id}`, nameKey: id, description: '', ...by });
  const file = {
    sha256: createHash('sha256').update(id).digest('hex'),
    byteCount: 1,
    fileName: 'records.csv',
    originalPath: 'records.csv',
  };
  const reading = JSON.stringify({ encoding: 'utf-8', delimiter: ',', decimal: '.', header: true });
  await knex('recordRevisions').insert({
    id,
    recordSetId,
    number: 1,
    rowCount,
    columnCount: columns.length,
    reading,
    ...file,
    ...by,
  });
  for (const [position, column] of columns.entries()) {
    const { cells, levels, ...facts } = stored(column);
    await knex('recordColumns').insert({
      revisionId: id,
      position,
      name: column.name,
      levels: JSON.stringify(levels),
      ...facts,
    });
    await knex('recordBlocks').insert({ revisionId: id, position, block: 0, rowCount, cells });
  }
  return id;
}

/** Repeatable numbers from 0 to 1 (Park and Miller's minimal standard generator, 1988). */
export function uniformNumbers(count: number, seed: number): number[] {
  let state = seed;
  return Array.from({ length: count }, () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  });
}

export const hulls = ['GRP', 'steel', 'wood'] as const;

/** Boats: hours grow with length and with the hull's material; `length overall` and `beam` carry much the same information. */
export function boatColumns(rowCount = 120): FixtureColumn[] {
  const size = uniformNumbers(rowCount, 11);
  const noise = uniformNumbers(rowCount, 12);
  const lengths = size.map((value) => 6 + 10 * value);
  const beams = lengths.map((length, row) => 0.9 + 0.25 * length + 0.3 * noise[(row * 7 + 3) % rowCount]);
  const codes = uniformNumbers(rowCount, 13).map((value) => Math.floor(value * 3));
  const hours = lengths.map((length, row) => 40 + 9 * length + 12 * codes[row] + 20 * (noise[row] - 0.5));
  return [
    { name: 'hours', unit: 'h', values: hours },
    { name: 'length overall', unit: 'm', values: lengths },
    { name: 'beam', unit: 'm', values: beams },
    { name: 'hull', levels: hulls, codes },
    {
      name: 'ballast',
      unit: 't',
      values: lengths.map((length, row) => (row % 9 === 4 ? NaN : length / 4 + noise[row])),
    },
  ];
}
