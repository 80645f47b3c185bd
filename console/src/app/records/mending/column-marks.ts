import type { Steps } from './steps-history';
import type { StepEffect } from './trials';

/** What became of columns, by the names that they have after the steps that could be done. */
export function columnMarks(steps: Steps, effects: readonly StepEffect[]): ReadonlyMap<string, string> {
  const marks = new Map<string, string>();
  effects.forEach(({ rowsConcerned }, index) => {
    const step = steps[index];
    if (step.kind === 'derive') marks.set(step.name, 'new');
    if (!('column' in step)) return;
    const before = marks.get(step.column);
    if (step.kind === 'rename' || step.kind === 'set-aside') marks.delete(step.column);
    if (step.kind === 'rename') marks.set(step.to, before === 'new' ? before : 'new name');
    else if (step.kind !== 'set-aside' && rowsConcerned !== 0) marks.set(step.column, before ?? 'changed');
  });
  return marks;
}
