import { dayAndTime } from '../shared/times/time-words';
import type { Now } from '../shared/take-words/take-words';

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

const PARTS: Intl.DateTimeFormatOptions = {
  year: 'numeric',
  month: '2-digit',
  day: '2-digit',
  hour: '2-digit',
  minute: '2-digit',
  hourCycle: 'h23',
};

/** An instant on a zone's wall clock as a date-and-time field holds it: `2026-12-03T18:00`. */
export function wallTime(atMs: number, zone: string): string {
  const parts = new Intl.DateTimeFormat('en-CA', { ...PARTS, timeZone: zone }).formatToParts(atMs);
  const part = (type: Intl.DateTimeFormatPartTypes): string =>
    parts.find((each) => each.type === type)?.value ?? '';
  return `${part('year')}-${part('month')}-${part('day')}T${part('hour')}:${part('minute')}`;
}

/**
 * The instant at which a zone's wall clock shows `wall`, epoch ms; NaN when `wall` is no date and time. A time that
 * the clock skips becomes the one an hour later; of a time that comes twice, one of the two.
 */
export function instantOfWall(wall: string, zone: string): number {
  // Browsers read more than was meant as a date, so the form is checked first.
  if (!/^\d{4}-\d\d-\d\dT\d\d:\d\d$/.test(wall)) return Number.NaN;
  const asUtcMs = Date.parse(`${wall}:00Z`);
  if (Number.isNaN(asUtcMs)) return Number.NaN;
  const offsetAt = (atMs: number): number => Date.parse(`${wallTime(atMs, zone)}:00Z`) - atMs;
  const guessMs = asUtcMs - offsetAt(asUtcMs);
  return asUtcMs - offsetAt(guessMs);
}

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
