import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { cellsToCodes, cellsToNumbers, cellsToTexts } from '../../service/src/records/cell-blocks';
import { dateText } from '../../service/src/records/reading/date-cell';
import { proposeReading } from '../../service/src/records/reading/propose-reading';
import { readTable, type ReadOptions } from '../../service/src/records/reading/read-table';
import type { BaseColumn, ReadingChoices } from '../../service/src/records/reading/reading-choices';
import { SpillFile } from '../../service/src/records/reading/spill-file';

export type Cell = number | string | null;
type Content = string | Uint8Array;

/** Reads tables that a test makes up, in a folder of their own. */
export class TableReadings {
  private readonly folder = mkdtempSync(join(tmpdir(), 'tarebeam-reading-'));
  private files = 0;

  close(): void {
    rmSync(this.folder, { recursive: true });
  }

  private write(content: Content): string {
    const path = join(this.folder, `${++this.files}.csv`);
    writeFileSync(path, content);
    return path;
  }

  /** The reading, and the cells of every column as they would be shown. */
  async read(content: Content, choices: ReadingChoices = {}, options: Omit<ReadOptions, 'choices'> = {}) {
    const path = this.write(content);
    const spill = new SpillFile(`${path}.spill`, 'wx+');
    try {
      const reading = await readTable(path, spill, { ...options, choices });
      const cells = reading.columns.map((column): Cell[] => {
        const blocks = column.blocks.map((place) => spill.read(place));
        if (column.kind === 'text') return blocks.flatMap(cellsToTexts);
        if (column.kind === 'category')
          return blocks.flatMap((block) =>
            Array.from(cellsToCodes(block), (code) => (code < 0 ? null : column.levels[code].value)),
          );
        const shown = column.kind === 'date' ? dateText : (value: number): number => value;
        return blocks.flatMap((block) =>
          Array.from(cellsToNumbers(block), (value) => (Number.isNaN(value) ? null : shown(value))),
        );
      });
      return { ...reading, kinds: reading.columns.map((column) => column.kind), cells };
    } finally {
      spill.close();
    }
  }

  propose(content: Content, choices: ReadingChoices = {}, base?: readonly BaseColumn[]) {
    return proposeReading(this.write(content), choices, base);
  }
}
