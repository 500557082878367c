/** What the server takes the time from; tests hand in one that they move. */
export type Clock = { now(): Date };

export const systemClock: Clock = { now: () => new Date() };

export const msPerMinute = 60_000;
export const msPerHour = 60 * msPerMinute;
export const msPerDay = 24 * msPerHour;

/** The moment `ms` milliseconds after now (before it, when negative). */
export function fromNow(clock: Clock, ms: number): Date {
  return new Date(clock.now().getTime() + ms);
}
