import { Component, computed, input, output } from '@angular/core';
import type { RecordTask } from '../../api/contract';
import { STAGE_WORDS, countWords } from './task-words';

/** How far work on records is, with a way to stop it. */
@Component({
  selector: 'tb-task-progress',
  template: `
    <div class="tb-panel tb-panel-body">
      @if (heading(); as heading) {
        <p class="heading">{{ heading }}</p>
      }
      <progress [attr.aria-label]="stage()" [attr.max]="total()" [attr.value]="done()"></progress>
      <p class="words tb-figures">{{ stage() }}{{ counted() ? ', ' + counted() : '' }}</p>
      <p class="tb-only-read" role="status">{{ stage() }}</p>
      <button type="button" class="tb-plain-button" [disabled]="cancelling()" (click)="cancelled.emit()">
        {{ cancelling() ? 'Cancelling…' : cancelLabel() }}
      </button>
    </div>
  `,
  styleUrl: './task-progress.scss',
})
export class TaskProgress {
  /** What is worked on, where the screen does not say it. */
  readonly heading = input<string>();
  readonly cancelLabel = input('Cancel');
  /** Undefined until the first answer. */
  readonly task = input<RecordTask>();
  readonly cancelling = input(false);
  readonly cancelled = output();

  private readonly progress = computed(() => this.task()?.progress ?? { stage: 'waiting' as const, done: 0, total: 0 });
  protected readonly stage = computed(() =>
    this.task() ? STAGE_WORDS[this.progress().stage] : 'Asking how far it is',
  );
  protected readonly counted = computed(() => countWords(this.progress()));
  /** Without a count the bar only shows that something goes on. */
  protected readonly total = computed(() => this.progress().total || null);
  protected readonly done = computed(() => (this.progress().total ? this.progress().done : null));
}
