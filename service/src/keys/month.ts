import type { Clock } from '../clock';

/** The calendar month that quotas count in: UTC, as 2026-12. */
export const monthOf = (clock: Clock): string => clock.now().toISOString().slice(0, 7);

/** Until the next month begins. */
export function secondsLeftInMonth(clock: Clock): number {
  const now = clock.now();
  return Math.ceil((Date.UTC(now.getUTCFullYear(), now.getUTCMonth() + 1) - now.getTime()) / 1000);
}
