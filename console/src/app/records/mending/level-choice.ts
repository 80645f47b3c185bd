import { Component, computed, input, output } from '@angular/core';
import { ChoiceGroup } from '../../ui/choice-group';
import type { Complaints } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import { CountPipe } from '../../ui/figure-pipes';
import type { LevelCount } from './levels-at';
import { mappedLevels, type StepField } from './read-step';
import type { StepDraft } from './step-draft';

let choiceCount = 0;

/** Ticks levels of a category and says what they become. */
@Component({
  selector: 'tb-level-choice',
  imports: [ChoiceGroup, CountPipe, Field, FieldInput],
  templateUrl: './level-choice.html',
  styleUrl: './level-choice.scss',
})
export class LevelChoice {
  readonly draft = input.required<StepDraft>();
  /** As far as they are known; undefined where they are not. */
  readonly levels = input.required<readonly LevelCount[] | undefined>();
  /** Whether the column has more levels than are listed. */
  readonly more = input(false);
  readonly complaints = input.required<Complaints<StepField>>();
  readonly changed = output<Partial<StepDraft>>();

  protected readonly listId = `tb-level-choice-${++choiceCount}`;
  protected readonly mapped = computed(() => Object.entries(this.draft().levels));
  /** Ticked levels that are not listed were typed in. */
  protected readonly offered = computed<readonly { readonly value: string; readonly count?: number }[]>(() => {
    const { levels, ticked } = this.draft();
    const listed = (this.levels() ?? []).filter(({ value }) => !Object.hasOwn(levels, value));
    const typed = ticked.filter((level) => !listed.some(({ value }) => value === level));
    return [...listed, ...typed.map((value) => ({ value }))];
  });

  protected toggle(level: string): void {
    const { ticked } = this.draft();
    this.changed.emit({
      ticked: ticked.includes(level) ? ticked.filter((other) => other !== level) : [...ticked, level],
    });
  }

  protected tickTyped(control: HTMLInputElement): void {
    const level = control.value;
    const { ticked } = this.draft();
    if (level.trim() !== '' && !ticked.includes(level)) this.changed.emit({ ticked: [...ticked, level] });
    control.value = '';
  }

  /** Puts what is ticked with what was mapped before, and makes room for another target. */
  protected mapTicked(): void {
    this.changed.emit({ levels: mappedLevels(this.draft()), ticked: [], target: '' });
  }

  protected unmap(level: string): void {
    const { [level]: _, ...levels } = this.draft().levels;
    this.changed.emit({ levels });
  }
}
