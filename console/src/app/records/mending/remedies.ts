import type { MendStep } from '../../api/contract';
import { dropsRows, namesRows } from './step-rows';
import type { Steps } from './steps-history';

type DroppedRows = Extract<MendStep, { kind: 'drop-rows' }>;

/**
 * A remedy speaks of the revision as it stands: of its columns by their names, and often of its rows by number. So its
 * steps go before the first step of the list that renames, sets aside or drops. Steps already in the list are not
 * added twice. Undefined where rows to be dropped by number cannot be told any more, because later steps name rows too.
 */
export function withRemedy(list: Steps, remedy: Steps): Steps | undefined {
  return remedy.reduce<Steps | undefined>((steps, step) => steps && withStep(steps, step), list);
}

export function holdsRemedy(list: Steps, remedy: Steps): boolean {
  return remedy.every((step) => holds(list, step));
}

function withStep(list: Steps, step: MendStep): Steps | undefined {
  if (holds(list, step)) return list;
  // What is set aside is set aside last, unless its name would be another one by then.
  if (step.kind === 'set-aside' && !list.some(({ kind }) => kind === 'rename')) return [...list, step];
  const place = firstUnsettling(list);
  if (!dropsRows(step)) return inserted(list, place, step);
  const first = list[place];
  if (isListOfRows(step) && first !== undefined && isListOfRows(first))
    return replacedAt(list, place, joined(first, step));
  // Dropping rows shifts the numbers of those that later steps name.
  if (!list.slice(place).some(namesRows)) return inserted(list, place, step);
  return namesRows(step) ? undefined : [...list, step];
}

function holds(list: Steps, step: MendStep): boolean {
  const wanted = keyOf(step);
  if (list.some((other) => keyOf(other) === wanted)) return true;
  const first = list[firstUnsettling(list)];
  if (!isListOfRows(step) || first === undefined || !isListOfRows(first)) return false;
  const dropped = new Set(first.rows);
  return (step.rows ?? []).every((row) => dropped.has(row));
}

/** Where the table stops being that of the revision, row by row and name by name. */
function firstUnsettling(list: Steps): number {
  const found = list.findIndex((step) => dropsRows(step) || step.kind === 'rename' || step.kind === 'set-aside');
  return found < 0 ? list.length : found;
}

function isListOfRows(step: MendStep): step is DroppedRows {
  return step.kind === 'drop-rows' && step.rows !== undefined && step.where === undefined;
}

function joined(first: DroppedRows, second: DroppedRows): MendStep {
  const rows = [...new Set([...(first.rows ?? []), ...(second.rows ?? [])])].sort((a, b) => a - b);
  return { kind: 'drop-rows', rows };
}

function inserted(list: Steps, place: number, step: MendStep): Steps {
  return [...list.slice(0, place), step, ...list.slice(place)];
}

function replacedAt(list: Steps, place: number, step: MendStep): Steps {
  return list.map((other, index) => (index === place ? step : other));
}

/** Equal for steps with the same fields, whichever order they stand in. */
function keyOf(step: MendStep): string {
  return JSON.stringify(Object.entries(step).sort(([a], [b]) => (a < b ? -1 : 1)));
}
