import type { CoachingHours } from '@contract';

export type Weekday = keyof CoachingHours;

/** The days in the order of a week. Written here, because the contract's list would bring its schemas along. */
export const WEEKDAYS: readonly Weekday[] = ['mon', 'tue', 'wed', 'thu', 'fri', 'sat', 'sun'];

/** A span as it is being written: each end is whatever stands in its field. */
export interface DraftSpan {
  from: string;
  to: string;
}

export type DraftWeek = Readonly<Record<Weekday, readonly DraftSpan[]>>;

/** What is wrong with a span, beside the field it concerns. */
export interface SpanProblem {
  from?: string;
  to?: string;
}

export const MOST_SPANS = 4;

export const DAY_NAMES: Record<Weekday, string> = {
  mon: 'Monday',
  tue: 'Tuesday',
  wed: 'Wednesday',
  thu: 'Thursday',
  fri: 'Friday',
  sat: 'Saturday',
  sun: 'Sunday',
};

const NOT_A_TIME = 'Write a time as HH:MM, for instance 06:30.';
const DAY_END_MIN = 24 * 60;
/** A span that is added begins an hour after the one before, and is this long, minutes. */
const NEW_GAP_MIN = 60;
const NEW_LENGTH_MIN = 180;
const FIRST_FROM = '08:00';

/** A week with something made of every day. */
function eachDay<T>(make: (day: Weekday) => T): Record<Weekday, T> {
  return {
    mon: make('mon'),
    tue: make('tue'),
    wed: make('wed'),
    thu: make('thu'),
    fri: make('fri'),
    sat: make('sat'),
    sun: make('sun'),
  };
}

/** A time as people type it: `6`, `630`, `6.30`, `06:30`, `24`; as `HH:MM`, or null when it is none. */
export function readClock(written: string): string | null {
  const found = /^(\d{1,2})(?:[:.h ]?(\d{2}))?$/.exec(written.trim());
  if (!found) return null;
  const hours = Number(found[1]);
  const minutes = Number(found[2] ?? '0');
  if (minutes > 59 || hours > 24 || (hours === 24 && minutes > 0)) return null;
  return writeClock(hours * 60 + minutes);
}

function minutesOf(clock: string): number {
  const [hours = 0, minutes = 0] = clock.split(':').map(Number);
  return hours * 60 + minutes;
}

function writeClock(minutes: number): string {
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${two(Math.floor(minutes / 60))}:${two(minutes % 60)}`;
}

export function draftOf(hours: CoachingHours): DraftWeek {
  return eachDay((day) => hours[day].map(({ from, to }) => ({ from, to })));
}

/** What is wrong with each span of a day, in their order; an empty object where nothing is. */
export function spanProblems(spans: readonly DraftSpan[]): SpanProblem[] {
  return spans.map((span, i) => {
    const from = readClock(span.from);
    const to = readClock(span.to);
    const before = readClock(spans[i - 1]?.to ?? '');
    const problem: SpanProblem = {};
    if (from === null || from === '24:00') problem.from = NOT_A_TIME;
    else if (before !== null && from < before) {
      problem.from = `Starts before the span above ends (${before}). Spans of a day must not overlap.`;
    }
    if (to === null) problem.to = NOT_A_TIME;
    else if (from !== null && to <= from) {
      problem.to = 'The end must be after the start. Midnight is 24:00.';
    }
    return problem;
  });
}

/** The hours as they are sent, or null while anything is wrong: a span, or a week without any. */
export function readWeek(week: DraftWeek): CoachingHours | null {
  const isWrong = WEEKDAYS.some((day) => spanProblems(week[day]).some(({ from, to }) => from ?? to));
  if (isWrong || isClosed(week)) return null;
  return eachDay((day) =>
    week[day].map(({ from, to }) => ({ from: readClock(from) ?? from, to: readClock(to) ?? to })),
  );
}

/** Whether no day has a span; promises could then never come due. */
export function isClosed(week: DraftWeek): boolean {
  return WEEKDAYS.every((day) => week[day].length === 0);
}

/** The day with one span more, after those it has. */
export function withSpan(spans: readonly DraftSpan[]): DraftSpan[] {
  const last = readClock(spans.at(-1)?.to ?? '');
  if (spans.length === 0) return [{ from: FIRST_FROM, to: '18:00' }];
  if (last === null) return [...spans, { from: '', to: '' }];
  const from = minutesOf(last) + NEW_GAP_MIN;
  if (from >= DAY_END_MIN) return [...spans, { from: '', to: '' }];
  const to = Math.min(from + NEW_LENGTH_MIN, DAY_END_MIN);
  return [...spans, { from: writeClock(from), to: writeClock(to) }];
}

/** The week with one day's spans on other days too. */
export function copied(week: DraftWeek, from: Weekday, to: readonly Weekday[]): DraftWeek {
  return eachDay((day) => (to.includes(day) ? week[from].map((span) => ({ ...span })) : week[day]));
}

/** How long a week coaches, in hours; spans that cannot be read yet count nothing. */
export function weekLengthHours(week: DraftWeek): number {
  const minutes = WEEKDAYS.flatMap((day) => week[day]).reduce((sum, span) => {
    const from = readClock(span.from);
    const to = readClock(span.to);
    return from === null || to === null ? sum : sum + Math.max(0, minutesOf(to) - minutesOf(from));
  }, 0);
  return minutes / 60;
}

/** A number of hours without needless digits: `7.5 h`. */
export function hoursWords(hours: number): string {
  return `${Number(hours.toFixed(2))} h`;
}
