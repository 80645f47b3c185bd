import { Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Estimator } from '../../api/contract';
import { EditionsClient } from '../../api/editions-client';
import { EstimatorsClient } from '../../api/estimators-client';
import { SessionStore } from '../../api/session-store';
import { Announcer } from '../../ui/announcer';
import { countOf, formatFigure } from '../../ui/figure';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { DayPipe } from '../../ui/moment-pipes';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { TryCase } from '../try/try-case';
import { editionStamp } from '../words/edition-stamp';
import { methodName } from '../words/method-words';
import { EditionsSection } from './editions-section';
import { EstimatesSection } from './estimates-section';
import { FitsSection } from './fits-section';
import { WordsSection } from './words-section';

/** One estimator: what is in force, and everything that led to it and came of it. */
@Component({
  selector: 'tb-estimator-page',
  imports: [
    DayPipe,
    EditionsSection,
    EstimatesSection,
    FitsSection,
    LoadingState,
    PageHead,
    ProblemNotice,
    RouterLink,
    Sheet,
    SheetSection,
    TryCase,
    WordsSection,
  ],
  templateUrl: './estimator-page.html',
  styleUrl: './estimator-page.scss',
})
export class EstimatorPage {
  private readonly estimators = inject(EstimatorsClient);
  private readonly editions = inject(EditionsClient);
  private readonly session = inject(SessionStore);
  private readonly announcer = inject(Announcer);

  readonly slug = input.required<string>();

  protected readonly estimator = load(() => this.estimators.read(this.slug()));
  private readonly inForceId = computed(() => this.estimator.value()?.inForce?.id);
  /** Read for its input schema, which the summary lacks. */
  protected readonly edition = load(() => {
    const id = this.inForceId();
    return id === undefined ? undefined : this.editions.read(id);
  });
  protected readonly heading = computed(() => {
    const { name, unit } = this.estimator.value() ?? { name: '', unit: '' };
    return unit ? `${name}, ${unit}` : name;
  });
  protected readonly inForce = computed(() => this.estimator.value()?.inForce ?? undefined);
  protected readonly stamp = computed(() => {
    const inForce = this.inForce();
    return inForce && editionStamp(inForce);
  });
  /** One line that says what answers: method, inputs, records and held-out error. */
  protected readonly summary = computed(() => {
    const edition = this.inForce();
    if (!edition) return '';
    const { method, inputCount, recordCount, rmse, unit } = edition;
    const error = formatFigure(rmse, { significant: 2, unit });
    return `${methodName(method)}, ${countOf(inputCount, 'input')}, ${countOf(recordCount, 'record')} · held-out error ${error}`;
  });
  protected readonly mayChange = computed(() => this.session.holds('analyst'));

  protected changed(estimator: Estimator): void {
    this.estimator.set(estimator);
    this.announcer.say(`The words of ${estimator.name} are changed`);
  }
}
