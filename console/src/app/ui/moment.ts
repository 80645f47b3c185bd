const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });
const SHORT_DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });
const TIME = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });
const CALENDAR_DAY = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
});

/** `3 November 2026`, in the reader's time zone. */
export function formatDay(iso: string): string {
  return DAY.format(new Date(iso));
}

/** `3 Nov 2026, 14:05`, in the reader's time zone. */
export function formatMoment(iso: string): string {
  const moment = new Date(iso);
  return `${SHORT_DAY.format(moment)}, ${TIME.format(moment)}`;
}

const MILLISECONDS_A_DAY = 86_400_000;

/** A recorded date, counted in days since 1970-01-01: a calendar day, so no time zone may shift it. */
export function formatRecordedDay(days: number): string {
  return CALENDAR_DAY.format(new Date(days * MILLISECONDS_A_DAY));
}

/** Days since 1970-01-01 of a day such as `2026-03-31`; NaN where there is no such day. */
export function daysOf(isoDay: string): number {
  return Date.parse(`${isoDay}T00:00:00Z`) / MILLISECONDS_A_DAY;
}

/** `2026-03-31`, of days since 1970-01-01. */
export function isoDayOf(days: number): string {
  return new Date(days * MILLISECONDS_A_DAY).toISOString().slice(0, 10);
}

/** `45 seconds`, `3 minutes`: rounded up, because coming back early is refused again. */
export function formatWait(seconds: number): string {
  if (seconds <= 60) return seconds === 1 ? '1 second' : `${seconds} seconds`;
  const minutes = Math.ceil(seconds / 60);
  return `${minutes} minutes`;
}
