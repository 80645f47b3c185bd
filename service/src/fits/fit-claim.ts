import { hostname } from 'node:os';
import { newId } from '../database/new-id';
import type { ClaimableFit } from './fit-queue-store';

/** A claim that has said nothing for so long is taken up by another process. */
export const staleAfterMs = 30_000;

/** Names this process among those that share the database. */
export const newClaimName = (): string => `${hostname().slice(0, 30)}:${process.pid}:${newId()}`;

export interface ClaimView {
  readonly nowMs: number;
  /** Of this process. */
  readonly claimName: string;
  readonly isAlive: (processId: number) => boolean;
}

/** Waiting, gone stale, or left by a process of this machine that has ended. */
export function mayBeClaimed(fit: ClaimableFit, view: ClaimView): boolean {
  if (fit.state === 'queued') return true;
  if (fit.claimedBy === view.claimName) return false;
  if (fit.claimedBy === null || fit.claimedAt === null) return true;
  return view.nowMs - Date.parse(fit.claimedAt) > staleAfterMs || hasEnded(fit.claimedBy, view);
}

/** Known only of this machine's processes; a number that is in use again waits until its claim is stale. */
function hasEnded(claimName: string, view: ClaimView): boolean {
  const [host, processId] = claimName.split(':');
  return host === view.claimName.split(':')[0] && !view.isAlive(Number(processId));
}

/** Signal 0 asks only whether the process is there. */
export function isAlive(processId: number): boolean {
  try {
    process.kill(processId, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
