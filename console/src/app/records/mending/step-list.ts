import { CdkDrag, CdkDragDrop, CdkDragHandle, CdkDropList } from '@angular/cdk/drag-drop';
import {
  Component,
  ElementRef,
  Injector,
  afterNextRender,
  computed,
  inject,
  input,
  model,
  output,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import type { MendStep, RecordRevision } from '../../api/contract';
import { Announcer } from '../../ui/announcer';
import { StepForm } from './step-form';
import { rowsOfSteps, type StepRow } from './step-rows';
import { nameOfStep } from './step-words';
import { moved, replaced, without, type Steps } from './steps-history';
import type { Outlook } from './trials';

/** The steps in order, each with what it does; moved by dragging or by buttons, changed in place, or removed. */
@Component({
  selector: 'tb-step-list',
  imports: [CdkDrag, CdkDragHandle, CdkDropList, RouterLink, StepForm],
  templateUrl: './step-list.html',
  styleUrl: './step-list.scss',
})
export class StepList {
  private readonly announcer = inject(Announcer);
  private readonly injector = inject(Injector);
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  readonly revision = input.required<RecordRevision>();
  readonly steps = input.required<Steps>();
  /** What came out of the steps that were tried last, and which steps those were. */
  readonly tried = input<{ readonly steps: Steps; readonly outlook: Outlook }>();
  /** The step that is being changed. */
  readonly editing = model<MendStep>();
  readonly changed = output<Steps>();

  protected readonly rows = computed<readonly StepRow[]>(() => rowsOfSteps(this.steps(), this.tried()));

  protected before(index: number): Steps {
    return this.steps().slice(0, index);
  }

  protected drop({ previousIndex, currentIndex }: CdkDragDrop<unknown>): void {
    if (previousIndex !== currentIndex) this.put(previousIndex, currentIndex);
  }

  protected move(from: number, to: number, button: 'up' | 'down'): void {
    if (to < 0 || to >= this.steps().length) return;
    this.put(from, to);
    this.focusLater(`li:nth-child(${to + 1}) .${button}`);
  }

  protected remove(index: number): void {
    const name = nameOfStep(this.steps()[index]);
    this.changed.emit(without(this.steps(), index));
    this.announcer.say(`Step ${index + 1}, ${name}, was removed. Undo brings it back.`);
    this.focusLater(`li:nth-child(${Math.min(index + 1, this.steps().length - 1)}) .remove`);
  }

  protected replace(index: number, step: MendStep): void {
    this.changed.emit(replaced(this.steps(), index, step));
    this.close(index);
  }

  protected close(index: number): void {
    this.editing.set(undefined);
    this.focusLater(`li:nth-child(${index + 1}) .change`);
  }

  private put(from: number, to: number): void {
    this.changed.emit(moved(this.steps(), from, to));
    this.announcer.say(`Step ${from + 1} is now step ${to + 1} of ${this.steps().length}.`);
  }

  /** A step that moves takes its buttons along, and the browser loses the focus on the way. */
  private focusLater(selector: string): void {
    const focus = (): void => this.element.querySelector<HTMLElement>(selector)?.focus();
    afterNextRender({ read: focus }, { injector: this.injector });
  }
}
