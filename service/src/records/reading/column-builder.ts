import { cellsToCodes } from '../cell-blocks';
import {
  CodeStore,
  DateStore,
  decodeWords,
  NumberStore,
  TextStore,
  type BatchPlace,
  type CellStore,
  type TextRows,
} from './cell-stores';
import { ColumnEvidence, likelyFormOf, newCellReaders, type CellForm } from './column-evidence';
import type { DecimalMark } from './number-cell';
import type { SpilledCells, SpillFile } from './spill-file';

/** How a block lies in the spill file; `missing` takes no place. */
export type BlockLayout = 'numbers' | 'codes' | 'texts' | 'missing';

export interface BuiltBlock {
  readonly layout: BlockLayout;
  readonly place: SpilledCells;
  readonly rowCount: number;
}

export interface ColumnBuilderOptions {
  readonly name: string;
  readonly position: number;
  readonly blockRows: number;
  readonly spill: SpillFile;
}

const nowhere: SpilledCells = { offset: 0, length: 0 };

/**
 * Keeps one column's cells in the form guessed from its first rows, block by block in the spill file, and gathers
 * the evidence that shows at the end whether the guess was right.
 */
export class ColumnBuilder {
  readonly evidence = new ColumnEvidence();
  readonly blocks: BuiltBlock[] = [];
  private readonly readers = newCellReaders();
  private store: CellStore | null = null;
  private kept: CellForm = { kind: 'nothing' };
  private codes: CodeStore | null = null;

  constructor(readonly options: ColumnBuilderOptions) {}

  get form(): CellForm {
    return this.kept;
  }

  /** The dictionary of word columns. */
  get levels(): readonly string[] {
    return this.codes?.levels ?? [];
  }

  gatherEvidence(rows: TextRows): void {
    for (const row of rows) this.evidence.addText(row[this.options.position], this.readers);
  }

  keepAs(form: CellForm): void {
    const { name, blockRows } = this.options;
    this.kept = form;
    if (form.kind === 'numeric') this.store = new NumberStore(form.mark, this.evidence, this.readers, blockRows);
    else if (form.kind === 'date') this.store = new DateStore(form.form, this.evidence, this.readers, blockRows);
    else if (form.kind === 'words') this.store = this.codes = new CodeStore(name, blockRows);
  }

  add(rows: TextRows, start: number, fileMark: DecimalMark): void {
    if (!this.store) {
      // Nothing but missing cells so far: the first other one shows what to keep.
      this.gatherEvidence(rows);
      if (this.evidence.isEmpty) return;
      this.keepAs(likelyFormOf(this.evidence, fileMark));
    }
    const place: BatchPlace = { position: this.options.position, start };
    this.store?.add(rows, place);
    if (this.codes?.isFull && this.store === this.codes) this.continueAsText(start + rows.length);
  }

  endBlock(rowCount: number): void {
    const layout = this.layout;
    const place = this.store ? this.options.spill.append(this.store.takeBlock(rowCount)) : nowhere;
    this.blocks.push({ layout, place, rowCount });
  }

  private get layout(): BlockLayout {
    if (!this.store) return 'missing';
    if (this.store instanceof TextStore) return 'texts';
    return this.store instanceof CodeStore ? 'codes' : 'numbers';
  }

  private continueAsText(rowCount: number): void {
    const codes = cellsToCodes(this.codes?.takeBlock(rowCount) ?? new Uint8Array());
    this.store = new TextStore(this.options.name, decodeWords(codes, this.levels));
  }
}
