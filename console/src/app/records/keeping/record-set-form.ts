import { Component, computed, inject, input, linkedSignal, output, signal } from '@angular/core';
import type { RecordSetChange, RecordSetDetail } from '../../api/contract';
import { RecordKeepingClient } from '../../api/record-keeping-client';
import { Announcer } from '../../ui/announcer';
import { EntryForm } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import { ProblemNotice } from '../../ui/problem-notice';
import { nameComplaint } from '../../ui/text-rules';
import { retentionComplaint } from './retention-complaint';
import { retentionDayOf } from './revision-words';

type Words = Pick<RecordSetDetail, 'name' | 'description' | 'retainUntil'>;

const RETENTION_MEANING =
  'After this day the rows of every revision are erased, and the original files with them. Editions made from them keep answering. Without a day, rows are kept until somebody deletes them.';

/** A set's name, description and retention date. What is typed outlives a colleague's change. */
@Component({
  selector: 'tb-record-set-form',
  imports: [Field, FieldInput, ProblemNotice],
  templateUrl: './record-set-form.html',
})
export class RecordSetForm {
  private readonly client = inject(RecordKeepingClient);
  private readonly announcer = inject(Announcer);

  readonly recordSet = input.required<RecordSetDetail>();
  readonly saved = output<RecordSetDetail>();
  /** Somebody else has changed the set: it has to be read again. */
  readonly outdated = output();

  protected readonly form = new EntryForm<keyof RecordSetChange>();
  protected readonly name = this.draftOf((set) => set.name);
  protected readonly description = this.draftOf((set) => set.description);
  protected readonly retainUntil = this.draftOf((set) => set.retainUntil ?? '');
  /** A colleague's change was met, so the fields say what is kept now. */
  private readonly overtaken = signal(false);
  protected readonly keptName = computed(() =>
    this.keptNow(this.name() !== this.recordSet().name, this.recordSet().name),
  );
  protected readonly keptDescription = computed(() => {
    const { description } = this.recordSet();
    return this.keptNow(this.description() !== description, description);
  });
  protected readonly retentionHint = computed(() => {
    const { retainUntil } = this.recordSet();
    const kept = this.keptNow(this.retainUntil() !== (retainUntil ?? ''), retentionDayOf(this.recordSet()) ?? '');
    return kept === undefined ? RETENTION_MEANING : `${RETENTION_MEANING} ${kept}`;
  });

  protected submit(): void {
    const complaints = {
      name: nameComplaint(this.name(), 'a name for the record set'),
      retainUntil: retentionComplaint(this.retainUntil(), this.recordSet().retainUntil),
    };
    if (!this.form.accept(complaints)) return;
    const change = changeOf(this.recordSet(), {
      name: this.name().trim(),
      description: this.description().trim(),
      retainUntil: this.retainUntil() === '' ? null : this.retainUntil(),
    });
    if (change === undefined) this.announcer.show('Nothing was changed, so nothing was saved.');
    else this.save(change);
  }

  protected readAgain(): void {
    this.form.accept({});
    this.overtaken.set(true);
    this.outdated.emit();
  }

  private save(change: RecordSetChange): void {
    const { id, changedAt } = this.recordSet();
    this.form.send(this.client.change(id, { ...change, changedAt }), (set) => {
      this.overtaken.set(false);
      this.saved.emit(set);
      this.announcer.show('Saved.');
    });
  }

  /** What was typed stays when the set is read again; what was not touched follows the set. */
  private draftOf(read: (set: RecordSetDetail) => string): ReturnType<typeof linkedSignal<RecordSetDetail, string>> {
    return linkedSignal<RecordSetDetail, string>({
      source: () => this.recordSet(),
      computation: (set, previous) =>
        previous && previous.value !== read(previous.source) ? previous.value : read(set),
    });
  }

  private keptNow(differs: boolean, kept: string): string | undefined {
    if (!this.overtaken() || !differs) return undefined;
    return kept === '' ? 'Kept now: nothing.' : `Kept now: ${kept}`;
  }
}

/** Only what differs is sent; undefined when nothing does. */
function changeOf(kept: Words, typed: Words): RecordSetChange | undefined {
  const change: RecordSetChange = {
    ...(typed.name === kept.name ? {} : { name: typed.name }),
    ...(typed.description === kept.description ? {} : { description: typed.description }),
    ...(typed.retainUntil === kept.retainUntil ? {} : { retainUntil: typed.retainUntil }),
  };
  return Object.keys(change).length === 0 ? undefined : change;
}
