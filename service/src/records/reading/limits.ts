/** Columns of a table. */
export const maximumColumns = 2000;
/** Characters of a cell: what a spreadsheet can hold. */
export const maximumCellLength = 32_767;
/** Bytes of a row: an unclosed quote would otherwise swallow the rest of the file. */
export const maximumRowBytes = 4 * 1024 * 1024;
/** Characters of a column's name. */
export const maximumNameLength = 255;
/** Levels of a category; with more a column is text. */
export const maximumLevels = 10_000;
/** Characters of a level; with a longer one a column is text. */
export const maximumLevelLength = 200;
/** Above this many different values a column's distinct count is not given. */
export const maximumDistinct = 1_000_000;
/** Rows that a first guess of every column's kind rests on. */
export const guessRows = 5000;
/** Bytes from which the encoding and the delimiter are detected. */
export const sampleBytes = 256 * 1024;
