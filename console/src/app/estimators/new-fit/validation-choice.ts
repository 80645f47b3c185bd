import { Component, computed, input, output } from '@angular/core';
import type { RecordRevision } from '../../api/contract';
import { ChoiceField } from '../fields/choice-field';
import { SelectField, type Option } from '../fields/select-field';
import { TextField } from '../fields/text-field';
import { schemeChoices } from '../words/method-words';
import { extrasOffered, groupColumns, timeColumns, type FitDraft } from './fit-draft';
import type { DraftProblems } from './read-draft';

/** Which records are held out, and how much the intervals are to hold. */
@Component({
  selector: 'tb-validation-choice',
  imports: [ChoiceField, SelectField, TextField],
  templateUrl: './validation-choice.html',
  styleUrl: './validation-choice.scss',
})
export class ValidationChoice {
  readonly revision = input.required<RecordRevision>();
  readonly draft = input.required<FitDraft>();
  readonly problems = input.required<DraftProblems>();
  readonly changed = output<Partial<FitDraft>>();

  protected readonly schemes = schemeChoices;
  protected readonly offered = computed(() => extrasOffered(this.draft()));
  protected readonly groups = computed<readonly Option[]>(() =>
    groupColumns(this.revision()).map(({ name }) => ({ value: name, name })),
  );
  protected readonly times = computed<readonly Option[]>(() =>
    timeColumns(this.revision()).map(({ name }) => ({ value: name, name })),
  );
  protected readonly timeUnit = computed(() => {
    const column = this.revision().columns.find((candidate) => candidate.name === this.draft().timeColumn);
    return column?.kind === 'date' ? 'days' : (column?.unit ?? '');
  });
}
