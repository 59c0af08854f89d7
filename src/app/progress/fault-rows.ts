import type { MarkDto, ProgressDto } from '@contract';

type LiftProgress = ProgressDto['lifts'][number];

/** What became of a fault over the takes on which it could be told; a hidden mark tells nothing. */
export type Trend = 'gone' | 'still-seen' | 'came-back' | 'never-seen' | 'cannot-tell';

/** One fault through the takes, oldest first; null where it was not marked. */
export interface FaultRow {
  faultId: string;
  name: string;
  marks: (MarkDto['mark'] | null)[];
  trend: Trend;
}

/** What a row of marks says. */
export function trendOf(marks: readonly (MarkDto['mark'] | null)[]): Trend {
  const told = marks.filter((mark) => mark === 'seen' || mark === 'clear');
  const last = told.at(-1);
  if (last === undefined) return 'cannot-tell';
  if (!told.includes('seen')) return 'never-seen';
  if (last === 'clear') return 'gone';
  const firstSeen = told.indexOf('seen');
  return told.indexOf('clear', firstSeen) > firstSeen ? 'came-back' : 'still-seen';
}

const TREND_WORDS: Record<Trend, string> = {
  gone: 'gone',
  'still-seen': 'still seen',
  'came-back': 'came back',
  'never-seen': 'never seen',
  'cannot-tell': 'can’t tell',
};

export function trendWords(trend: Trend): string {
  return TREND_WORDS[trend];
}

/** The faults of a lift that were marked on any of its takes, in the order of its checklist. */
export function faultRows({ lift, takes }: LiftProgress): FaultRow[] {
  return lift.faults.flatMap((fault) => {
    const marks = takes.map(({ marks }) => marks.find(({ faultId }) => faultId === fault.id)?.mark ?? null);
    if (marks.every((mark) => mark === null)) return [];
    return [{ faultId: fault.id, name: fault.name, marks, trend: trendOf(marks) }];
  });
}

const COUNT_WORDS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine'];
const countWord = (many: number): string => COUNT_WORDS[many] ?? String(many);

/** The sentence at the head of the page. `whose` is null on a member's own page. */
export function progressHeading(progress: ProgressDto, whose: string | null): string {
  const trends = progress.lifts.flatMap((lift) => faultRows(lift).map(({ trend }) => trend));
  const gone = trends.filter((trend) => trend === 'gone').length;
  const left = trends.filter((trend) => trend === 'still-seen' || trend === 'came-back').length;
  const name = whose === null ? '' : `${whose}: `;
  const start = (words: string): string =>
    name + (name ? words : words.charAt(0).toUpperCase() + words.slice(1));
  const count = (many: number): string => `${countWord(many)} fault${many === 1 ? '' : 's'}`;
  if (gone > 0 && left > 0) return start(`${count(gone)} gone, ${countWord(left)} still to go.`);
  if (gone > 0) return start(`${count(gone)} gone, none left to see.`);
  if (left > 0) return start(`${count(left)} to work on.`);
  const takes = progress.lifts.reduce((sum, lift) => sum + lift.takes.length, 0);
  if (takes === 0) return start('nothing filmed yet.');
  return start(`${countWord(takes)} ${takes === 1 ? 'take' : 'takes'} filmed, no fault seen.`);
}
