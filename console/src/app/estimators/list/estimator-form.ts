import { Component, OnInit, inject, input, output, signal } from '@angular/core';
import type { Estimator } from '../../api/contract';
import { EstimatorsClient } from '../../api/estimators-client';
import { EntryForm } from '../../ui/entry-form';
import { ProblemNotice } from '../../ui/problem-notice';
import { TextField } from '../fields/text-field';
import {
  EMPTY_DRAFT,
  complaintsAbout,
  draftOf,
  wordsOf,
  type EstimatorDraft,
  type EstimatorField,
} from './estimator-draft';
import { suggestSlug } from './suggest-slug';

const MOST_CAUTIONS = 20;

/** Names a new estimator, or changes the words of the one given. Its public name never changes: partners rely on it. */
@Component({
  selector: 'tb-estimator-form',
  imports: [ProblemNotice, TextField],
  templateUrl: './estimator-form.html',
  styleUrl: './estimator-form.scss',
})
export class EstimatorForm implements OnInit {
  private readonly estimators = inject(EstimatorsClient);

  readonly estimator = input<Estimator>();
  readonly saved = output<Estimator>();
  readonly cancelled = output();

  protected readonly form = new EntryForm<EstimatorField>();
  protected readonly draft = signal<EstimatorDraft>(EMPTY_DRAFT);
  protected readonly mostCautions = MOST_CAUTIONS;
  private readonly slugTyped = signal(false);

  ngOnInit(): void {
    const estimator = this.estimator();
    if (estimator) this.draft.set(draftOf(estimator));
  }

  protected change(change: Partial<EstimatorDraft>): void {
    this.draft.update((draft) => ({ ...draft, ...change }));
  }

  protected changeName(name: string): void {
    this.change(this.slugTyped() || this.estimator() ? { name } : { name, slug: suggestSlug(name) });
  }

  protected changeSlug(slug: string): void {
    this.slugTyped.set(slug !== '');
    this.change({ slug });
  }

  protected changeCaution(position: number, text: string): void {
    this.change({ cautions: this.draft().cautions.map((caution, at) => (at === position ? text : caution)) });
  }

  protected cautionError(position: number): string | undefined {
    return this.form.errorOf(`cautions/${position}`);
  }

  protected addCaution(): void {
    this.change({ cautions: [...this.draft().cautions, ''] });
  }

  protected removeCaution(position: number): void {
    this.change({ cautions: this.draft().cautions.filter((_, at) => at !== position) });
  }

  protected submit(event: Event): void {
    event.preventDefault();
    if (!this.form.accept(complaintsAbout(this.draft()))) return;
    const words = wordsOf(this.draft());
    const { slug, ...changes } = words;
    const request = this.estimator() ? this.estimators.change(slug, changes) : this.estimators.create(words);
    this.form.send(request, (answer) => this.saved.emit(answer));
  }
}
