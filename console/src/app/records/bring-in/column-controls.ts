import { Component, ElementRef, computed, input, linkedSignal, viewChild } from '@angular/core';
import type { ColumnKind } from '../../api/contract';
import { CountPipe } from '../../ui/figure-pipes';
import { KIND_WORDS } from '../revision/column-words';
import type { ColumnRow } from './column-row';
import { marksComplaint, marksOf } from './missing-marks';
import { ProposedReading } from './proposed-reading';
import type { ColumnChange } from './reading-choices';
import { DATE_ORDERS } from './reading-words';

const LONGEST_UNIT = 40;
const KINDS: readonly ColumnKind[] = ['numeric', 'category', 'date', 'text'];

let rowCount = 0;

/** One column's line in the table: its choices, and what was seen in its cells. */
@Component({
  selector: 'tr[tbColumnControls]',
  imports: [CountPipe],
  templateUrl: './column-controls.html',
  styleUrl: './column-controls.scss',
  host: { '[class.aside]': 'row().setAside' },
})
export class ColumnControls {
  private readonly marksInput = viewChild.required<ElementRef<HTMLInputElement>>('marksInput');

  readonly row = input.required<ColumnRow>();
  readonly reading = input.required<ProposedReading>();
  readonly appendedTo = input<number>();

  protected readonly id = `tb-column-${++rowCount}`;
  protected readonly kinds = KINDS;
  protected readonly kindWords = KIND_WORDS;
  protected readonly dateOrders = DATE_ORDERS;
  /** A complaint about the marks as they were typed, which were therefore not asked about. */
  private readonly typedComplaint = linkedSignal<string, string | undefined>({
    source: () => this.row().marks,
    computation: () => undefined,
  });
  protected readonly complaints = computed<readonly string[]>(() => {
    const all = [this.typedComplaint(), ...Object.values(this.row().complaints)];
    return all.filter((complaint) => complaint !== undefined);
  });

  protected complained(field: keyof ColumnChange): true | null {
    const typed = field === 'missingMarks' ? this.typedComplaint() : undefined;
    return (typed ?? this.row().complaints[field]) === undefined ? null : true;
  }

  protected change(change: ColumnChange): void {
    this.reading().changeColumn(this.row().name, change);
  }

  protected chooseKind(value: string): void {
    this.change({ kind: KINDS.find((kind) => kind === value) });
  }

  protected chooseDateOrder(value: string): void {
    this.change({ dateOrder: DATE_ORDERS.find((order) => order.value === value)?.value });
  }

  protected typeUnit(text: string): void {
    this.change({ unit: text.trim().slice(0, LONGEST_UNIT) || null });
  }

  protected typeMarks(text: string): void {
    const missingMarks = [...marksOf(text)];
    const complaint = marksComplaint(missingMarks);
    this.typedComplaint.set(complaint);
    if (complaint === undefined) this.change({ missingMarks });
  }

  protected takeAsMissing(mark: string): void {
    this.change({ missingMarks: [...marksOf(this.row().marks), mark] });
    this.keepFocus();
  }

  protected asFound(): void {
    this.reading().resetColumn(this.row().name);
    this.keepFocus();
  }

  /** The button that was pressed goes away with what it did. */
  private keepFocus(): void {
    this.marksInput().nativeElement.focus();
  }
}
