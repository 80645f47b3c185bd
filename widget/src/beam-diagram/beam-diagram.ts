import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  inject,
  input,
  signal,
  ViewEncapsulation,
} from '@angular/core';
import { FIGURE_SIZE, LABEL_SIZE } from './beam-boxes';
import { BEAM_PAINT } from './beam-colours';
import { BeamTable, CaseTexts } from './beam-table';
import { captionOf, describeBeam, wordsFor } from './beam-words';
import { BeamEvaluation } from './contribution';
import { layoutBeam } from './layout-beam';

export type BeamTablePlace = 'beside' | 'under' | 'folded' | 'none';

const DEFAULT_WIDTH = 480;
const WIDEST = 760;
let instances = 0;

/**
 * The beam diagram of one case, with its caption and its table. The picture paints itself by presentation attributes and
 * takes the page's font; only the table needs `beam-diagram.css`, which each program includes once.
 */
@Component({
  selector: 'tb-beam-diagram',
  imports: [BeamTable],
  templateUrl: './beam-diagram.html',
  encapsulation: ViewEncapsulation.None,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BeamDiagram {
  readonly evaluation = input.required<BeamEvaluation>();
  readonly caseTexts = input<CaseTexts | null>(null);
  readonly table = input<BeamTablePlace>('under');
  readonly locale = input<string>();
  /** Fixed width of the picture in pixels, for print; without it the picture is laid out for the room it has. */
  readonly width = input<number>();

  protected readonly paint = BEAM_PAINT;
  protected readonly figureSize = FIGURE_SIZE;
  protected readonly labelSize = LABEL_SIZE;
  protected readonly id = `tb-beam-${++instances}`;
  protected readonly words = computed(() => wordsFor(this.evaluation(), this.locale()));
  protected readonly layout = computed(() => {
    const { moves, farArm } = this.words();
    const width = this.width() ?? this.measuredWidth();
    return layoutBeam(this.evaluation().contributions, { width, figure: moves, farArm });
  });
  protected readonly description = computed(() => describeBeam(this.evaluation(), this.layout(), this.words()));
  protected readonly caption = computed(() => captionOf(this.evaluation(), this.layout(), this.words()));
  private readonly measuredWidth = signal(DEFAULT_WIDTH);

  constructor() {
    const host: HTMLElement = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    const destroyRef = inject(DestroyRef);
    afterNextRender(() => this.followWidth(host, destroyRef));
  }

  protected tickText(arm: number): string {
    return arm === 0 ? 'typical' : `${arm > 0 ? '+' : '−'}${Math.abs(arm)} SD`;
  }

  private followWidth(host: HTMLElement, destroyRef: DestroyRef): void {
    const frame = host.querySelector('.tb-beam-picture');
    if (!frame || typeof ResizeObserver === 'undefined') {
      return;
    }
    const observer = new ResizeObserver((entries) => {
      const width = Math.floor(entries[entries.length - 1].contentRect.width);
      if (width > 0) {
        this.measuredWidth.set(Math.min(WIDEST, width));
      }
    });
    observer.observe(frame);
    destroyRef.onDestroy(() => observer.disconnect());
  }
}
