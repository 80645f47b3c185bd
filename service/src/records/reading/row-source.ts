import { stat } from 'node:fs/promises';
import { readSample } from './file-bytes';
import { detectFormat, type FileFormat } from './file-format';
import { sampleBytes } from './limits';
import { parseRows } from './parse-rows';
import type { ReadingChoices, ReadingProgress } from './reading-choices';
import { TableProblem } from './table-problem';
import { openWorkbook } from './workbook/workbook-source';
import { isWorkbook, refuseProtected } from './workbook/workbook-file';

export type OnRow = (cells: readonly string[]) => void;
export type OnProgress = (progress: ReadingProgress) => void;

/** A file opened for reading: rows of text, the header first. Can be read more than once. */
export interface RowSource {
  readonly format: FileFormat;
  /** Of a workbook: its sheets, and the one that is read. */
  readonly sheets: readonly string[];
  readonly sheet: string | null;
  read(onRow: OnRow, onProgress?: OnProgress): Promise<void>;
}

async function openText(path: string, choices: ReadingChoices): Promise<RowSource> {
  const { sample, complete } = await readSample(path, sampleBytes);
  const format = detectFormat(sample, complete, choices);
  const { size: total } = await stat(path);
  return {
    format,
    sheets: [],
    sheet: null,
    read: (onRow, onProgress) =>
      parseRows(path, format, onRow, onProgress && ((done) => onProgress({ stage: 'reading', done, total }))),
  };
}

/** Finds out what a file is and how it is written, as far as that was not chosen. */
export async function openRowSource(path: string, choices: ReadingChoices): Promise<RowSource> {
  if (await isWorkbook(path)) return openWorkbook(path, choices);
  await refuseProtected(path);
  if (choices.sheet !== undefined)
    throw new TableProblem('file-sheet', 'The file is text and has no sheets. Choose none.');
  return openText(path, choices);
}

/** A header line was chosen that the file does not reach. */
export const headerBeyondFile = (line: number): TableProblem =>
  new TableProblem('choices-invalid', `The file ends before line ${line}. Choose a header line that it has.`);
