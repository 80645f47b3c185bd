import { Component, computed, input, output } from '@angular/core';
import { CountPipe } from '../../ui/figure-pipes';
import type { Beginning } from './mending-opening';
import { wordsOfStep } from './step-words';

type Question = Extract<Beginning, { with: 'question' }>;

/** Asks which of two lists of steps to go on with, and shows both. */
@Component({
  selector: 'tb-from-question',
  imports: [CountPipe],
  template: `
    <p>
      You have steps waiting for this revision already, and you asked for those that made revision
      {{ question().other.number }}. Taking these puts them in the place of yours.
    </p>
    <div class="lists">
      <section aria-labelledby="tb-own-steps">
        <h2 id="tb-own-steps">Your {{ question().draft.length | count: 'step' }}</h2>
        <ol>
          @for (words of draftWords(); track $index) {
            <li>{{ words }}</li>
          }
        </ol>
        <button type="button" class="tb-plain-button" (click)="draftKept.emit()">Go on with yours</button>
      </section>
      <section aria-labelledby="tb-other-steps">
        <h2 id="tb-other-steps">
          The {{ question().other.steps.length | count: 'step' }} of revision {{ question().other.number }}
        </h2>
        <ol>
          @for (words of otherWords(); track $index) {
            <li>{{ words }}</li>
          }
        </ol>
        @if (question().other.caution; as caution) {
          <p>{{ caution }}</p>
        }
        <button type="button" class="tb-plain-button" (click)="otherTaken.emit()">Take these instead</button>
      </section>
    </div>
  `,
  styles: `
    .lists {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(min(20rem, 100%), 1fr));
      gap: var(--tb-space-5) var(--tb-space-6);
    }

    h2 {
      padding-bottom: var(--tb-space-2);
      border-bottom: 1px solid var(--tb-ink);
      font: var(--tb-type-section);
    }

    ol {
      margin: var(--tb-space-3) 0 var(--tb-space-4);
      padding-left: var(--tb-space-5);
      overflow-wrap: anywhere;
    }

    li + li {
      margin-top: var(--tb-space-1);
    }
  `,
})
export class FromQuestion {
  readonly question = input.required<Question>();
  readonly draftKept = output();
  readonly otherTaken = output();

  protected readonly draftWords = computed(() => this.question().draft.map(wordsOfStep));
  protected readonly otherWords = computed(() => this.question().other.steps.map(wordsOfStep));
}
