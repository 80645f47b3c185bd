/** The outside world's time, passed in so that tests can set it. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };

/** The one form in which times are stored and answered: ISO 8601, UTC, milliseconds. */
export const timeText = (clock: Clock): string => clock.now().toISOString();
