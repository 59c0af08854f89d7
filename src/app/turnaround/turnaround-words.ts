import type { TurnaroundDto } from '@contract';
import { durationWords } from '../shared/times/time-words';

type Kept = TurnaroundDto['kept'];

const HOUR_MS = 3_600_000;
/** Under this many, one take more or less moves a share by five points and more, so the counts are said instead. */
const FEW = 20;

/** Hours as people say them: `5 h 10 min`. */
export function lengthWords(hours: number): string {
  return durationWords(Math.round(hours * 60) * 60_000);
}

/** Hours for a table's cell; a dash where half were not answered. */
export function lengthCell(hours: number | null): string {
  return hours === null ? '–' : lengthWords(hours);
}

function counted(count: number, one: string, many: string): string {
  return `${count} ${count === 1 ? one : many}`;
}

function capital(sentence: string): string {
  return sentence.slice(0, 1).toUpperCase() + sentence.slice(1);
}

/** How many of a hundred; never 100 % or 0 % while there is an exception. */
export function percentWords(share: number): string {
  const percent = Math.round(share * 100);
  if (percent === 100 && share < 1) return 'over 99 %';
  if (percent === 0 && share > 0) return 'under 1 %';
  return `${percent} %`;
}

/** The promise in few words: a share, or the counts where they are small, or a dash. */
export function keptCell({ share, kept, broken }: Kept): string {
  const decided = kept + broken;
  if (share === null || decided === 0) return '–';
  const counts = `${kept} of ${decided}`;
  return decided < FEW ? counts : `${percentWords(share)} (${counts})`;
}

/**
 * The range that the true share lies in, 19 times of 20, by Wilson's score interval (E. B. Wilson 1927); as it is said.
 * Null where none is decided.
 */
export function keptRange({ kept, broken }: Kept): string | null {
  const n = kept + broken;
  if (n === 0) return null;
  const z = 1.959964;
  const p = kept / n;
  const middle = p + z ** 2 / (2 * n);
  const half = z * Math.sqrt((p * (1 - p)) / n + z ** 2 / (4 * n ** 2));
  const low = Math.max(0, (middle - half) / (1 + z ** 2 / n));
  const high = Math.min(1, (middle + half) / (1 + z ** 2 / n));
  return `${Math.round(low * 100)} to ${Math.round(high * 100)} %`;
}

function halfWords({ answered, median }: TurnaroundDto): string {
  if (median.hours !== null) return `half of members hear within ${lengthWords(median.hours)}`;
  return answered === 0 ? 'nobody has had an answer yet' : 'fewer than half have had an answer so far';
}

function keptWords({ kept }: TurnaroundDto): string {
  const decided = kept.kept + kept.broken;
  if (kept.share === null || decided === 0) return '';
  return decided < FEW
    ? `the promise was kept ${kept.kept} of ${counted(decided, 'time', 'times')}`
    : `the promise was kept for ${percentWords(kept.share)}`;
}

function waitingWords({ waiting, aging }: TurnaroundDto): string {
  if (waiting === 0) return 'nobody is waiting';
  const oldest = Math.max(...aging.map(({ waitedHours }) => waitedHours));
  const count = `${waiting} ${waiting === 1 ? 'is' : 'are'} waiting`;
  if (aging.length === 0) return count;
  return waiting === 1
    ? `1 is waiting, for ${lengthWords(oldest)}`
    : `${count}, the oldest ${lengthWords(oldest)}`;
}

/** How things stand in one sentence, before any number. */
export function standWords(figures: TurnaroundDto): string {
  const said = [halfWords(figures), keptWords(figures), waitingWords(figures)].filter(Boolean).join('; ');
  return `${capital(said)}.`;
}

/** What to hold against the numbers, a sentence each. */
export function cautions(figures: TurnaroundDto, isOneCoach: boolean): string[] {
  const { answered, median, withdrawn } = figures;
  const said: string[] = [];
  if (answered > 0 && answered < FEW) {
    said.push(
      `Only ${counted(answered, 'take has', 'takes have')} been answered in this time. A few more could change these numbers a lot.`,
    );
  }
  if (answered > 0 && median.hours === null) {
    said.push('Fewer than half have an answer, so there is no middle to tell yet.');
  }
  if (isOneCoach) {
    said.push('Takes that still wait are nobody’s yet and are not counted for a coach.');
  }
  if (withdrawn > 0) {
    said.push(
      `${counted(withdrawn, 'take was', 'takes were')} taken back by the member; the wait counts until then, the promise does not.`,
    );
  }
  return said;
}

/** The limits of the middle, as they are said; null where neither is reached. */
export function medianRange({ median: { low, high } }: TurnaroundDto): string | null {
  if (low !== null && high !== null) return `${lengthWords(low)} to ${lengthWords(high)}`;
  if (low !== null) return `${lengthWords(low)} or more`;
  return high === null ? null : `up to ${lengthWords(high)}`;
}

/** The curve in words, for those who do not see it. */
export function curveWords(curve: TurnaroundDto['curve']): string {
  const marks = [1, 4, 8, 24, 48]
    .map((hours) => ({ hours, step: curve.filter((one) => one.hours <= hours).at(-1) }))
    .filter(({ hours }) => hours <= (curve.at(-1)?.hours ?? 0))
    .map(({ hours, step }) => `${percentWords(1 - (step?.waitingShare ?? 1))} within ${hours} h`);
  return marks.length === 0
    ? 'The share that has an answer, by hours since it was sent.'
    : `The share that has an answer, by hours since it was sent: ${marks.join(', ')}.`;
}

/** A whole number of hours the curve's axis reaches to. */
export function curveEndHours(curve: TurnaroundDto['curve']): number {
  return Math.max(1, Math.ceil(curve.at(-1)?.hours ?? 1));
}

/** Takes by weekday and four hours of the day, summed from the hours. */
export function weekBlocks(week: TurnaroundDto['week']): { submitted: number; broken: number }[][] {
  return week.map((day) =>
    Array.from({ length: 6 }, (_block, b) =>
      day
        .slice(b * 4, b * 4 + 4)
        .reduce(
          (sum, hour) => ({ submitted: sum.submitted + hour.submitted, broken: sum.broken + hour.broken }),
          { submitted: 0, broken: 0 },
        ),
    ),
  );
}

/** The days of a week as they are said: `23–29 Nov`. */
export function weekWords(weekStart: string): string {
  const first = Date.parse(`${weekStart}T00:00:00Z`);
  const format = new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', day: 'numeric', month: 'short' });
  return format.formatRange(first, first + 6 * 24 * HOUR_MS).replace(/\u2009/g, '');
}

/** A calendar day as it is said: `3 Dec 2026`. */
export function dayWords(day: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    timeZone: 'UTC',
    day: 'numeric',
    month: 'short',
    year: 'numeric',
  }).format(Date.parse(`${day}T00:00:00Z`));
}
