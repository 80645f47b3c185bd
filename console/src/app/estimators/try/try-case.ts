import { Component, DestroyRef, computed, inject, input, linkedSignal, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import type { CaseTexts } from '@widget/beam-diagram/beam-table';
import type { Evaluation } from '../../api/contract';
import { EditionsClient } from '../../api/editions-client';
import { errorOf, problemOf, type Problem } from '../../api/problem';
import { Announcer } from '../../ui/announcer';
import { Field, FieldInput } from '../../ui/field';
import { ProblemNotice } from '../../ui/problem-notice';
import { caseFields, type CaseField } from './case-fields';
import { CaseResult } from './case-result';
import { caseTexts, fieldHint, readCase, typicalDraft, type CaseDraft } from './read-case';

interface Tried {
  readonly evaluation: Evaluation;
  readonly texts: CaseTexts;
}

/** A form made from an edition's inputs, and what the edition says to the case. Nothing is kept. */
@Component({
  selector: 'tb-try-case',
  imports: [CaseResult, Field, FieldInput, ProblemNotice],
  templateUrl: './try-case.html',
  styleUrl: './try-case.scss',
})
export class TryCase {
  private readonly editions = inject(EditionsClient);
  private readonly announcer = inject(Announcer);
  private readonly destroyRef = inject(DestroyRef);

  readonly editionId = input.required<string>();
  readonly inputSchema = input.required<Readonly<Record<string, unknown>>>();

  protected readonly fields = computed(() => caseFields(this.inputSchema()));
  protected readonly draft = linkedSignal<CaseDraft>(() => typicalDraft(this.fields()));
  protected readonly complaints = signal<Readonly<Record<string, string>>>({});
  protected readonly problem = signal<Problem | undefined>(undefined);
  protected readonly tried = signal<Tried | undefined>(undefined);
  protected readonly working = signal(false);
  protected readonly hint = fieldHint;

  protected errorOf(field: CaseField): string | undefined {
    return this.complaints()[field.name] ?? errorOf(this.problem(), `inputs/${field.name}`);
  }

  protected listId(field: CaseField): string {
    return `levels-${this.editionId()}-${field.order}`;
  }

  protected type(name: string, text: string): void {
    this.draft.update((draft) => ({ ...draft, [name]: text }));
  }

  protected startFromTypical(): void {
    this.draft.set(typicalDraft(this.fields()));
    this.complaints.set({});
  }

  protected work(event: Event): void {
    event.preventDefault();
    const reading = readCase(this.fields(), this.draft());
    this.problem.set(undefined);
    this.complaints.set('problems' in reading ? reading.problems : {});
    if ('problems' in reading || this.working()) return;
    const texts = caseTexts(this.fields(), reading.inputs);
    this.working.set(true);
    this.editions
      .tryCase(this.editionId(), reading.inputs)
      .pipe(takeUntilDestroyed(this.destroyRef))
      .subscribe({
        next: (evaluation) => {
          this.working.set(false);
          this.tried.set({ evaluation, texts });
          this.announcer.say('The case was worked out.');
        },
        error: (error: unknown) => {
          this.working.set(false);
          this.problem.set(problemOf(error));
        },
      });
  }
}
