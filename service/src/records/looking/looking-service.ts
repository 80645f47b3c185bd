import { extname, join } from 'node:path';
import pLimit from 'p-limit';
import type { components } from '../../../../openapi/types/desk';
import { DeskError } from '../../errors';
import type { Page } from '../../http/page';
import { kindWords } from '../kind-words';
import { toColumn, toRevisionSummary } from '../record-answers';
import type { ColumnRecord, RecordsStore, RevisionRecord } from '../records-store';
import { revisionWithRows, withRowsOf } from '../required-rows';
import { readRows } from '../revision-rows';
import { answerOfThread } from '../worker-answer';
import type { TableComparison } from './comparison/compare-tables';
import { renamesIn } from './comparison/renamed-table';
import { mappedColumns, type CorrelationMap } from './correlation-map';
import type { LookKind, LookTasks } from './look-task';
import { Remembered } from './remembered';
import { chosenRows, parseNumbers } from './row-numbers';

type Schemas = components['schemas'];

export interface LookingParts {
  readonly records: RecordsStore;
  readonly databasePath: string;
  /** Node's own arguments for the looking thread; none when compiled. */
  readonly threadArguments: readonly string[];
}

export interface RowsQuery extends Page {
  readonly where?: string;
  /** Row numbers from 1, parted by commas. */
  readonly numbers?: string;
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `look-worker${extname(__filename)}`);

/** Bytes of matched rows' positions that are remembered, over all conditions. */
const rememberedPositionBytes = 32 * 1024 * 1024;
const rememberedAnswers = 30;

const invalid = (pointer: string, detail: string): DeskError =>
  new DeskError('request-invalid', `Mend the request and send it again: ${detail}.`, { errors: [{ pointer, detail }] });

/** Shows revisions without changing them. What takes long runs in threads: pages and pictures by one queue, long work by another. */
export class LookingService {
  private readonly quick = pLimit(2);
  private readonly long = pLimit(1);
  private readonly matched = new Remembered<Uint32Array>(
    rememberedPositionBytes,
    (positions) => 1000 + positions.byteLength,
  );
  private readonly maps = new Remembered<CorrelationMap>(rememberedAnswers, () => 1);
  private readonly comparisons = new Remembered<TableComparison>(rememberedAnswers, () => 1);

  constructor(private readonly parts: LookingParts) {}

  async listRows(id: string, { where, numbers, ...page }: RowsQuery): Promise<Schemas['RecordRows']> {
    const revision = await this.readable(id);
    const columns = await this.parts.records.columnsOf(id);
    const names = columns.map((column) => column.name);
    if (where === undefined && numbers === undefined) {
      const rows = await readRows(this.parts.records, id, columns, page);
      const counted = rows.map((_, index) => page.offset + index + 1);
      return { total: revision.rowCount, offset: page.offset, columns: names, numbers: counted, rows };
    }
    const listed = numbers === undefined ? null : this.numbersOf(numbers, revision);
    const met = where === undefined ? null : await this.rowsWhere(id, where);
    const positions = chosenRows(met, listed);
    const shown = positions.slice(page.offset, page.offset + page.limit);
    const rows = shown.length === 0 ? [] : await this.ask('rows-at', { revisionId: id, positions: shown });
    return {
      ...{ total: positions.length, offset: page.offset, columns: names },
      numbers: Array.from(shown, (position) => position + 1),
      rows: rows.map((row) => [...row]),
    };
  }

  async correlations(id: string): Promise<Schemas['Correlations']> {
    await this.readable(id);
    const measures = (await this.parts.records.columnsOf(id)).filter(isMeasure).map(({ name }) => name);
    const columns = measures.slice(0, mappedColumns);
    const map = await this.maps.get([id], () => this.ask('correlations', { revisionId: id, columns }));
    return {
      columns: [...map.columns],
      correlations: map.correlations.map((row) => [...row]),
      counts: map.counts.map((row) => [...row]),
      leftOut: measures.slice(mappedColumns),
    };
  }

  async scatter(id: string, x: string, y: string): Promise<Schemas['Scatter']> {
    await this.readable(id);
    const columns = await this.parts.records.columnsOf(id);
    requireMeasure(columns, 'x', x);
    requireMeasure(columns, 'y', y);
    const { total, points } = await this.ask('scatter', { revisionId: id, x, y });
    return { x, y, total, points: points.map((point) => ({ ...point })) };
  }

