/** What decides a take's place in the queue. */
export interface QueuePlace {
  /** See {@link queueRank}. */
  readonly rank: number;
  readonly answerBy: Date;
  /** Sortable by time of making: of two due alike, the older comes first. */
  readonly id: string;
}

/** The moment by which a take should be answered: the earlier of when it is needed and the end of the promise. */
export function answerBy(neededBy: Date | null, promiseEnd: Date): Date {
  return neededBy && neededBy < promiseEnd ? neededBy : promiseEnd;
}

/** 0 when something hurts, which comes before all else; otherwise 1. */
export const queueRank = (hurts: boolean): number => (hurts ? 0 : 1);

/**
 * Pain first, then the earliest due (which keeps the worst lateness least; Jackson 1955), then the oldest.
 */
export function compareQueuePlaces(a: QueuePlace, b: QueuePlace): number {
  if (a.rank !== b.rank) return a.rank - b.rank;
  const due = a.answerBy.getTime() - b.answerBy.getTime();
  if (due !== 0) return due;
  return a.id < b.id ? -1 : a.id > b.id ? 1 : 0;
}
