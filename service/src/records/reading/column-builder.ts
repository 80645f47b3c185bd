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
import { columnUnitOf, likelyFormOf, type CellForm } from './cell-form';
import { ColumnEvidence, newCellReaders, type CellReaders } from './column-evidence';
import type { ColumnPlan } from './column-plan';
import { MixedNumberStore, needsMixedStore } from './mixed-number-store';
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
  readonly plan: ColumnPlan;
  readonly blockRows: number;
  readonly spill: SpillFile;
}

const nowhere: SpilledCells = { offset: 0, length: 0 };

/** A store for cells of this form; null while nothing but missing cells came. */
export function newCellStore(
  form: CellForm,
  evidence: ColumnEvidence,
  readers: CellReaders,
  blockRows: number,
): CellStore | null {
  const { name, marks } = evidence.plan;
  if (form.kind === 'nothing') return null;
  if (form.kind === 'words') return new CodeStore(name, marks, blockRows);
  if (form.kind === 'date') return new DateStore(form.forms, evidence, readers, blockRows);
  return needsMixedStore(form, evidence.plan)
    ? new MixedNumberStore(form, evidence, readers, blockRows)
    : new NumberStore(form.mark, evidence, readers, blockRows);
}

/**
 * Keeps one column's cells in the form guessed from its first rows, block by block in the spill file, and gathers
 * the evidence that shows at the end whether the guess was right.
 */
export class ColumnBuilder {
  readonly evidence: ColumnEvidence;
  readonly blocks: BuiltBlock[] = [];
  private readonly readers = newCellReaders();
  private store: CellStore | null = null;
  private kept: CellForm = { kind: 'nothing' };
  private codes: CodeStore | null = null;

  constructor(readonly options: ColumnBuilderOptions) {
    this.evidence = new ColumnEvidence(options.plan);
  }

  get form(): CellForm {
    return this.kept;
  }

  /** The dictionary of word columns. */
  get levels(): readonly string[] {
    return this.codes?.levels ?? [];
  }

  get unreadableCount(): number {
    return this.store?.unreadableCount ?? 0;
  }

  get unit(): string | null {
    return columnUnitOf(this.options.plan, this.kept);
  }

  gatherEvidence(rows: TextRows): void {
    for (const row of rows) this.evidence.addText(row[this.options.position], this.readers);
  }

  /** The rows that the form rests on are added again afterwards, so their units are not counted twice. */
  keepAs(form: CellForm): void {
    this.kept = form;
    this.evidence.units.clear();
    this.store = newCellStore(form, this.evidence, this.readers, this.options.blockRows);
    if (this.store instanceof CodeStore) this.codes = this.store;
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
    const place = this.store ? this.spillBlock(this.store.takeBlock(rowCount), layout, rowCount) : nowhere;
    this.blocks.push({ layout, place, rowCount });
  }

  private spillBlock(cells: Uint8Array, layout: BlockLayout, rowCount: number): SpilledCells {
    const { spill, position } = this.options;
    if (layout !== 'numbers') return spill.append(cells);
    return spill.appendBlock(cells, { position, block: this.blocks.length, rowCount });
  }

  private get layout(): BlockLayout {
    if (!this.store) return 'missing';
    if (this.store instanceof TextStore) return 'texts';
    return this.store instanceof CodeStore ? 'codes' : 'numbers';
  }

  private continueAsText(rowCount: number): void {
    const codes = cellsToCodes(this.codes?.takeBlock(rowCount) ?? new Uint8Array());
    this.store = new TextStore(this.options.name, this.options.plan.marks, decodeWords(codes, this.levels));
  }
}
