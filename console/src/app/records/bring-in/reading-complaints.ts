import type { ReadingChoices } from '../../api/contract';
import type { FieldError, Problem } from '../../api/problem';
import type { ChoicePlace } from './reading-choices';

/** What is wrong with each choice, in words, under its place. */
export type ChoiceComplaints = ReadonlyMap<string, string>;

/** The desk itself did not work: no choice is to blame. */
const NOBODYS_FAULT: readonly Problem['code'][] = ['unreachable', 'unreadable', 'internal', 'unavailable', 'not-found'];

/**
 * Complaints beside the choices that caused them. Where the service does not point at one, the choice that was changed
 * last is what it did not like.
 */
export function complaintsOf(
  problem: Problem | undefined,
  sent: ReadingChoices,
  lastChange: ChoicePlace | undefined,
): ChoiceComplaints {
  if (!problem) return new Map();
  const pointed = problem.errors.flatMap((error) => {
    const place = placeOf(error, sent);
    return place === undefined ? [] : [[place, error.detail] as const];
  });
  if (pointed.length > 0) return new Map(pointed);
  if (lastChange === undefined || NOBODYS_FAULT.includes(problem.code)) return new Map();
  return new Map([[lastChange, wordsOf(problem)]]);
}

function placeOf({ field }: FieldError, { columns = [] }: ReadingChoices): string | undefined {
  const [head, index, part] = field.replace(/^choices\//, '').split('/');
  if (head === '') return undefined;
  if (head !== 'columns') return head;
  const name = columns[Number(index)]?.name;
  return name === undefined ? undefined : `columns/${name}/${part ?? 'kind'}`;
}

function wordsOf({ title, detail, line }: Problem): string {
  const what = detail || title;
  return line === undefined || what.includes(`${line}`) ? what : `Line ${line} of the file: ${what}`;
}
