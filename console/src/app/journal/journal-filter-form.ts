import { Component, computed, inject, input, linkedSignal, output } from '@angular/core';
import { FormsModule } from '@angular/forms';
import { everyItem } from '../api/page';
import { PeopleClient } from '../api/people-client';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { load } from '../ui/load';
import { ACTIONS, SUBJECT_KINDS } from './journal-names';
import { JournalQuery, isFiltered } from './journal-query';
import { wordsOf } from './journal-words';

@Component({
  selector: 'tb-journal-filter-form',
  imports: [Field, FieldInput, FormsModule],
  templateUrl: './journal-filter-form.html',
  styleUrl: './journal-filter-form.scss',
})
export class JournalFilterForm {
  private readonly peopleClient = inject(PeopleClient);

  readonly query = input.required<JournalQuery>();
  readonly wanted = output<JournalQuery>();
  readonly cleared = output();

  protected readonly form = new EntryForm<'toDay'>();
  protected readonly draft = linkedSignal(() => this.query());
  /** People to choose from; without them the journal can still be filtered by everything else. */
  protected readonly people = load(() => everyItem((page) => this.peopleClient.list(page)));
  protected readonly actions = computed(() => withChosen(ACTIONS, this.draft().action));
  protected readonly subjectKinds = computed(() => withChosen(SUBJECT_KINDS, this.draft().subjectKind));
  protected readonly filtered = computed(() => isFiltered(this.query()));
  protected readonly wordsOf = wordsOf;

  protected change(change: Partial<JournalQuery>): void {
    this.draft.update((draft) => ({ ...draft, ...change }));
  }

  protected submit(): void {
    const { fromDay, toDay } = this.draft();
    const reversed = fromDay !== '' && toDay !== '' && toDay < fromDay;
    if (this.form.accept({ toDay: reversed ? 'The last day lies before the first' : undefined }))
      this.wanted.emit(this.draft());
  }
}

/** A name in the address that this list does not know is still shown as what is being looked for. */
function withChosen(names: readonly string[], chosen: string): readonly string[] {
  return chosen === '' || names.includes(chosen) ? names : [...names, chosen];
}
