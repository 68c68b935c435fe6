/** The only source of time on the server. Injected, so that a test can move it. */
export interface Clock {
  /** ISO 8601, UTC, with milliseconds and Z: the form in which every time is stored and compared as text. */
  now(): string;
  /** Milliseconds since 1970, for arithmetic. */
  millis(): number;
}

export const systemClock: Clock = {
  now: () => new Date().toISOString(),
  millis: () => Date.now(),
};

export const SECOND = 1000;
export const MINUTE = 60 * SECOND;
export const HOUR = 60 * MINUTE;
export const DAY = 24 * HOUR;

/** The stored form of a moment some milliseconds away from another. */
export function later(iso: string, milliseconds: number): string {
  return new Date(Date.parse(iso) + milliseconds).toISOString();
}