  /** What became of the rows of `fromId` in `toId`. */
  async compare(toId: string, fromId: string, key: string | undefined): Promise<Schemas['RevisionComparison']> {
    const [to, from] = [await this.readable(toId), await this.readable(fromId)];
    if (to.recordSetId !== from.recordSetId)
      throw invalid('#/with', 'both revisions must be of the same record set; choose another revision of this one');
    const columnsOf = async (id: string): Promise<Map<string, ColumnRecord>> =>
      new Map((await this.parts.records.columnsOf(id)).map((column) => [column.name, column]));
    const [before, after] = [await columnsOf(fromId), await columnsOf(toId)];
    const renames = withoutClashes(await this.renamesBetween(from, to), before);
    const formerNames = new Map([...renames].map(([former, name]) => [name, former]));
    const asked = { fromId, toId, key: key ?? null, renames };
    const found = await this.comparisons.get([fromId, toId, asked.key], () => this.compareAnew(asked));
    return {
      ...toComparisonAnswer(found),
      ...{ from: toRevisionSummary(from), to: toRevisionSummary(to) },
      columns: found.columns.map((column) => {
        const formerName = formerNames.get(column.name) ?? null;
        const sides = { from: before.get(formerName ?? column.name), to: after.get(column.name) };
        return toComparedColumn({ ...column, formerName }, sides);
      }),
    };
  }

  /** What `to` calls columns of `from` otherwise, when one was made from the other by steps. */
  private async renamesBetween(from: RevisionRecord, to: RevisionRecord): Promise<ReadonlyMap<string, string>> {
    const stepsOf = async ({ id }: RevisionRecord) => (await this.parts.records.mendingOf(id))?.steps ?? [];
    if (to.mendedFrom === from.id) return renamesIn(await stepsOf(to));
    if (from.mendedFrom !== to.id) return new Map();
    return new Map([...renamesIn(await stepsOf(from))].map(([former, name]) => [name, former]));
  }

  private async compareAnew(asked: LookTasks['comparison']['asked']): Promise<TableComparison> {
    const found = await this.ask('comparison', asked);
    if ('columns' in found) return found;
    const those = found.keys.length > 0 ? `; ${found.keys.slice(0, 10).join(', ')} can` : '; no column can';
    throw invalid(
      '#/key',
      `${String(asked.key)} cannot be the key, which must be in both, never missing and never repeated${those}`,
    );
  }

  private numbersOf(text: string, { rowCount }: RevisionRecord): Uint32Array {
    const numbers = parseNumbers(text);
    const beyond = numbers.find((number) => number > rowCount);
    if (beyond !== undefined) throw invalid('#/numbers', `there is no row ${beyond}; the revision has ${rowCount}`);
    return numbers.map((number) => number - 1);
  }

  private rowsWhere(revisionId: string, where: string): Promise<Uint32Array> {
    return this.matched.get([revisionId, where], async () => {
      const found = await this.ask('matching-rows', { revisionId, where });
      if (found.kind === 'formula-problem') throw invalid('#/where', found.message);
      return found.positions;
    });
  }

  private readable(id: string): Promise<RevisionRecord> {
    return revisionWithRows(this.parts.records, id);
  }

  private ask<Kind extends LookKind>(kind: Kind, asked: LookTasks[Kind]['asked']): Promise<LookTasks[Kind]['answer']> {
    const { records, databasePath, threadArguments } = this.parts;
    const ids = 'revisionId' in asked ? [asked.revisionId] : [asked.fromId, asked.toId];
    const queue = kind === 'correlations' || kind === 'comparison' ? this.long : this.quick;
    return withRowsOf(records, ids, () =>
      queue(() => answerOfThread(workerPath, { kind, databasePath, asked }, threadArguments)),
    );
  }
}

const isMeasure = ({ kind }: ColumnRecord): boolean => kind === 'numeric' || kind === 'date';

function requireMeasure(columns: readonly ColumnRecord[], parameter: 'x' | 'y', name: string): void {
  const column = columns.find((one) => one.name === name);
  if (!column) throw invalid(`#/${parameter}`, `there is no column ${name}`);
  if (!isMeasure(column))
    throw invalid(
      `#/${parameter}`,
      `${name} is a column of kind ${kindWords[column.kind]}; name one of kind Number or Date`,
    );
}

function toComparisonAnswer({ key, keys, rows, changes, added, removed }: TableComparison) {
  return {
    ...{ key, keys: [...keys], rows: { ...rows }, added: [...added], removed: [...removed] },
    changes: changes.map(({ cells, ...row }) => ({ ...row, cells: cells.map((cell) => ({ ...cell })) })),
  };
}

/** A name that another column of the same side has already cannot be followed. */
function withoutClashes(
  renames: ReadonlyMap<string, string>,
  columns: ReadonlyMap<string, ColumnRecord>,
): ReadonlyMap<string, string> {
  return new Map([...renames].filter(([, name]) => !columns.has(name) || renames.has(name)));
}

function toComparedColumn(
  { shape, ...facts }: TableComparison['columns'][number] & { readonly formerName: string | null },
  { from, to }: { readonly from: ColumnRecord | undefined; readonly to: ColumnRecord | undefined },
): Schemas['ColumnComparison'] {
  const state = facts.formerName !== null && facts.state === 'same' ? 'changed' : facts.state;
  return {
    ...{ ...facts, state, from: from ? toColumn(from) : null, to: to ? toColumn(to) : null },
    shape: shape && {
      edges: [...shape.edges],
      levels: [...shape.levels],
      from: [...shape.from],
      to: [...shape.to],
    },
  };
}
