/** The present, so that rules about time can be tried at any instant. */
export interface Clock {
  now(): Date;
}

export const systemClock: Clock = { now: () => new Date() };
