import { Component, computed, effect, inject, input, model, output } from '@angular/core';
import type { BringInRequest, ReadingProposal } from '../../api/contract';
import { IncomingFilesClient } from '../../api/incoming-files-client';
import { Problem, errorOf } from '../../api/problem';
import { EntryForm } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import { CountPipe } from '../../ui/figure-pipes';
import { ProblemNotice } from '../../ui/problem-notice';
import { nameComplaint } from '../../ui/text-rules';
import { retentionComplaint } from '../keeping/retention-complaint';
import { AppendingOutlook } from './appending-outlook';
import { namesInShort } from './names-in-short';
import { broughtBack } from './carried-choices';
import { Destination, asRecordSet, bringInAs, nextNumber } from './destination';
import type { RecordSetWords } from './kept-bring-in';
import { ProposedReading } from './proposed-reading';

const LONGEST_DESCRIPTION = 2000;

/** What the file is to become, and the button that makes it so. */
@Component({
  selector: 'tb-bring-in-form',
  imports: [AppendingOutlook, CountPipe, Field, FieldInput, ProblemNotice],
  templateUrl: './bring-in-form.html',
  styleUrl: './bring-in-form.scss',
})
export class BringInForm {
  private readonly client = inject(IncomingFilesClient);

  readonly incomingId = input.required<string>();
  readonly suggestedName = input.required<string>();
  readonly reading = input.required<ProposedReading>();
  readonly proposal = input.required<ReadingProposal>();
  /** Undefined for a record set of its own. */
  readonly destination = input<Destination>();
  /** Why the work failed that was begun from here before. */
  readonly failure = input<Problem>();
  readonly words = model.required<RecordSetWords>();
  /** The task that does the work. */
  readonly started = output<string>();
  /** Somebody else has changed the record set: read it again. */
  readonly refresh = output();
  readonly discarded = output();
  /** Complaints that stand beside the choices above. */
  readonly blocked = output();
  /** The file is no longer there. */
  readonly gone = output();

  protected readonly form = new EntryForm<'name' | 'description' | 'retainUntil' | 'reading'>();
  /** Told from the try on which it stood in the way, until it no longer does. */
  protected readonly toldOfReading = computed(() =>
    this.form.errorOf('reading') === undefined ? undefined : this.readingComplaint(),
  );
  protected readonly name = computed(() => this.words().name ?? this.suggestedName());
  protected readonly nameError = computed(
    () => this.form.errorOf('name') ?? nameTaken(this.form.problem()) ?? nameTaken(this.failure()),
  );
  protected readonly number = computed(() => {
    const destination = this.destination();
    return destination && nextNumber(destination);
  });
  protected readonly setAside = computed(() => {
    const { choices } = this.reading();
    const chosen = new Map((choices().columns ?? []).map((column) => [column.name, column.setAside]));
    return this.proposal().columns.filter((column) => chosen.get(column.name) ?? column.setAside);
  });
  /** What an earlier revision set aside and this one would store. */
  protected readonly broughtBack = computed(() => {
    const destination = this.destination();
    const aside = new Set(this.setAside().map(({ name }) => name));
    const stored = this.proposal().columns.filter(({ name }) => !aside.has(name));
    return destination
      ? broughtBack(
          destination,
          stored.map(({ name }) => name),
        )
      : [];
  });
  protected readonly setAsideNames = computed(() => namesInShort(this.setAside().map(({ name }) => name)));
  protected readonly wasChanged = computed(() => this.form.problem()?.code === 'record-set-changed');
  /** What stands beside the name already is not said twice. */
  protected readonly problem = computed(() => {
    const problem = this.form.problem();
    return nameTaken(problem) === undefined ? problem : undefined;
  });

  constructor() {
    effect(() => {
      if (this.form.problem()?.code === 'not-found') this.gone.emit();
    });
  }

  protected refreshSet(): void {
    this.form.accept({});
    this.refresh.emit();
  }

  protected change(change: Partial<RecordSetWords>): void {
    this.words.update((words) => ({ ...words, ...change }));
  }

  protected send(event: Event): void {
    event.preventDefault();
    const destination = this.destination();
    const accepted = this.form.accept({
      ...(destination === undefined ? this.wordsComplaints() : {}),
      reading: this.readingComplaint(),
    });
    if (this.form.errorOf('reading') !== undefined) this.blocked.emit();
    if (!accepted) return;
    const as = destination ? bringInAs(destination) : asRecordSet(this.name(), this.words());
    const request: BringInRequest = { choices: this.reading().fitting(), as };
    this.form.send(this.client.bringIn(this.incomingId(), request), ({ id }) => this.started.emit(id));
  }

  private wordsComplaints(): { name?: string; description?: string; retainUntil?: string } {
    const { description, retainUntil } = this.words();
    const length = description.trim().length;
    return {
      name: nameComplaint(this.name(), 'a name for the record set'),
      description:
        length > LONGEST_DESCRIPTION
          ? `Shorten the description to ${LONGEST_DESCRIPTION} characters; it has ${length}`
          : undefined,
      retainUntil: retentionComplaint(retainUntil),
    };
  }

  /** Nothing counts that was not shown first. */
  private readingComplaint(): string | undefined {
    if (this.reading().asking()) return 'The preview is being read again: look at it, then bring the file in';
    if (this.reading().problem()) return this.refusalComplaint();
    if ((this.proposal().appending?.lacking.length ?? 0) > 0) return 'The file lacks columns of the revision';
    if (this.setAside().length === this.proposal().columns.length) return 'Keep at least one column';
    return undefined;
  }

  private refusalComplaint(): string {
    const [complaint] = this.reading().complaints().values();
    const because = complaint === undefined ? '' : ` (${complaint.replace(/\.$/, '')})`;
    return `The file cannot be read with these choices${because}: change them first`;
  }
}

function nameTaken(problem: Problem | undefined): string | undefined {
  if (problem?.code !== 'name-taken') return undefined;
  return errorOf(problem, 'as/name') ?? errorOf(problem, 'name') ?? problem.detail;
}
