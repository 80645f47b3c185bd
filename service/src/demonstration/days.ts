import type { Draws } from './draws';

const dayMs = 24 * 60 * 60 * 1000;

/** A day between two (ISO dates, both possible). */
export function drawDay(draws: Draws, first: string, last: string): string {
  const from = Date.parse(first);
  return new Date(from + dayMs * draws.whole(0, (Date.parse(last) - from) / dayMs)).toISOString().slice(0, 10);
}

/** October to February, when the yards' sheds are full. */
export function isWinter(day: string): boolean {
  const month = Number(day.slice(5, 7));
  return month >= 10 || month <= 2;
}
