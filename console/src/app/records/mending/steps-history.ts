import { computed, signal } from '@angular/core';
import type { MendStep } from '../../api/contract';

export type Steps = readonly MendStep[];

interface History {
  readonly before: readonly Steps[];
  readonly now: Steps;
  readonly after: readonly Steps[];
}

/** The list of steps as it is edited, with every earlier list of this visit to go back to. */
export class StepsHistory {
  private readonly history = signal<History>({ before: [], now: [], after: [] });

  readonly steps = computed(() => this.history().now);
  readonly canUndo = computed(() => this.history().before.length > 0);
  readonly canRedo = computed(() => this.history().after.length > 0);

  /** Another list altogether: there is nothing to go back to. */
  begin(steps: Steps): void {
    this.history.set({ before: [], now: steps, after: [] });
  }

  change(steps: Steps): void {
    this.history.update(({ before, now }) => ({ before: [...before, now], now: steps, after: [] }));
  }

  undo(): void {
    this.history.update((history) => {
      const earlier = history.before.at(-1);
      if (!earlier) return history;
      return { before: history.before.slice(0, -1), now: earlier, after: [history.now, ...history.after] };
    });
  }

  redo(): void {
    this.history.update((history) => {
      const [later, ...after] = history.after;
      return later ? { before: [...history.before, history.now], now: later, after } : history;
    });
  }
}

export function moved(steps: Steps, from: number, to: number): Steps {
  const others = steps.filter((_, index) => index !== from);
  return [...others.slice(0, to), steps[from], ...others.slice(to)];
}

export function without(steps: Steps, index: number): Steps {
  return steps.filter((_, other) => other !== index);
}

export function replaced(steps: Steps, index: number, step: MendStep): Steps {
  return steps.map((other, at) => (at === index ? step : other));
}
