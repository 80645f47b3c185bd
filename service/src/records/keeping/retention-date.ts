import { DeskError } from '../../errors';

/** `pointer` says where the date stands in the request. */
export function requireNotPast(retainUntil: string, today: string, pointer: string): void {
  if (retainUntil >= today) return;
  throw new DeskError(
    'request-invalid',
    `Choose today (${today}) or a later day as the last on which the rows are kept.`,
    { errors: [{ pointer, detail: 'lies in the past' }] },
  );
}
