import {
  Component,
  DestroyRef,
  ElementRef,
  Signal,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { filter, switchMap } from 'rxjs';
import type { IncomingFile, RecordTask } from '../../api/contract';
import { IncomingFilesClient } from '../../api/incoming-files-client';
import { Problem, problemOf } from '../../api/problem';
import { taskProblem } from '../../api/record-tasks-client';
import { RecordsClient } from '../../api/records-client';
import { Announcer } from '../../ui/announcer';
import { Confirm } from '../../ui/confirm';
import { EmptyState } from '../../ui/empty-state';
import { FocusHere } from '../../ui/focus-here';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { FollowedTask } from '../task-progress/followed-task';
import { TaskProgress } from '../task-progress/task-progress';
import { BringInForm } from './bring-in-form';
import { carriedChoices } from './carried-choices';
import { readDestination } from './destination';
import { nameFromFile } from './file-complaint';
import { FileReading } from './file-reading';
import { KeptBringIn, NO_WORDS, RecordSetWords } from './kept-bring-in';
import { ProposedColumns } from './proposed-columns';
import { ProposedReading } from './proposed-reading';
import { ReadingPreview } from './reading-preview';

type PageState = 'loading' | 'working' | 'gone' | 'error' | 'ready';

/** The second step of bringing a file in: how it would be read, what is changed about that, and what it becomes. */
@Component({
  selector: 'tb-proposal-page',
  imports: [
    BringInForm,
    EmptyState,
    FileReading,
    FocusHere,
    LoadingState,
    PageHead,
    ProblemNotice,
    ProposedColumns,
    ReadingPreview,
    RouterLink,
    Sheet,
    SheetSection,
    TaskProgress,
  ],
  templateUrl: './proposal-page.html',
  styleUrl: './proposal-page.scss',
})
export class ProposalPage {
  private readonly client = inject(IncomingFilesClient);
  private readonly records = inject(RecordsClient);
  private readonly kept = inject(KeptBringIn);
  private readonly confirm = inject(Confirm);
  private readonly announcer = inject(Announcer);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly destroyRef = inject(DestroyRef);
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  readonly incomingId = input.required<string>();
  /** The set whose next revision it becomes. */
  readonly recordSet = input<string>();
  /** The revision that its rows are appended to. */
  readonly appendTo = input<string>();
  /** The work that brings it in, once that has begun. */
  readonly task = input<string>();

  protected readonly file = load(() => (this.task() === undefined ? this.client.read(this.incomingId()) : undefined));
  protected readonly destination = load(() =>
    readDestination(this.records, { recordSet: this.recordSet(), appendTo: this.appendTo() }),
  );
  protected readonly reading = new ProposedReading();
  protected readonly words = signal<RecordSetWords>(NO_WORDS);
  protected readonly work = new FollowedTask(this.task, (task) => this.end(task));
  /** Why the file was not brought in, or not let go. */
  protected readonly failure = signal<Problem | undefined>(undefined);
  /** The file whose choices are on screen. */
  private readonly begun = signal<string | undefined>(undefined);

  private readonly needsDestination = computed(() => (this.recordSet() ?? this.appendTo()) !== undefined);
  private readonly waitsForDestination = computed(
    () => this.needsDestination() && this.destination.state() === 'loading',
  );
  /** The revision whose choices the page began with. */
  protected readonly carriedFrom = signal<number | undefined>(undefined);
  protected readonly problem: Signal<Problem | undefined> = computed(
    () => this.destination.problem() ?? this.file.problem() ?? this.firstRefusal(),
  );
  protected readonly state: Signal<PageState> = computed(() => {
    if (this.task() !== undefined) return 'working';
    if (this.isGone()) return 'gone';
    if (this.problem()) return 'error';
    return this.waitsForDestination() || this.file.value() === undefined || this.reading.proposal() === undefined
      ? 'loading'
      : 'ready';
  });
  protected readonly fileName = computed(() => this.file.value()?.fileName ?? 'the file');
  protected readonly suggestedName = computed(() => nameFromFile(this.file.value()?.fileName ?? ''));
  protected readonly parent = computed(() => {
    const set = this.destination.value()?.set;
    return set ? { label: set.name, link: `/records/${set.id}` } : { label: 'Records', link: '/records' };
  });
  protected readonly formHeading = computed(() => {
    const kind = this.destination.value()?.kind;
    if (kind === undefined) return 'Bring in';
    return kind === 'appended' ? 'Append' : 'Bring in as the next revision';
  });
  /** A refusal that no choice is to blame for. */
  protected readonly lostProposal = computed(() =>
    this.reading.complaints().size === 0 ? this.reading.problem() : undefined,
  );

  constructor() {
    effect(() => {
      const file = this.file.value();
      // An earlier file's choices are known with the set.
      if (file && !this.waitsForDestination()) untracked(() => this.begin(file));
    });
    effect(() => {
      const draft = { choices: this.reading.choices(), words: this.words() };
      const id = this.begun();
      if (id !== undefined) this.kept.write(id, draft);
    });
  }

  protected follow(taskId: string): void {
    this.failure.set(undefined);
    this.goOn({ task: taskId });
  }

  protected tryAgain(): void {
    if (this.destination.problem()) this.destination.reload();
    if (this.file.problem()) this.file.reload();
    if (this.firstRefusal()) this.reading.askAgain();
  }

  /** What is complained about above the form's own fields. */
  protected showComplaint(): void {
    this.element.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus();
  }

  protected letGo(): void {
    this.confirm
      .ask({
        heading: `Let ${this.fileName()} go?`,
        consequences: ['The file that was sent is removed, and your choices with it. Nothing of it was stored.'],
        verb: 'Let the file go',
        lasting: true,
      })
      .pipe(
        filter((yes) => yes),
        switchMap(() => this.client.discard(this.incomingId())),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe({ next: () => this.wentAway(), error: (error: unknown) => this.stayed(problemOf(error)) });
  }

  private begin(file: IncomingFile): void {
    if (this.begun() === file.id) return;
    const draft = this.kept.read(file.id);
    const destination = this.destination.value();
    const carried = destination && !draft ? carriedChoices(destination) : {};
    if (Object.keys(carried).length > 0) this.carriedFrom.set(destination?.set.revision.number);
    this.words.set(draft?.words ?? NO_WORDS);
    this.reading.begin({
      incomingId: file.id,
      appendTo: this.appendTo(),
      found: file.proposal,
      choices: draft?.choices ?? carried,
    });
    this.begun.set(file.id);
  }

  private end(task: RecordTask): void {
    if (task.state === 'done') return this.show(task);
    if (task.state === 'failed') this.failure.set(taskProblem(task, 'The file was not brought in'));
    else this.announcer.show('It was cancelled. Nothing was stored, and the file still waits here.');
    if (this.needsDestination()) this.destination.reload();
    this.goOn({ task: null });
  }

  private show({ revisionId }: RecordTask): void {
    this.forget();
    this.announcer.say('The file was brought in.');
    void this.router.navigate(['/records/revisions', revisionId], { replaceUrl: true });
  }

  /** The address says what goes on, so that a reload goes on with it. */
  private goOn(queryParams: { readonly task: string | null }): void {
    const extras = { relativeTo: this.route, queryParams, queryParamsHandling: 'merge', replaceUrl: true } as const;
    void this.router.navigate([], extras);
  }

  private wentAway(): void {
    this.forget();
    this.announcer.show(`${this.fileName()} was let go.`);
    void this.router.navigate([this.parent().link]);
  }

  private stayed(problem: Problem): void {
    if (problem.code === 'not-found') return this.wentAway();
    this.failure.set(problem);
  }

  private forget(): void {
    this.begun.set(undefined);
    this.kept.forget(this.incomingId());
  }

  private isGone(): boolean {
    if (this.destination.problem()) return false;
    return [this.file.problem(), this.reading.problem()].some((problem) => problem?.code === 'not-found');
  }

  /** Nothing was proposed yet, so there is nothing to show beside it. */
  private firstRefusal(): Problem | undefined {
    return this.reading.proposal() === undefined ? this.reading.problem() : undefined;
  }
}
