import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  Injector,
  input,
  untracked,
  viewChild,
  ViewEncapsulation,
} from '@angular/core';
import { headingFrom, headingLevelFrom, localeFrom, switchFrom, textFrom } from '../element/attributes';
import { dispatchError, dispatchEstimate } from '../element/events';
import { EstimateResult } from './estimate-result';
import { FailureNotice } from './failure-notice';
import { announcementFor } from './form-announcement';
import { FormEntry } from './form-entry';
import { FormSession } from './form-session';

/** The form on a partner's page: reads the estimator, takes a case, asks, and shows the answer. */
@Component({
  selector: 'tb-estimate-form',
  imports: [EstimateResult, FailureNotice, FormEntry],
  providers: [FormSession],
  templateUrl: './estimate-form.html',
  styleUrls: ['./estimate-form.css', './form-entry.css', './estimate-result.css', '../beam-diagram/beam-diagram.css'],
  // Not `ShadowDom`: that keeps every root in a list for shared styles until the component is destroyed, and this one lives
  // as long as its element (element/retained-strategy.ts); the list would hold on to forms that the page has thrown away.
  encapsulation: ViewEncapsulation.ExperimentalIsolatedShadowDom,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EstimateForm {
  readonly estimator = input('', { transform: textFrom });
  readonly key = input('', { transform: textFrom });
  readonly service = input('', { transform: textFrom });
  readonly locale = input(undefined, { transform: localeFrom });
  readonly heading = input(null, { transform: headingFrom });
  readonly headingLevel = input(2, { transform: headingLevelFrom });
  readonly showBeam = input(true, { transform: switchFrom });

  protected readonly session = inject(FormSession);
  protected readonly numberLocale = computed(() => this.locale() ?? pageLocale(this.host));
  protected readonly wrong = computed(() => this.wrongEntries());
  protected readonly announcement = computed(() =>
    announcementFor(this.session.description(), this.session.answer(), this.numberLocale()),
  );
  protected readonly outdated = computed(() => {
    const answer = this.session.answer();
    return answer.state === 'answered' && answer.typed !== this.session.typed();
  });
  protected readonly entryId = entryId;

  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly wanted = computed(
    () => ({ estimator: this.estimator(), key: this.key(), service: this.service() }),
    {
      equal: (a, b) => a.estimator === b.estimator && a.key === b.key && a.service === b.service,
    },
  );
  private readonly summary = viewChild<ElementRef<HTMLElement>>('summary');
  private readonly resultPlace = viewChild<ElementRef<HTMLElement>>('resultPlace');
  private readonly injector = inject(Injector);

  constructor() {
    effect(() => {
      const wanted = this.wanted();
      untracked(() => void this.session.load(wanted));
    });
  }

  protected async submit(event: Event): Promise<void> {
    event.preventDefault();
    const outcome = await this.session.submit(this.wanted(), this.numberLocale());
    this.onceShown(() => {
      if (outcome.kind === 'answered') {
        this.resultPlace()?.nativeElement.scrollIntoView?.({ block: 'nearest' });
      } else if (outcome.kind !== 'not-asked') {
        this.summary()?.nativeElement.focus();
      }
    });
    if (outcome.kind === 'answered') {
      dispatchEstimate(this.host, outcome.answered);
    } else if (outcome.kind === 'failed') {
      dispatchError(this.host, outcome.error);
    }
  }

  /** A person asked for it, so a failure becomes an event; that of the first loading does not. */
  protected async retry(): Promise<void> {
    const error = await this.session.load(this.wanted());
    if (error) {
      dispatchError(this.host, error);
    }
  }

  protected goTo(id: string | null): void {
    if (id !== null) {
      this.host.shadowRoot?.getElementById(id)?.focus();
    }
  }

  private onceShown(act: () => void): void {
    afterNextRender({ mixedReadWrite: act }, { injector: this.injector });
  }

  private wrongEntries(): readonly { readonly id: string | null; readonly text: string }[] {
    const description = this.session.description();
    const errors = this.session.errors();
    const fields = description.state === 'ready' ? description.fields : [];
    return [
      ...fields.flatMap(({ name }, index) => (errors[name] ? [{ id: entryId(index), text: errors[name] }] : [])),
      ...this.session.caseErrors().map((text) => ({ id: null, text })),
    ];
  }
}

function entryId(index: number): string {
  return `entry-${index}`;
}

/** The language of the page around the element decides how numbers are written and read. */
function pageLocale(host: HTMLElement): string | undefined {
  return localeFrom(host.closest('[lang]')?.getAttribute('lang'));
}
