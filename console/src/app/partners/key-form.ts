import { Component, computed, inject, input, output, signal } from '@angular/core';
import { FormsModule } from '@angular/forms';
import type { KeyIssued, KeyKind } from '../api/contract';
import { EstimatorsClient } from '../api/estimators-client';
import { KeysClient } from '../api/keys-client';
import { everyItem } from '../api/page';
import { ChoiceGroup } from '../ui/choice-group';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { FocusHere } from '../ui/focus-here';
import { load } from '../ui/load';
import { ProblemNotice } from '../ui/problem-notice';
import { EMPTY_KEY_DRAFT, KeyDraft, KeyField, keyComplaints, keyOf } from './key-draft';
import { KEY_KIND_MEANINGS, KEY_KIND_NAMES } from './key-words';

@Component({
  selector: 'tb-key-form',
  imports: [ChoiceGroup, Field, FieldInput, FocusHere, FormsModule, ProblemNotice],
  templateUrl: './key-form.html',
  styleUrl: './key-form.scss',
})
export class KeyForm {
  private readonly keys = inject(KeysClient);
  private readonly estimatorsClient = inject(EstimatorsClient);

  readonly partnerId = input.required<string>();
  readonly siteCount = input.required<number>();
  readonly issued = output<KeyIssued>();
  readonly cancelled = output();

  protected readonly kinds: readonly KeyKind[] = ['partner', 'embed'];
  protected readonly kindNames = KEY_KIND_NAMES;
  protected readonly kindMeanings = KEY_KIND_MEANINGS;

  protected readonly form = new EntryForm<KeyField>();
  protected readonly draft = signal<KeyDraft>(EMPTY_KEY_DRAFT);
  protected readonly estimators = load(() => everyItem((page) => this.estimatorsClient.list(page)));
  protected readonly needsSite = computed(() => this.draft().kind === 'embed' && this.siteCount() === 0);

  protected change(change: Partial<KeyDraft>): void {
    this.draft.update((draft) => ({ ...draft, ...change }));
  }

  protected choose(slug: string, chosen: boolean): void {
    const others = this.draft().chosen.filter((kept) => kept !== slug);
    this.change({ chosen: chosen ? [...others, slug] : others });
  }

  protected submit(): void {
    const key = keyOf(this.draft());
    if (!this.form.accept(keyComplaints(this.draft(), new Date())) || key === undefined) return;
    this.form.send(this.keys.issue(this.partnerId(), key), (issued) => this.issued.emit(issued));
  }
}
