import type { Finding } from '../../api/contract';
import { formatCount } from '../../ui/figure';

export const FINDING_WORDS: Readonly<Record<Finding['kind'], string>> = {
  'unit-mix-up': 'Units mixed up',
  'repeated-rows': 'Repeated rows',
  'nearly-repeated-rows': 'Nearly repeated rows',
  'constant-column': 'Column with one value',
  'levels-alike': 'Levels spelt alike',
  'nearly-numeric': 'Words among numbers',
  'outlying-values': 'Outlying values',
  'columns-alike': 'Columns alike',
  'column-combination': 'Column made of others',
  'leakage-suspect': 'Perhaps known too late',
  'time-gap': 'Gap in time',
};

/** Row numbers that stand before the rest is asked for. */
const ROWS_SHOWN = 10;

/** How many listed rows wait behind the button; 0 when all of them are shown. */
export function rowsHidden({ rows }: Finding): number {
  return Math.max(0, rows.length - ROWS_SHOWN);
}

/** Row numbers carry no thousands mark: they are names of rows, and commas part them. */
export function rowsOf({ rows }: Finding, all: boolean): string {
  return (all ? rows : rows.slice(0, ROWS_SHOWN)).join(', ');
}

/** The service lists no more than the first rows of a finding: says so where there are others. */
export function listedOf({ rowCount, rows }: Finding): string {
  if (rowCount === null || rowCount <= rows.length) return '';
  return `The first ${formatCount(rows.length)} of ${formatCount(rowCount)}:`;
}

/** Query of the rows behind a finding: by their condition where there is one, else by the numbers that are listed. */
export function rowsAddressOf({ where, rows }: Finding): {
  readonly where: string | null;
  readonly numbers: string | null;
} {
  return where === null ? { where, numbers: rows.join(',') } : { where, numbers: null };
}
