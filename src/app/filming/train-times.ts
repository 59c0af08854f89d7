import { dayAndTime } from '../shared/times/time-words';
import type { Now } from '../shared/take-words/take-words';
import { instantOfWall, wallTime } from '../shared/times/wall-time';

/** A quick choice of when the lift is trained. `at` is null for no rush. */
export interface TrainChoice {
  value: string;
  label: string;
  at: string | null;
}

const DAY_MS = 86_400_000;
const EVENING = '18:00';
/** Later than this before the evening's hour there is no answer to be hoped for any more. */
const EVENING_NOTICE_MS = 60 * 60_000;

function atWall(dayMs: number, clock: string, zone: string): string {
  return new Date(instantOfWall(`${wallTime(dayMs, zone).slice(0, 10)}T${clock}`, zone)).toISOString();
}

/** The quick choices: this evening while it is far enough off, tomorrow, the assignment's own time, no rush. */
export function trainChoices(trainAt: string | null, { nowMs, zone }: Now): TrainChoice[] {
  const evening = atWall(nowMs, EVENING, zone);
  const tomorrow = atWall(nowMs + DAY_MS, EVENING, zone);
  const choices: TrainChoice[] = [];
  if (Date.parse(evening) - nowMs > EVENING_NOTICE_MS) {
    choices.push({ value: evening, label: `today ${EVENING}`, at: evening });
  }
  choices.push({ value: tomorrow, label: 'tomorrow', at: tomorrow });
  const isAhead = trainAt !== null && Date.parse(trainAt) > nowMs;
  if (isAhead && !choices.some(({ at }) => at !== null && Date.parse(at) === Date.parse(trainAt))) {
    choices.push({ value: trainAt, label: dayAndTime(Date.parse(trainAt), nowMs, zone), at: trainAt });
  }
  choices.push({ value: 'no-rush', label: 'no rush', at: null });
  return choices;
}
