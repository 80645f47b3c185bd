import { Component, DestroyRef, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Router, RouterLink } from '@angular/router';
import { Subscription, filter, switchMap } from 'rxjs';
import type { FitProgressEvent } from '../../api/contract';
import { EditionsClient } from '../../api/editions-client';
import { FitsClient, fitEnded } from '../../api/fits-client';
import { problemOf, type Problem } from '../../api/problem';
import { SessionStore } from '../../api/session-store';
import { Announcer } from '../../ui/announcer';
import { Confirm } from '../../ui/confirm';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { MomentPipe } from '../../ui/moment-pipes';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { EDITION_STAMPS, FIT_STAMPS } from '../../ui/stamps';
import { StatusStamp } from '../../ui/status-stamp';
import { RevisionFacts } from '../words/revision-facts';
import { SpecificationWords } from '../words/specification-list';
import { CrossValidationFigure } from './cross-validation-figure';
import { diagnosticsOf, hasTables } from './diagnostics';
import { FitAccuracy } from './fit-accuracy';
import { FitDiagnostics } from './fit-diagnostics';
import { FitProgress } from './fit-progress';
import { FitReport } from './fit-report';
import { HeldOutFigure } from './held-out-figure';
import { PenaltyPathFigure } from './penalty-path-figure';
import { PenaltyTable } from './penalty-table';
import { RuleChoices } from './rule-choices';
import { WeightsTable } from './weights-table';

/** One fit: its progress while it is under way, and what it found. */
@Component({
  selector: 'tb-fit-page',
  imports: [
    CrossValidationFigure,
    FitAccuracy,
    FitDiagnostics,
    FitProgress,
    FitReport,
    HeldOutFigure,
    LoadingState,
    MomentPipe,
    PenaltyPathFigure,
    PenaltyTable,
    PageHead,
    ProblemNotice,
    RevisionFacts,
    RouterLink,
    RuleChoices,
    Sheet,
    SheetSection,
    SpecificationWords,
    StatusStamp,
    WeightsTable,
  ],
  templateUrl: './fit-page.html',
  styleUrl: './fit-page.scss',
})
export class FitPage {
  private readonly fits = inject(FitsClient);
  private readonly editions = inject(EditionsClient);
  private readonly session = inject(SessionStore);
  private readonly confirm = inject(Confirm);
  private readonly announcer = inject(Announcer);
  private readonly router = inject(Router);
  private readonly destroyRef = inject(DestroyRef);

  readonly slug = input.required<string>();
  readonly id = input.required<string>();

  protected readonly fit = load(() => this.fits.read(this.id()));
  protected readonly step = signal<FitProgressEvent | undefined>(undefined);
  protected readonly problem = signal<Problem | undefined>(undefined);
  protected readonly working = signal(false);

  protected readonly state = computed(() => this.step()?.state ?? this.fit.value()?.state ?? 'queued');
  protected readonly progress = computed(
    () => this.step()?.progress ?? this.fit.value()?.progress ?? { stage: '', done: 0, total: 0 },
  );
  protected readonly underWay = computed(() => !fitEnded(this.fit.value()?.state ?? 'queued'));
  protected readonly stamp = computed(() => (this.fit.value() ? FIT_STAMPS[this.state()] : undefined));
  protected readonly result = computed(() =>
    this.fit.value()?.state === 'done' ? (this.fit.value()?.result ?? undefined) : undefined,
  );
  protected readonly onLog = computed(() => this.fit.value()?.specification.target.transform === 'log');
  protected readonly scaleUnit = computed(() => (this.onLog() ? '' : (this.fit.value()?.unit ?? '')));
  private readonly found = computed(() => {
    const result = this.result();
    return result && diagnosticsOf(result);
  });
  protected readonly choices = computed(() => this.found()?.choices ?? []);
  protected readonly heldOut = computed(() => this.found()?.heldOut ?? []);
  protected readonly diagnostics = computed(() => {
    const found = this.found();
    return found && hasTables(found) ? found : undefined;
  });
  protected readonly mayChange = computed(() => this.session.holds('analyst'));
  protected readonly editionStamps = EDITION_STAMPS;
  private following?: Subscription;

  constructor() {
    effect(() => {
      const fit = this.fit.value();
      if (fit && !fitEnded(fit.state)) untracked(() => this.follow(fit.id));
    });
  }

  protected cancel(): void {
    this.working.set(true);
    this.fits
      .cancel(this.id())
      .pipe(takeUntilDestroyed(this.destroyRef))
      .subscribe({
        next: ({ state }) => {
          this.working.set(false);
          if (fitEnded(state)) this.fit.reload();
        },
        error: (error: unknown) => this.fail(error),
      });
  }

  protected drawUp(): void {
    this.confirm
      .askForNote({
        heading: `Draw up an edition of ${this.fit.value()?.estimatorName}?`,
        consequences: [
          'The fit becomes a draft edition. Nothing that partners see changes until another person puts it in force.',
        ],
        verb: 'Draw up the edition',
        noteLabel: 'Change note',
        noteHint: 'What is new against the edition before, for the reviewer and for partners.',
      })
      .pipe(
        filter((note) => note !== undefined),
        switchMap((changeNote) => this.editions.create(this.slug(), { fitId: this.id(), changeNote })),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe({
        next: (edition) => void this.router.navigate(['/estimators', this.slug(), 'editions', edition.id]),
        error: (error: unknown) => this.fail(error),
      });
  }

  /** Follows the fit to its end, then reads it again: the result does not come with the stream. */
  private follow(id: string): void {
    this.following?.unsubscribe();
    this.following = this.fits
      .follow(id)
      .pipe(takeUntilDestroyed(this.destroyRef))
      .subscribe({
        next: (step) => this.step.set(step),
        complete: () => this.readAgain(),
      });
  }

  private readAgain(): void {
    const { state } = this.step() ?? {};
    this.step.set(undefined);
    if (state && fitEnded(state)) this.announcer.say(`The fit is ${FIT_STAMPS[state].word.toLowerCase()}.`);
    this.fit.reload();
  }

  private fail(error: unknown): void {
    this.working.set(false);
    this.problem.set(problemOf(error));
  }
}
