import { Component, computed, input, output } from '@angular/core';
import { ChoiceField } from '../fields/choice-field';
import { TextField } from '../fields/text-field';
import { methodChoices, rulesFor } from '../words/method-words';
import type { FitDraft } from './fit-draft';
import { ruleInEffect, type DraftProblems } from './read-draft';

/** The method, and by what rule its penalty is chosen. */
@Component({
  selector: 'tb-penalty-choice',
  imports: [ChoiceField, TextField],
  templateUrl: './penalty-choice.html',
  styleUrl: './penalty-choice.scss',
})
export class PenaltyChoice {
  readonly draft = input.required<FitDraft>();
  readonly problems = input.required<DraftProblems>();
  readonly unit = input.required<string>();
  readonly changed = output<Partial<FitDraft>>();

  protected readonly methods = methodChoices;
  protected readonly rules = computed(() => rulesFor(this.draft().method));
  protected readonly rule = computed(() => ruleInEffect(this.draft()));
}
