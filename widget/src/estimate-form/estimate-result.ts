import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  input,
  signal,
  ViewEncapsulation,
} from '@angular/core';
import { BeamDiagram } from '../beam-diagram/beam-diagram';
import { IntervalBar } from '../interval-bar/interval-bar';
import { AnsweredCase, caseTexts, intervalSentence, plainText, referenceLine, valueText } from './answered-case';
import { printAlone } from './print-alone';

type Copying = 'not-yet' | 'copied' | 'refused';

/** The answer: the estimate, how far off it may be, what moved it, its flags, cautions, edition and reference. */
@Component({
  selector: 'tb-estimate-result',
  imports: [BeamDiagram, IntervalBar],
  templateUrl: './estimate-result.html',
  encapsulation: ViewEncapsulation.None,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EstimateResult {
  readonly answered = input.required<AnsweredCase>();
  readonly showBeam = input.required<boolean>();
  readonly headingLevel = input.required<number>();
  /** Whether the entries have been changed since. */
  readonly outdated = input.required<boolean>();
  readonly locale = input<string>();

  protected readonly estimate = computed(() => this.answered().estimate);
  protected readonly measured = computed(() => ({ value: this.estimate().value, ...this.estimate().interval }));
  protected readonly value = computed(() => valueText(this.estimate(), this.locale()));
  protected readonly interval = computed(() => intervalSentence(this.estimate(), this.locale()));
  protected readonly reference = computed(() => referenceLine(this.estimate(), this.locale()));
  protected readonly caseTexts = computed(() => caseTexts(this.answered(), this.locale()));
  protected readonly text = computed(() => plainText(this.answered(), this.locale()));
  protected readonly copying = signal<Copying>('not-yet');
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  constructor() {
    effect(() => {
      this.answered();
      this.copying.set('not-yet');
    });
  }

  /** The clipboard is closed to pages without TLS and to some frames; the text is then shown to be copied by hand. */
  protected async copy(): Promise<void> {
    try {
      await navigator.clipboard.writeText(this.text());
      this.copying.set('copied');
    } catch {
      this.copying.set('refused');
    }
  }

  protected print(): void {
    printAlone(this.host, `${this.answered().estimator.name}, ${this.estimate().id}`);
  }
}
