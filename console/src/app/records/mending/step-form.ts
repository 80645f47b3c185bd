import { Component, inject, input, linkedSignal, output } from '@angular/core';
import type { MendStep, RecordRevision } from '../../api/contract';
import { Field, FieldInput } from '../../ui/field';
import { FocusHere } from '../../ui/focus-here';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { ProblemNotice } from '../../ui/problem-notice';
import { StepFields } from './step-fields';
import { STEP_CHOICES, type StepKind } from './step-words';
import type { Steps } from './steps-history';
import { Trials } from './trials';

/** A new step, or one to change: what to do, then its fields. */
@Component({
  selector: 'tb-step-form',
  imports: [Field, FieldInput, FocusHere, LoadingState, ProblemNotice, StepFields],
  template: `
    @if (!step()) {
      <tb-field class="what" label="What to do">
        <select tbInput #chooser tbFocusHere (change)="choose(chooser.value)">
          <option value="" [selected]="kind() === undefined">Choose</option>
          @for (choice of choices; track choice.kind) {
            <option [value]="choice.kind" [selected]="choice.kind === kind()">{{ choice.name }}</option>
          }
        </select>
      </tb-field>
    }
    @if (kind(); as chosen) {
      @switch (outlook.state()) {
        @case ('loading') {
          <tb-loading-state label="Reading the columns at this point" />
        }
        @case ('error') {
          <tb-problem-notice [problem]="outlook.problem()!" (retry)="outlook.reload()" />
        }
        @case ('ready') {
          @for (each of [chosen]; track each) {
            <tb-step-fields
              [revision]="revision()"
              [kind]="each"
              [before]="before()"
              [outlook]="outlook.value()!"
              [step]="step()"
              (done)="done.emit($event)"
              (left)="left.emit()"
            />
          }
        }
      }
    } @else {
      <button type="button" class="tb-quiet-button" (click)="left.emit()">Cancel</button>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--tb-space-4);
    }

    .what {
      max-width: 32rem;
    }

    button {
      justify-self: start;
    }
  `,
})
export class StepForm {
  private readonly trials = inject(Trials);

  readonly revision = input.required<RecordRevision>();
  /** The steps before it. */
  readonly before = input.required<Steps>();
  readonly step = input<MendStep>();
  readonly done = output<MendStep>();
  readonly left = output();

  protected readonly kind = linkedSignal<StepKind | undefined>(() => this.step()?.kind);
  protected readonly outlook = load(() => this.trials.outlookOf(this.revision(), this.before()));
  protected readonly choices = STEP_CHOICES;

  protected choose(value: string): void {
    this.kind.set(STEP_CHOICES.find(({ kind }) => kind === value)?.kind);
  }
}
