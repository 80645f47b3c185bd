import { DOCUMENT } from '@angular/common';
import { Component, computed, inject, input, linkedSignal, output } from '@angular/core';
import { FormsModule } from '@angular/forms';
import { catchError, of } from 'rxjs';
import type { Estimator, KeyIssued } from '../api/contract';
import { EditionsClient } from '../api/editions-client';
import { EstimatorsClient } from '../api/estimators-client';
import { everyItem } from '../api/page';
import { DESK_ROLES } from '../api/roles';
import { SessionStore } from '../api/session-store';
import { CopyText } from '../ui/copy-text';
import { Field, FieldInput } from '../ui/field';
import { FocusHere } from '../ui/focus-here';
import { load } from '../ui/load';
import { embedMarkup, estimateCommand, listCommand } from './key-snippets';
import { typicalInputs } from './typical-inputs';

/** An estimator that the key may call, as far as it is known. */
type Callable = Pick<Estimator, 'slug' | 'name'> & Partial<Pick<Estimator, 'inForce'>>;

/** The one look at a key just issued, with what to paste where. */
@Component({
  selector: 'tb-issued-key',
  imports: [CopyText, Field, FieldInput, FocusHere, FormsModule],
  templateUrl: './issued-key.html',
  styleUrl: './issued-key.scss',
})
export class IssuedKey {
  private readonly estimatorsClient = inject(EstimatorsClient);
  private readonly editions = inject(EditionsClient);
  private readonly session = inject(SessionStore);
  private readonly service = inject(DOCUMENT).location.origin;

  readonly issued = input.required<KeyIssued>();
  readonly done = output();

  private readonly list = load(() => everyItem((page) => this.estimatorsClient.list(page)));
  /** Those that the key may call. The key itself is what matters here: of a list that cannot be read, the chosen ones stay. */
  protected readonly estimators = computed<readonly Callable[]>(() => {
    const scope = this.issued().details.estimators;
    const listed = this.list.value() ?? [];
    return scope === 'all'
      ? listed
      : scope.map((slug) => listed.find((estimator) => estimator.slug === slug) ?? { slug, name: slug });
  });
  protected readonly slug = linkedSignal(() => this.estimators()[0]?.slug);
  protected readonly isEmbed = computed(() => this.issued().details.kind === 'embed');

  private readonly place = computed(() => ({ service: this.service, key: this.issued().key }));
  private readonly editionId = computed(() => this.estimators().find(({ slug }) => slug === this.slug())?.inForce?.id);
  /** Undefined for a partner's developer, who may not read editions, and where reading fails: the list command serves. */
  private readonly edition = load(() => {
    const id = this.editionId();
    const wanted = id !== undefined && !this.isEmbed() && this.session.holds(...DESK_ROLES);
    return wanted ? this.editions.read(id).pipe(catchError(() => of(null))) : of(null);
  });

  protected readonly listCommand = computed(() => listCommand(this.place()));
  protected readonly estimateCommand = computed(() => {
    const slug = this.slug();
    const edition = this.edition.value();
    return slug && edition ? estimateCommand(this.place(), slug, typicalInputs(edition.inputSchema)) : undefined;
  });
  protected readonly markup = computed(() => {
    const slug = this.slug();
    return slug === undefined ? undefined : embedMarkup(this.place(), slug);
  });
}
