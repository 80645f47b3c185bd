import { Component, computed, input, output } from '@angular/core';
import type { RecordTask } from '../../api/contract';
import { formatCount } from '../../ui/figure';

type Progress = RecordTask['progress'];

const STAGES: Readonly<Record<Progress['stage'], string>> = {
  waiting: 'Waiting for other work on records to end',
  reading: 'Reading the records',
  mending: 'Carrying out the steps',
  measuring: 'Measuring the columns',
  storing: 'Storing the new revision',
};

const COUNTED: Readonly<Partial<Record<Progress['stage'], string>>> = { mending: 'steps', measuring: 'columns' };

/** How far the making of a revision is, with a way to stop it. */
@Component({
  selector: 'tb-mending-progress',
  template: `
    <div class="tb-panel tb-panel-body">
      <p class="tb-figures">{{ stage() }}{{ count() && ', ' + count() }}</p>
      <p class="tb-only-read" role="status">{{ stage() }}</p>
      <progress [attr.aria-label]="stage()" [attr.max]="max()" [attr.value]="value()"></progress>
      <button type="button" class="tb-plain-button" [disabled]="cancelling()" (click)="cancelled.emit()">
        {{ cancelling() ? 'Cancelling…' : 'Cancel the mending' }}
      </button>
    </div>
  `,
  styleUrl: './mending-progress.scss',
})
export class MendingProgress {
  readonly progress = input.required<Progress | undefined>();
  readonly cancelling = input(false);
  readonly cancelled = output();

  protected readonly stage = computed(() => {
    const progress = this.progress();
    return progress ? STAGES[progress.stage] : 'Beginning';
  });
  protected readonly count = computed(() => {
    const progress = this.progress();
    if (!progress) return '';
    const { stage, done, total } = progress;
    const noun = COUNTED[stage];
    return noun && total > 0 ? `${formatCount(done)} of ${formatCount(total)} ${noun}` : '';
  });
  /** Without a total the bar only shows that something goes on. */
  protected readonly max = computed(() => this.progress()?.total || null);
  protected readonly value = computed(() => (this.max() === null ? null : this.progress()?.done));
}
