import { Component, ElementRef, afterNextRender, computed, inject, input, output, signal } from '@angular/core';
import type { ColumnKind, MendStep, RecordRevision } from '../../api/contract';
import { EntryForm } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import { ProblemNotice } from '../../ui/problem-notice';
import { KIND_WORDS } from '../revision/column-words';
import { ColumnChoiceField } from './column-choice-field';
import { ConversionFields } from './conversion-fields';
import { FormulaField } from './formula-field';
import { LevelChoice } from './level-choice';
import { levelsAt } from './levels-at';
import { readStep, type StepField } from './read-step';
import { RowChoice } from './row-choice';
import { draftOf, emptyDraft, withColumn, type StepDraft } from './step-draft';
import { DATE_ORDERS, STEP_CHOICES, type StepKind } from './step-words';
import type { Steps } from './steps-history';
import { Trials, type Outlook } from './trials';

/** Levels of a column that the service lists. */
const LEVELS_LISTED = 50;

const KINDS: readonly ColumnKind[] = ['numeric', 'category', 'date', 'text'];

const FORMULA_FIELD: Readonly<Partial<Record<StepKind, StepField>>> = {
  'convert-unit': 'where',
  'set-missing': 'where',
  'drop-rows': 'where',
  derive: 'formula',
};

/** The fields of one step, on the columns as they stand before it. A step is tried out before it counts. */
@Component({
  selector: 'tb-step-fields',
  imports: [
    ColumnChoiceField,
    ConversionFields,
    Field,
    FieldInput,
    FormulaField,
    LevelChoice,
    ProblemNotice,
    RowChoice,
  ],
  templateUrl: './step-fields.html',
  styles: `
    .explanation,
    .refusal {
      margin: 0;
    }

    .refusal {
      color: var(--tb-madder);
      font: var(--tb-type-small-strong);
    }
  `,
})
export class StepFields {
  private readonly trials = inject(Trials);

  readonly revision = input.required<RecordRevision>();
  readonly kind = input.required<StepKind>();
  /** The steps before it. */
  readonly before = input.required<Steps>();
  /** What they come to. */
  readonly outlook = input.required<Outlook>();
  /** The step to change; without one it is a new step. */
  readonly step = input<MendStep>();
  readonly done = output<MendStep>();
  readonly left = output();

  protected readonly form = new EntryForm<StepField>();
  private readonly changes = signal<StepDraft | undefined>(undefined);
  protected readonly draft = computed<StepDraft>(() => {
    const step = this.step();
    return this.changes() ?? (step ? draftOf(step, this.columns()) : emptyDraft(this.kind()));
  });
  protected readonly columns = computed(() => this.outlook().columns);
  protected readonly names = computed(() => this.columns().map(({ name }) => name));
  protected readonly column = computed(() => this.columns().find(({ name }) => name === this.draft().column));
  protected readonly levels = computed(() => levelsAt(this.revision().columns, this.before(), this.draft().column));
  protected readonly moreLevels = computed(() => (this.levels()?.length ?? 0) >= LEVELS_LISTED);
  protected readonly complaints = computed(() => ({
    where: this.form.errorOf('where'),
    rows: this.form.errorOf('rows'),
    choice: this.form.errorOf('choice'),
    levels: this.form.errorOf('levels'),
    target: this.form.errorOf('target'),
    factor: this.form.errorOf('factor'),
    unit: this.form.errorOf('unit'),
  }));
  /** Why the step cannot be done, where no field is to blame. */
  protected readonly refusal = signal<string | undefined>(undefined);
  protected readonly explanation = computed(
    () => STEP_CHOICES.find(({ kind }) => kind === this.kind())?.explanation ?? '',
  );
  protected readonly kinds = KINDS.map((value) => ({ value, name: KIND_WORDS[value] }));
  protected readonly dateOrders = DATE_ORDERS;

  constructor() {
    // A new step has the focus on what to do already.
    const element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    const first = (): HTMLElement | null => element.querySelector<HTMLElement>('select, input, textarea');
    afterNextRender({ read: () => this.step() && first()?.focus() });
  }

  protected change(change: Partial<StepDraft>): void {
    this.changes.set({ ...this.draft(), ...change });
  }

  protected chooseColumn(column: string): void {
    this.changes.set(withColumn(this.draft(), column, this.columns()));
  }

  protected changeKind(value: string): void {
    const toKind = KINDS.find((kind) => kind === value);
    if (toKind) this.change({ toKind });
  }

  protected changeDateOrder(chosen: string): void {
    const order = DATE_ORDERS.find(({ value }) => value === chosen);
    if (order) this.change({ dateOrder: order.value });
  }

  protected submit(event: Event): void {
    event.preventDefault();
    this.refusal.set(undefined);
    const reading = readStep(this.draft(), this.columns());
    if ('complaints' in reading) return void this.form.accept(reading.complaints);
    this.form.accept({});
    this.form.send(this.trials.outlookOf(this.revision(), [...this.before(), reading.step]), (outlook) =>
      this.take(reading.step, outlook),
    );
  }

  /** A step that waits for an earlier one to be mended cannot be tried yet, so it is taken as it is. */
  private take(step: MendStep, { refused }: Outlook): void {
    if (refused?.index !== this.before().length) return this.done.emit(step);
    const field = FORMULA_FIELD[step.kind];
    if (field !== undefined && /\(at character \d+\)/.test(refused.reason))
      this.form.accept({ [field]: refused.reason });
    else this.refusal.set(refused.reason);
  }
}
