import type { CategoryRecordColumn, RecordColumn, TextRecordColumn } from '../../regression/records';
import { changeKind } from '../mending/set-kind';
import { NumberClass, NumberReader } from '../reading/number-cell';
import { oneOfTexts } from './conditions';
import { listRows, noRows, rowsText, type Finding } from './finding';

/** How many different values there are, counted up to two. Cost: one pass at most. */
function differentUpToTwo(column: RecordColumn): number {
  const cells: ArrayLike<number | string | null> = column.kind === 'category' ? column.codes : column.values;
  let first: number | string | null = null;
  for (let row = 0; row < cells.length; row++) {
    const cell = cells[row];
    if (cell === null || cell !== cell || (column.kind === 'category' && cell === -1)) continue;
    if (first === null) first = cell;
    else if (cell !== first) return 2;
  }
  return first === null ? 0 : 1;
}

/** A column that never varies. It can be set aside unless it is the target or the only column. */
export function findConstant(column: RecordColumn, canBeSetAside: boolean): Finding[] {
  const different = differentUpToTwo(column);
  if (different > 1) return [];
  const message =
    different === 0
      ? `${column.name} is empty in every row.`
      : `${column.name} has the same value in every row that has one.`;
  return [
    {
      kind: 'constant-column',
      columns: [column.name],
      message,
      remedy: 'Set the column aside: it cannot tell cases apart.',
      ...noRows,
      steps: canBeSetAside ? [{ kind: 'set-aside', column: column.name }] : [],
    },
  ];
}

const plainLevel = (level: string): string => level.normalize('NFKC').trim().replace(/\s+/g, ' ').toLowerCase();

/** Levels that differ only by case or by spaces (Unicode's compatible forms of a character count as the same). Cost: one pass. */
export function findLevelsAlike(column: CategoryRecordColumn): Finding[] {
  const counts = new Array<number>(column.levels.length).fill(0);
  for (const code of column.codes) if (code >= 0) counts[code]++;
  const groups = new Map<string, number[]>();
  column.levels.forEach((level, code) => {
    const plain = plainLevel(level);
    const group = groups.get(plain);
    if (group) group.push(code);
    else groups.set(plain, [code]);
  });
  return [...groups.values()]
    .filter((codes) => codes.length > 1)
    .map((codes) =>
      levelsAlike(
        column,
        codes.toSorted((a, b) => counts[b] - counts[a]),
      ),
    );
}

/** Ways of writing one level that are told. */
const toldWays = 10;

function levelsAlike({ name, codes, levels }: CategoryRecordColumn, alike: readonly number[]): Finding {
  const [usual, ...others] = alike.map((code) => levels[code]);
  const unusual = new Set(alike.slice(1));
  const rows: number[] = [];
  codes.forEach((code, row) => {
    if (unusual.has(code)) rows.push(row);
  });
  const ways = alike.slice(0, toldWays).map((code) => `“${levels[code]}”`);
  const more = alike.length > toldWays ? ' and others' : '';
  return {
    kind: 'levels-alike',
    columns: [name],
    message: `${name} writes one level in ${alike.length} ways: ${ways.join(', ')}${more}.`,
    remedy: `Map them to “${usual}”, the most frequent.`,
    ...listRows(rows),
    where: oneOfTexts(name, others),
    steps: [{ kind: 'map-levels', column: name, levels: Object.fromEntries(others.map((level) => [level, usual])) }],
  };
}

/** Share of numbers from which words in a column look like slips. */
const nearlyShare = 0.8;

interface Words {
  readonly rows: readonly number[];
  /** Different words, in the order in which they come up; no more than are needed. */
  readonly texts: readonly string[];
}

/** Cells that are not numbers; null as soon as there are too many for slips. */
function wordsAmongNumbers(column: CategoryRecordColumn | TextRecordColumn): Words | null {
  const reader = new NumberReader();
  const isNumber = (text: string): boolean => reader.read(text) !== NumberClass.none;
  const levelIsNumber = column.kind === 'category' ? column.levels.map(isNumber) : [];
  const length = column.kind === 'category' ? column.codes.length : column.values.length;
  const rows: number[] = [];
  const texts = new Set<string>();
  let present = 0;
  for (let row = 0; row < length; row++) {
    const code = column.kind === 'category' ? column.codes[row] : 0;
    const text = column.kind === 'category' ? column.levels[code] : column.values[row];
    if (code < 0 || text === null) continue;
    present++;
    if (column.kind === 'category' ? levelIsNumber[code] : isNumber(text)) continue;
    rows.push(row);
    if (texts.size < 100) texts.add(text);
    if (rows.length > (1 - nearlyShare) * length) return null;
  }
  return rows.length === 0 || rows.length > (1 - nearlyShare) * present ? null : { rows, texts: [...texts] };
}

/** A column of numbers that a few words have turned into words. Cost: one pass. */
export function findNearlyNumeric(column: CategoryRecordColumn | TextRecordColumn): Finding[] {
  const words = wordsAmongNumbers(column);
  if (!words) return [];
  const { name } = column;
  const examples = words.texts.slice(0, 3).map((text) => `“${text.slice(0, 30)}”`);
  // Where the decimal mark is a comma, more than the words would be lost.
  const losesWordsOnly = changeKind(column, 'numeric').unreadable <= words.rows.length;
  return [
    {
      kind: 'nearly-numeric',
      columns: [name],
      message: `${name} holds numbers but for ${rowsText(words.rows.length)}, such as ${examples.join(', ')}.`,
      remedy: 'Make the column’s kind Number, by which these cells become missing, or write them as numbers first.',
      ...listRows(words.rows),
      where: words.texts.length < 100 ? oneOfTexts(name, words.texts) : undefined,
      steps: losesWordsOnly ? [{ kind: 'set-kind', column: name, to: 'numeric' }] : [],
    },
  ];
}
