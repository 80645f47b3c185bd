import { Component, computed, inject, input, linkedSignal } from '@angular/core';
import type { RecordColumn } from '../../api/contract';
import { LookingClient } from '../../api/looking-client';
import { countOf } from '../../ui/figure';
import { Field, FieldInput } from '../../ui/field';
import { FocusHere } from '../../ui/focus-here';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { CorrelationMap, Pair } from '../../ui/plots/correlation-map';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { ProblemNotice } from '../../ui/problem-notice';
import { TableBox } from '../../ui/table-box';
import { correlationWords, pairable, pairsOf, strongestOf } from './pair-words';
import { PairsTable } from './pairs-table';
import { ScatterFigure } from './scatter-figure';

/** How the columns go together, worked out when asked for; a pair opens to its rows. */
@Component({
  selector: 'tb-pairs-section',
  imports: [
    CorrelationMap,
    Field,
    FieldInput,
    FigureFrame,
    FocusHere,
    LoadingState,
    PairsTable,
    PlotTableTemplate,
    PlotTemplate,
    ProblemNotice,
    ScatterFigure,
    TableBox,
  ],
  templateUrl: './pairs-section.html',
  styleUrl: './pairs-section.scss',
})
export class PairsSection {
  private readonly client = inject(LookingClient);

  readonly revisionId = input.required<string>();
  readonly columns = input.required<readonly RecordColumn[]>();

  protected readonly asked = linkedSignal({ source: () => this.revisionId(), computation: () => false });
  protected readonly chosen = linkedSignal<string, Partial<Pair>>({
    source: () => this.revisionId(),
    computation: () => ({}),
  });
  protected readonly choices = computed(() => pairable(this.columns()));
  protected readonly found = load(() => (this.asked() ? this.client.readCorrelations(this.revisionId()) : undefined));
  protected readonly pairs = computed(() => {
    const found = this.found.value();
    return found ? pairsOf(found) : [];
  });
  protected readonly description = computed(() => {
    const strongest = strongestOf(this.pairs());
    if (!strongest) return '';
    const closest = `${strongest.x} and ${strongest.y}, ${correlationWords(strongest.correlation)}`;
    return `${countOf(this.found.value()?.columns.length ?? 0, 'column')}; the two that go together most closely are ${closest}.`;
  });
  protected readonly leftOut = computed(() => this.found.value()?.leftOut ?? []);
  /** Both chosen, and not the same. */
  protected readonly pair = computed<Pair | undefined>(() => {
    const { x, y } = this.chosen();
    return x && y && x !== y ? { x, y } : undefined;
  });

  protected choose(change: Partial<Pair>): void {
    this.chosen.update((chosen) => ({ ...chosen, ...change }));
  }
}
