import { maximumColumns, maximumNameLength } from './limits';
import { NumberClass, NumberReader } from './number-cell';
import { TableProblem } from './table-problem';

const quoted = (name: string): string => `“${name.slice(0, 60)}”`;

/** The columns' names, trimmed and otherwise exactly as in the file. */
export function readHeader(cells: readonly string[], line: number): readonly string[] {
  const names = cells.map((cell) => cell.trim());
  const problem = (detail: string): TableProblem => new TableProblem('file-header', detail, line);
  if (names.length > maximumColumns) {
    throw problem(
      `Line ${line} names ${names.length} columns; ${maximumColumns} is the most. Remove the columns that you do not need.`,
    );
  }
  const empty = names.flatMap((name, position) => (name === '' ? [position + 1] : []));
  if (empty.length > 0) {
    const which = `${empty.length === 1 ? 'Column' : 'Columns'} ${empty.slice(0, 10).join(', ')}`;
    throw problem(
      `${which} of the header on line ${line} ${empty.length === 1 ? 'has' : 'have'} no name. Give every column a name.`,
    );
  }
  const equal = [...new Set(names.filter((name, position) => names.indexOf(name) !== position))];
  if (equal.length > 0) {
    throw problem(
      `The header on line ${line} names ${equal.slice(0, 10).map(quoted).join(', ')} more than once. Give every column its own name.`,
    );
  }
  const long = names.find((name) => name.length > maximumNameLength);
  if (long)
    throw problem(
      `The name ${quoted(long)}… on line ${line} is longer than ${maximumNameLength} characters. Shorten it.`,
    );
  const numbers = new NumberReader();
  if (names.every((name) => numbers.read(name) !== NumberClass.none)) {
    throw problem(`Line ${line} holds numbers where the columns’ names should be. Add a line of names above it.`);
  }
  return names;
}

const unitPattern = /[([]([^()[\]]{1,20})[)\]]\s*$/;

/** The unit of a header such as `length (m)` or `Displacement [t]`; null when the brackets hold something else. */
export function unitOf(name: string): string | null {
  const unit = unitPattern.exec(name)?.[1].trim();
  if (!unit || /^\d/.test(unit) || !/^[\p{L}%°‰€£$µμΩ²³·/^*\d .-]+$/u.test(unit)) return null;
  return /\s/.test(unit) && unit.split(/\s+/).length > 2 ? null : unit;
}
