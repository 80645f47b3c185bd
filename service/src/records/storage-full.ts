import { DeskError } from '../errors';

/** No space left, over the quota, and SQLite's word for either. */
const fullCodes: readonly unknown[] = ['ENOSPC', 'EDQUOT', 'SQLITE_FULL'];

/** An error that says that the disk is full, as ours; every other one as it is. A thread's errors keep their code. */
export function translateFullDisk(error: unknown): unknown {
  if (!fullCodes.includes((error as { readonly code?: unknown } | null)?.code)) return error;
  return new DeskError(
    'storage-full',
    'The service’s disk is full. Nothing was kept of this. Ask whoever runs the service to make room, then try again.',
    { cause: error },
  );
}
