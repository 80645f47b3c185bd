/** What can be seen to be wrong with a file before it is sent; the service looks inside. */
export function fileComplaint(file: File | undefined): string | undefined {
  if (file === undefined) return 'Choose the file that holds the records';
  if (file.size === 0) return 'This file is empty: choose the one that holds the records';
  if (/\.(xls|xlsb|xlsm|ods|numbers)$/i.test(file.name))
    return 'The desk cannot read this kind of spreadsheet: save it as .xlsx or as CSV, then choose that file';
  return undefined;
}

/** A file's name without its ending, as a first suggestion for the record set's name. */
export function nameFromFile(fileName: string): string {
  return fileName
    .replace(/\.gz$/i, '')
    .replace(/\.[^.]*$/, '')
    .replace(/[_-]+/g, ' ')
    .trim();
}
