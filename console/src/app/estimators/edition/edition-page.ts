import { Component, DestroyRef, computed, inject, input, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { Observable, filter, map, switchMap } from 'rxjs';
import type { Edition, Withdrawal } from '../../api/contract';
import { EditionsClient } from '../../api/editions-client';
import { EstimatorsClient } from '../../api/estimators-client';
import { FitsClient } from '../../api/fits-client';
import { problemOf, type Problem } from '../../api/problem';
import { SessionStore } from '../../api/session-store';
import { Announcer } from '../../ui/announcer';
import { Confirm } from '../../ui/confirm';
import { formatFigure } from '../../ui/figure';
import { CountPipe } from '../../ui/figure-pipes';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { DayPipe, MomentPipe } from '../../ui/moment-pipes';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import type { SheetMenuItem } from '../../ui/sheet/sheet-menu';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { EDITION_STAMPS } from '../../ui/stamps';
import { TryCase } from '../try/try-case';
import { RevisionFacts } from '../words/revision-facts';
import { methodName } from '../words/method-words';
import {
  actionsFor,
  putInForceRequest,
  sendBackRequest,
  submitRequest,
  whyNotPutInForce,
  type Actor,
  type EditionAction,
} from './edition-actions';
import { EditionEvents } from './edition-events';
import { EditionFormula } from './edition-formula';
import { EditionInputs } from './edition-inputs';
import { WithdrawDialog } from './withdraw-dialog';

/** One edition: what it says, what it rests on, who approved it, and what may be done with it now. */
@Component({
  selector: 'tb-edition-page',
  imports: [
    CountPipe,
    DayPipe,
    EditionEvents,
    EditionFormula,
    EditionInputs,
    LoadingState,
    MomentPipe,
    PageHead,
    ProblemNotice,
    RevisionFacts,
    RouterLink,
    Sheet,
    SheetSection,
    TryCase,
  ],
  templateUrl: './edition-page.html',
  styleUrl: './edition-page.scss',
})
export class EditionPage {
  private readonly editions = inject(EditionsClient);
  private readonly estimators = inject(EstimatorsClient);
  private readonly fits = inject(FitsClient);
  private readonly session = inject(SessionStore);
  private readonly confirm = inject(Confirm);
  private readonly dialog = inject(MatDialog);
  private readonly announcer = inject(Announcer);
  private readonly destroyRef = inject(DestroyRef);

  readonly slug = input.required<string>();
  readonly id = input.required<string>();

  protected readonly edition = load(() => this.editions.read(this.id()));
  protected readonly estimator = load(() => this.estimators.read(this.slug()));
  private readonly fitId = computed(() => this.edition.value()?.fitId);
  /** The specification behind the edition: by which transforms its inputs enter the formula. */
  protected readonly fit = load(() => {
    const id = this.fitId();
    return id === undefined ? undefined : this.fits.read(id);
  });
  protected readonly problem = signal<Problem | undefined>(undefined);

  private readonly actor = computed<Actor>(() => ({
    id: this.session.person()?.id,
    analyst: this.session.holds('analyst'),
    reviewer: this.session.holds('reviewer'),
  }));
  protected readonly stamp = computed(() => {
    const edition = this.edition.value();
    return edition && EDITION_STAMPS[edition.state];
  });
  protected readonly actions = computed<readonly EditionAction[]>(() => {
    const edition = this.edition.value();
    return edition ? actionsFor(edition, this.actor()) : [];
  });
  /** What is seldom done stands in the menu. */
  protected readonly menu = computed<readonly SheetMenuItem[]>(() => {
    const edition = this.edition.value();
    return edition && this.actions().includes('withdraw')
      ? [{ label: 'Withdraw', run: () => this.withdraw(edition) }]
      : [];
  });
  protected readonly whyNot = computed(() => {
    const edition = this.edition.value();
    return edition?.state === 'under-review' ? whyNotPutInForce(edition, this.actor()) : undefined;
  });
  protected readonly heldOut = computed(() => {
    const edition = this.edition.value();
    return formatFigure(edition?.rmse, { significant: 3, unit: edition?.unit });
  });
  protected readonly method = computed(() => methodName(this.edition.value()?.method ?? ''));

  protected submit(edition: Edition): void {
    this.agreed(this.confirm.ask(submitRequest(edition)), () => this.editions.submit(edition.id));
  }

  protected putInForce(edition: Edition): void {
    if (this.whyNot() !== undefined) return;
    const request = putInForceRequest(edition, this.estimator.value()?.inForce ?? null);
    this.agreed(this.confirm.ask(request), () => this.editions.putInForce(edition.id));
  }

  protected sendBack(edition: Edition): void {
    const note = this.confirm.askForNote(sendBackRequest(edition));
    this.run(
      note.pipe(
        filter((text) => text !== undefined),
        switchMap((text) => this.editions.sendBack(edition.id, text)),
      ),
    );
  }

  private withdraw(edition: Edition): void {
    const opened = this.dialog.open<WithdrawDialog, Edition, Withdrawal>(WithdrawDialog, {
      data: edition,
      autoFocus: 'textarea',
    });
    this.run(
      opened.afterClosed().pipe(
        filter((withdrawal) => withdrawal !== undefined),
        switchMap((withdrawal) => this.editions.withdraw(edition.id, withdrawal)),
      ),
    );
  }

  private agreed(answer: Observable<boolean>, act: () => Observable<Edition>): void {
    this.run(
      answer.pipe(
        filter((yes) => yes),
        switchMap(() => act()),
      ),
    );
  }

  private run(changed: Observable<Edition>): void {
    this.problem.set(undefined);
    changed
      .pipe(
        map((edition) => this.took(edition)),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe({ error: (error: unknown) => this.problem.set(problemOf(error)) });
  }

  private took(edition: Edition): void {
    this.edition.set(edition);
    this.estimator.reload();
    this.announcer.say(`Edition ${edition.number} is ${EDITION_STAMPS[edition.state].word.toLowerCase()}.`);
  }
}
