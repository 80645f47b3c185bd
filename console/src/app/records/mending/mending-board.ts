import {
  Component,
  ElementRef,
  Injector,
  OnInit,
  afterNextRender,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { map, switchMap, timer } from 'rxjs';
import type { MendStep } from '../../api/contract';
import { MendingClient } from '../../api/mending-client';
import { Announcer } from '../../ui/announcer';
import { Confirm } from '../../ui/confirm';
import { countOf } from '../../ui/figure';
import { FocusHere } from '../../ui/focus-here';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { TaskProgress } from '../task-progress/task-progress';
import { DraftKeeper } from './draft-keeper';
import { keepingWords } from './keeping-words';
import type { Beginning, MendingOpening } from './mending-opening';
import { MendingOutlook } from './mending-outlook';
import { MENDING_PAUSES } from './mending-pauses';
import { MendingRun } from './mending-run';
import { SetChanged } from './set-changed';
import { StepForm } from './step-form';
import { StepList } from './step-list';
import { nameOfStep } from './step-words';
import { StepsHistory, type Steps } from './steps-history';
import { Trials } from './trials';

/** The list of steps, what would come out of it, and the making of the new revision. */
@Component({
  selector: 'tb-mending-board',
  imports: [
    FocusHere,
    LoadingState,
    MendingOutlook,
    PageHead,
    ProblemNotice,
    RouterLink,
    SetChanged,
    StepForm,
    StepList,
    TaskProgress,
  ],
  providers: [DraftKeeper, Trials],
  templateUrl: './mending-board.html',
  styleUrl: './mending-board.scss',
  host: { '(document:keydown)': 'onKey($event)', '(window:beforeunload)': 'onUnload($event)' },
})
export class MendingBoard implements OnInit {
  private readonly mending = inject(MendingClient);
  private readonly trials = inject(Trials);
  private readonly keeper = inject(DraftKeeper);
  private readonly pauses = inject(MENDING_PAUSES);
  private readonly confirm = inject(Confirm);
  private readonly announcer = inject(Announcer);
  private readonly router = inject(Router);
  private readonly injector = inject(Injector);

  readonly opening = input.required<MendingOpening>();
  readonly beginning = input.required<Exclude<Beginning, { with: 'question' }>>();

  private readonly addButton = viewChild<ElementRef<HTMLElement>>('addButton');

  protected readonly history = new StepsHistory();
  protected readonly run = new MendingRun();
  protected readonly adding = signal(false);
  protected readonly editing = signal<MendStep | undefined>(undefined);
  private readonly unfinished = signal(false);
  /** A step that is still being written would be lost: told from the try on until it is added or cancelled. */
  protected readonly toldOfUnfinished = computed(
    () => this.unfinished() && (this.adding() || this.editing() !== undefined),
  );

  protected readonly revision = computed(() => this.opening().revision);
  protected readonly steps = this.history.steps;
  /** The set as the person knows it. */
  protected readonly set = linkedSignal(() => this.opening().set);
  protected readonly newest = computed(() => this.set().revision);
  protected readonly nextNumber = computed(() => this.set().lastNumber + 1);
  protected readonly parent = computed(() => ({
    label: `${this.revision().recordSetName}, revision ${this.revision().number}`,
    link: `/records/revisions/${this.revision().id}`,
  }));
  /** Tried once the edits pause; what was tried last stands until the answer comes. */
  protected readonly tried = load(() => {
    const [revision, steps] = [this.revision(), this.steps()];
    return timer(steps.length > 0 ? this.pauses.betweenEditsMs : 0).pipe(
      switchMap(() => this.trials.outlookOf(revision, steps)),
      map((outlook) => ({ steps, outlook })),
    );
  });
  protected readonly refused = computed(() => this.tried.value()?.outlook.refused);
  protected readonly mayMake = computed(() => this.steps().length > 0 && !this.run.underWay() && !this.refused());
  protected readonly caution = computed(() => {
    const beginning = this.beginning();
    return beginning.with === 'other' ? beginning.caution : undefined;
  });
  protected readonly kept = computed(() => keepingWords(this.keeper.keeping()));
  protected readonly notKept = computed(() => this.keeper.keeping().state === 'failed');
  protected readonly setChanged = computed(() => this.run.problem()?.code === 'record-set-changed');

  constructor() {
    // The notice says that the steps are kept: so they are, even where this person has mended elsewhere meanwhile.
    effect(() => {
      if (this.setChanged()) untracked(() => this.keep());
    });
  }

  ngOnInit(): void {
    const { steps, with: source } = this.beginning();
    this.history.begin(steps);
    this.keeper.begin(this.opening().draft);
    if (source === 'other') this.keeper.keep(this.revision().id, steps);
  }

  protected change(steps: Steps): void {
    this.history.change(steps);
    this.keep();
    // What was pressed went with the last step.
    if (steps.length === 0) this.focusAdding();
  }

  protected add(step: MendStep): void {
    this.change([...this.steps(), step]);
    this.stopAdding();
    this.announcer.say(`${nameOfStep(step)} was added as step ${this.steps().length}.`);
  }

  /** The focus goes back to where the form was asked for. */
  protected stopAdding(): void {
    this.adding.set(false);
    this.focusAdding();
  }

  protected undo(): void {
    if (!this.history.canUndo()) return;
    this.history.undo();
    this.told('Undone');
  }

  protected redo(): void {
    if (!this.history.canRedo()) return;
    this.history.redo();
    this.told('Redone');
  }

  protected startAfresh(): void {
    const consequences = [
      `Your ${countOf(this.steps().length, 'step')} for revision ${this.revision().number} are taken off the list. The records stay as they are.`,
      'Undo brings them back as long as you stay on this page.',
    ];
    this.confirm.ask({ heading: 'Start afresh?', consequences, verb: 'Start afresh' }).subscribe((yes) => {
      if (yes) this.change([]);
    });
  }

  protected make(): void {
    this.unfinished.set(this.adding() || this.editing() !== undefined);
    if (this.unfinished()) return;
    const { id } = this.revision();
    const [steps, expectedNewest] = [this.steps(), this.newest().number];
    const request = this.keeper.flush().pipe(switchMap(() => this.mending.mend(id, { steps, expectedNewest })));
    this.run.start(request, (revisionId) => this.show(revisionId));
  }

  /** Somebody has added to the set: the person now knows it and may go on. */
  protected makeAllTheSame(set: MendingOpening['set']): void {
    this.set.set(set);
    this.make();
  }

  /** Control (or Command) with Z undoes and with Shift redoes, unless a field has its own undo. */
  protected onKey(event: KeyboardEvent): void {
    const wanted = (event.ctrlKey || event.metaKey) && !event.altKey && event.key.toLowerCase() === 'z';
    if (!wanted || inField(event.target) || this.run.underWay()) return;
    event.preventDefault();
    if (event.shiftKey) this.redo();
    else this.undo();
  }

  /** The browser asks before it leaves while the list is not kept yet. */
  protected onUnload(event: Event): void {
    if (this.keeper.waits()) event.preventDefault();
  }

  private told(done: string): void {
    this.keep();
    this.announcer.say(`${done}. ${countOf(this.steps().length, 'step')} in the list.`);
  }

  private focusAdding(): void {
    afterNextRender({ read: () => this.addButton()?.nativeElement.focus() }, { injector: this.injector });
  }

  private keep(): void {
    this.keeper.keep(this.revision().id, this.steps());
  }

  private show(revisionId: string): void {
    this.keeper.forget();
    this.announcer.say(`Revision ${this.nextNumber()} was made.`);
    void this.router.navigate(['/records/revisions', revisionId]);
  }
}

function inField(target: EventTarget | null): boolean {
  return (
    target instanceof Element && target.closest('input, textarea, select, [contenteditable], [role="dialog"]') !== null
  );
}
