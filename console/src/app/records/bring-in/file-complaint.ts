/** What can be seen to be wrong with a file before it is sent; the service looks inside. */
export function fileComplaint(file: File | undefined): string | undefined {
  if (file === undefined) return 'Choose the file that holds the records';
  if (file.size === 0) return 'This file is empty: choose the one that holds the records';
  if (/\.(xlsx?|ods|numbers)$/i.test(file.name)) return 'This is a spreadsheet: save it as CSV, then choose that file';
  return undefined;
}

/** A file's name without its ending, as a first suggestion for the record set's name. */
export function nameFromFile(file: File): string {
  return file.name
    .replace(/\.[^.]*$/, '')
    .replace(/[_-]+/g, ' ')
    .trim();
}
