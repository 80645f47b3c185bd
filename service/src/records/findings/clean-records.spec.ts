import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { RecordColumn, RecordTable } from '../../regression/records';
import { findProblems } from './find-problems';

const folder = join(__dirname, '..', '..', '..', '..', 'test', 'fixtures', 'clean-records');

/** Files without quotation marks, written by R 4.2.2. */
function readTable(name: string): RecordTable {
  const [head, ...lines] = readFileSync(join(folder, name), 'utf8').trim().split('\n');
  const rows = lines.map((line) => line.split(','));
  const columns = head.split(',').map((columnName, at): RecordColumn => {
    const cells = rows.map((row) => row[at]);
    const values = Float64Array.from(cells, (cell) => (cell === 'NA' ? NaN : Number(cell)));
    if (cells.every((cell, row) => cell === 'NA' || !Number.isNaN(values[row])))
      return { name: columnName, kind: 'numeric', values };
    const levels = [...new Set(cells)];
    return {
      name: columnName,
      kind: 'category',
      levels,
      codes: Int32Array.from(cells, (cell) => levels.indexOf(cell)),
    };
  });
  return { rowCount: rows.length, columns };
}

describe('records that others have published and used for long', () => {
  // R's datasets::quakes: 1,000 seismic events near Fiji since 1964 (Harvard PRIM-H project).
  // R's datasets::airquality: New York, May to September 1973 (Chambers et al. 1983, Graphical Methods, appendix).
  it.each(['quakes.csv', 'airquality.csv'])('give no cause for alarm: %s', (name) => {
    expect(findProblems(readTable(name))).toEqual([]);
  });

  // R's datasets::iris (Anderson 1935, Fisher 1936); R's which(duplicated(iris)) gives 143.
  it('have the repeated row that is known in them, and nothing else: iris.csv', () => {
    expect(findProblems(readTable('iris.csv'))).toMatchObject([{ kind: 'repeated-rows', rowCount: 1, rows: [143] }]);
  });
});
