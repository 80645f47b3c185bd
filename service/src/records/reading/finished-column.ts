import {
  cellsToCodes,
  cellsToTexts,
  codesToCells,
  numbersToCells,
  textsToCells,
  type ColumnKind,
} from '../cell-blocks';
import { decodeWords } from './cell-stores';
import type { BuiltBlock, ColumnBuilder } from './column-builder';
import type { ColumnPlan } from './column-plan';
import { statisticsOf, statisticsOfLevels, type ColumnStatistics } from './column-statistics';
import { maximumDistinct, maximumLevelLength, maximumLevels } from './limits';
import { ReadingSorter } from './reading-sorter';
import type { SpilledCells, SpillFile } from './spill-file';

export interface Level {
  readonly value: string;
  readonly count: number;
}

/** A column ready to be stored; its cells lie in the spill file in the form that `record_blocks` holds. */
export interface FinishedColumn {
  readonly name: string;
  readonly position: number;
  readonly kind: ColumnKind;
  readonly unit: string | null;
  readonly statistics: ColumnStatistics;
  /** In the order of the codes; empty unless a category. */
  readonly levels: readonly Level[];
  readonly blocks: readonly SpilledCells[];
}

/** With no more levels than this a column of words is a category however few rows there are. */
const certainLevels = 50;

export function finishColumns(
  builders: readonly ColumnBuilder[],
  rowCount: number,
  onMeasured: (columns: number) => void,
): FinishedColumn[] {
  const sorter = new ReadingSorter(rowCount);
  return builders.map((builder, at) => {
    const column = finishColumn(builder, sorter);
    onMeasured(at + 1);
    return column;
  });
}

function finishColumn(builder: ColumnBuilder, sorter: ReadingSorter): FinishedColumn {
  const { form } = builder;
  if (form.kind === 'numeric' || form.kind === 'date') return finishNumbers(builder, form.kind, sorter);
  return form.kind === 'nothing' || builder.options.plan.kind === 'text' ? finishTexts(builder) : finishWords(builder);
}

/** Every block in the column's own form: those that were missing throughout are written out now. */
function placeBlocks(builder: ColumnBuilder, missing: (rowCount: number) => Uint8Array): SpilledCells[] {
  return builder.blocks.map((block) =>
    block.layout === 'missing' ? builder.options.spill.append(missing(block.rowCount)) : block.place,
  );
}

function finishNumbers(builder: ColumnBuilder, kind: 'numeric' | 'date', sorter: ReadingSorter): FinishedColumn {
  const { name, position, spill } = builder.options;
  const blocks = placeBlocks(builder, (rowCount) => numbersToCells(new Float64Array(rowCount).fill(NaN)));
  const values = new Float64Array(builder.blocks.reduce((total, block) => total + block.rowCount, 0));
  const bytes = new Uint8Array(values.buffer);
  let at = 0;
  for (const place of blocks) {
    spill.readInto(bytes.subarray(at), place);
    at += place.length;
  }
  return {
    name,
    position,
    kind,
    unit: builder.unit,
    statistics: statisticsOf(kind, values, sorter),
    levels: [],
    blocks,
  };
}

function countCodes(builder: ColumnBuilder): { readonly counts: number[]; readonly missing: number } {
  const counts = new Array<number>(builder.levels.length).fill(0);
  let missing = 0;
  for (const block of builder.blocks) {
    if (block.layout === 'missing') {
      missing += block.rowCount;
      continue;
    }
    for (const code of cellsToCodes(builder.options.spill.read(block.place))) {
      if (code < 0) missing++;
      else counts[code]++;
    }
  }
  return { counts, missing };
}

/**
 * Words that come back are a category; words that are mostly different, or long, are text: names, remarks, numbers
 * of records. The limits are ours (common practice, no source).
 */
export function areLevels(levels: readonly string[], present: number, plan: ColumnPlan): boolean {
  if (levels.length > maximumLevels || levels.some((level) => level.length > maximumLevelLength)) return false;
  return plan.kind === 'category' || levels.length <= certainLevels || levels.length <= present / 2;
}

function finishWords(builder: ColumnBuilder): FinishedColumn {
  if (builder.blocks.some((block) => block.layout === 'texts')) return finishTexts(builder);
  const { counts, missing } = countCodes(builder);
  const present = counts.reduce((total, count) => total + count, 0);
  if (!areLevels(builder.levels, present, builder.options.plan)) return finishTexts(builder);
  const { name, position } = builder.options;
  const blocks = placeBlocks(builder, (rowCount) => codesToCells(new Int32Array(rowCount).fill(-1)));
  const levels = builder.levels.map((value, code) => ({ value, count: counts[code] }));
  return {
    name,
    position,
    kind: 'category',
    unit: null,
    statistics: statisticsOfLevels(missing, levels.length),
    levels,
    blocks,
  };
}

function textsOf(block: BuiltBlock, builder: ColumnBuilder, spill: SpillFile): (string | null)[] {
  if (block.layout === 'missing') return new Array<null>(block.rowCount).fill(null);
  const cells = spill.read(block.place);
  return block.layout === 'texts' ? cellsToTexts(cells) : decodeWords(cellsToCodes(cells), builder.levels);
}

function finishTexts(builder: ColumnBuilder): FinishedColumn {
  const { name, position, spill } = builder.options;
  const different = new Set<string>();
  let missing = 0;
  const blocks = builder.blocks.map((block) => {
    const texts = textsOf(block, builder, spill);
    for (const text of texts) {
      if (text === null) missing++;
      else if (different.size <= maximumDistinct) different.add(text);
    }
    return block.layout === 'texts' ? block.place : spill.append(textsToCells(texts));
  });
  const distinct = different.size > maximumDistinct ? null : different.size;
  return {
    name,
    position,
    kind: 'text',
    unit: null,
    statistics: statisticsOfLevels(missing, distinct),
    levels: [],
    blocks,
  };
}
