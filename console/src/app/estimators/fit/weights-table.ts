import { Component, computed, input, signal } from '@angular/core';
import type { SpecificationInput, Weight } from '../../api/contract';
import { formatFigure } from '../../ui/figure';
import { TableBox } from '../../ui/table-box';
import { readingWords } from '../words/reading-words';
import { droppedInputs, weightGroups, type WeightPart } from './weight-groups';

/** Longer tables open on the heaviest inputs. */
const SHOWN_AT_FIRST = 25;

/** Weights by input, in original units and standardised, a category's levels under their input. */
@Component({
  selector: 'tb-weights-table',
  imports: [TableBox],
  templateUrl: './weights-table.html',
  styleUrl: './weights-table.scss',
})
export class WeightsTable {
  readonly weights = input.required<readonly Weight[]>();
  readonly intercept = input<number>();
  /** What was asked of each input; transforms are named from it. */
  readonly inputs = input<readonly SpecificationInput[]>([]);
  /** Unit of the scale that the weights add on; empty on the log scale. */
  readonly scaleUnit = input.required<string>();

  protected readonly all = signal(false);
  private readonly groups = computed(() => weightGroups(this.weights()));
  protected readonly dropped = computed(() => droppedInputs(this.groups()));
  protected readonly kept = computed(() => this.groups().filter((group) => !this.dropped().includes(group.input)));
  protected readonly shown = computed(() => (this.all() ? this.kept() : this.kept().slice(0, SHOWN_AT_FIRST)));
  protected readonly hasErrors = computed(() =>
    this.weights().some((weight) => weight.standardError !== null && weight.standardError !== undefined),
  );
  private readonly largest = computed(() =>
    this.weights().reduce((most, weight) => Math.max(most, Math.abs(weight.standardised)), 0),
  );
  protected readonly interceptText = computed(() => formatFigure(this.intercept(), { significant: 4 }));

  protected transformOf(column: string): string {
    const words = readingWords(column, this.inputs());
    return words === column ? '' : words;
  }

  /** Digits by the standard error where there is one; four that count where not. */
  protected original(part: WeightPart): string {
    return formatFigure(part.value, part.standardError ? { uncertainty: part.standardError } : { significant: 4 });
  }

  /** All to the same place, which the largest decides, so that they can be compared down the column. */
  protected standardised(part: WeightPart): string {
    return formatFigure(part.standardised, { uncertainty: this.largest() / 20 || null, significant: 3 });
  }

  protected error(part: WeightPart): string {
    return formatFigure(part.standardError, { significant: 2 });
  }
}
