import {
  Component,
  ElementRef,
  Injector,
  afterNextRender,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { EstimatorsClient } from '../../api/estimators-client';
import { FitsClient } from '../../api/fits-client';
import { everyItem } from '../../api/page';
import { problemOf, type Problem } from '../../api/problem';
import { RecordsClient } from '../../api/records-client';
import { EmptyState } from '../../ui/empty-state';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { draftOn, withInputs, type FitDraft, type InputsChange } from './fit-draft';
import { FitDrafts } from './fit-drafts';
import { InputsTable } from './inputs-table';
import { PenaltyChoice } from './penalty-choice';
import { problemsByInput, readDraft, type DraftProblems } from './read-draft';
import { RecordsChoice } from './records-choice';
import { RowFilterChoice } from './row-filter-choice';
import { TargetChoice } from './target-choice';
import { ValidationChoice } from './validation-choice';

/** Asks for a fit: which records, what to estimate, from what, and how. */
@Component({
  selector: 'tb-new-fit-page',
  imports: [
    EmptyState,
    InputsTable,
    LoadingState,
    PenaltyChoice,
    ProblemNotice,
    RecordsChoice,
    RouterLink,
    RowFilterChoice,
    Sheet,
    SheetSection,
    TargetChoice,
    ValidationChoice,
  ],
  templateUrl: './new-fit-page.html',
  styleUrl: './new-fit-page.scss',
})
export class NewFitPage {
  private readonly estimators = inject(EstimatorsClient);
  private readonly records = inject(RecordsClient);
  private readonly fits = inject(FitsClient);
  private readonly drafts = inject(FitDrafts);
  private readonly router = inject(Router);
  private readonly injector = inject(Injector);

  readonly slug = input.required<string>();
  /** Records taken along from their own sheet; from the address. */
  readonly fromSet = input<string>();
  readonly fromRevision = input<string>();
  private readonly summary = viewChild<ElementRef<HTMLElement>>('summary');

  /** What was changed on this visit; until then the draft that was kept from an earlier one stands. */
  private readonly changes = signal<FitDraft | undefined>(undefined);
  protected readonly draft = computed(() => this.changes() ?? this.drafts.of(this.slug()));
  protected readonly problems = signal<DraftProblems>(new Map());
  protected readonly problem = signal<Problem | undefined>(undefined);
  protected readonly starting = signal(false);

  protected readonly estimator = load(() => this.estimators.read(this.slug()));
  protected readonly recordSets = load(() => everyItem((page) => this.records.list(page)));
  private readonly recordSetId = computed(() => this.draft().recordSetId);
  private readonly revisionId = computed(() => this.draft().revisionId);
  protected readonly recordSet = load(() => (this.recordSetId() ? this.records.read(this.recordSetId()) : undefined));
  protected readonly revision = load(() =>
    this.revisionId() ? this.records.readRevision(this.revisionId()) : undefined,
  );
  protected readonly shownRecordSet = computed(() => only(this.recordSet.value(), this.recordSetId()));
  protected readonly shownRevision = computed(() => only(this.revision.value(), this.revisionId()));
  /** The service's own words without its list of fields, which stand beside the fields. */
  protected readonly shortProblem = computed(() => {
    const problem = this.problem();
    return problem && { ...problem, errors: [] };
  });

  constructor() {
    effect(() => {
      const [recordSetId, revisionId] = [this.fromSet(), this.fromRevision()];
      if (recordSetId && revisionId) untracked(() => this.change({ recordSetId, revisionId }));
    });
    // The columns of a revision change the draft when they arrive; nothing else here follows from the draft.
    effect(() => {
      const revision = this.shownRevision();
      if (revision) untracked(() => this.keep(draftOn(revision, this.draft())));
    });
  }

  protected change(change: Partial<FitDraft>): void {
    this.keep({ ...this.draft(), ...change });
  }

  protected changeInputs(change: InputsChange): void {
    this.keep(withInputs(this.draft(), change));
  }

  /** Takes the newest revision of the set that was chosen. */
  protected chooseSet(recordSetId: string): void {
    const newest = this.recordSets.value()?.find((candidate) => candidate.id === recordSetId)?.revision.id ?? '';
    this.change({ recordSetId, revisionId: newest });
  }

  protected start(): void {
    this.problem.set(undefined);
    const reading = readDraft(this.draft(), this.shownRevision());
    if ('problems' in reading) return this.complain(reading.problems);
    this.problems.set(new Map());
    this.starting.set(true);
    this.fits.start(this.slug(), reading.fit).subscribe({
      next: ({ id }) => {
        this.drafts.forget(this.slug());
        void this.router.navigate(['/estimators', this.slug(), 'fits', id]);
      },
      error: (error: unknown) => {
        this.starting.set(false);
        const problem = problemOf(error);
        this.problem.set(problem);
        this.complain(new Map(problem.errors.map(({ field, detail }) => [field, detail])));
      },
    });
  }

  private complain(problems: DraftProblems): void {
    this.problems.set(problemsByInput(problems, this.draft()));
    afterNextRender({ write: () => this.summary()?.nativeElement.focus() }, { injector: this.injector });
  }

  private keep(draft: FitDraft): void {
    this.changes.set(draft);
    this.drafts.keep(this.slug(), draft);
  }
}

/** An answer, as long as it is about what is now chosen; an older one still stands while the newer is read. */
function only<Answer extends { readonly id: string }>(answer: Answer | undefined, id: string): Answer | undefined {
  return answer?.id === id ? answer : undefined;
}
