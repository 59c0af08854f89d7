import type { FaultDto, LiftDto, Pattern, Phase, ScaleDto } from '@contract';

// The contract's own lists are not taken in: they would bring its whole validation into the browser.

/** The patterns in the order in which the library shows them. */
export const PATTERN_ORDER = [
  'squat',
  'hinge',
  'lunge',
  'press',
  'pull',
  'brace',
] as const satisfies Pattern[];
/** The phases in the order of a rep. */
export const PHASE_ORDER = ['set-up', 'down', 'bottom', 'up', 'top', 'throughout'] as const satisfies Phase[];
/** The views that may show a fault best. */
export const FAULT_VIEW_ORDER = ['front', 'side', 'either'] as const satisfies FaultDto['view'][];
/** The levels of scales, from the easiest. */
export const LEVEL_ORDER = ['easier', 'same', 'harder'] as const satisfies ScaleDto['level'][];

const PHASE_HEADINGS: Record<Phase, string> = {
  'set-up': 'At the set-up',
  down: 'On the way down',
  bottom: 'At the bottom',
  up: 'On the way up',
  top: 'At the top',
  throughout: 'Throughout',
};
const LEVEL_HEADINGS: Record<ScaleDto['level'], string> = {
  easier: 'Easier',
  same: 'As hard',
  harder: 'Harder',
};
const VIEW_WORDS: Record<FaultDto['view'], string> = {
  front: 'from the front',
  side: 'from the side',
  either: 'from either view',
};

/** A group under its heading. */
export interface Group<T> {
  key: string;
  heading: string;
  items: T[];
}

function grouped<T, K extends string>(
  items: readonly T[],
  keys: readonly K[],
  keyOf: (item: T) => K,
  headingOf: (key: K) => string,
): Group<T>[] {
  return keys
    .map((key) => ({ key, heading: headingOf(key), items: items.filter((item) => keyOf(item) === key) }))
    .filter((group) => group.items.length > 0);
}

/** A word with its first letter as a capital. */
export function capital(word: string): string {
  return word.slice(0, 1).toUpperCase() + word.slice(1);
}

/** A lift's faults by phase, in the order of a rep; within a phase in the coach's own order. */
export function faultsByPhase(faults: readonly FaultDto[]): Group<FaultDto>[] {
  return grouped(
    faults,
    PHASE_ORDER,
    (fault) => fault.phase,
    (phase) => PHASE_HEADINGS[phase],
  );
}

/** A lift's scales by level, the easier ones first. */
export function scalesByLevel(scales: readonly ScaleDto[]): Group<ScaleDto>[] {
  return grouped(
    scales,
    LEVEL_ORDER,
    (scale) => scale.level,
    (level) => LEVEL_HEADINGS[level],
  );
}

/** Which view shows a fault best, as a phrase. */
export function viewWords(view: FaultDto['view']): string {
  return VIEW_WORDS[view];
}

/** The views of a brief as a phrase: `front and side`. */
export function viewsWords(brief: Pick<LiftDto['brief'], 'views'>): string {
  return brief.views.join(' and ');
}

/** A count with its word: `1 fault`, `8 faults`, `no faults`. */
export function countWords(count: number, word: string): string {
  if (count === 0) return `no ${word}s`;
  return count === 1 ? `1 ${word}` : `${count} ${word}s`;
}

/** Whether every word that was searched for begins some word of the lift: its name, pattern, faults or scales. */
export function matchesSearch(lift: LiftDto, search: string): boolean {
  const text = [
    lift.name,
    lift.pattern,
    ...lift.faults.map((fault) => fault.name),
    ...lift.scales.map((scale) => scale.name),
  ]
    .join(' ')
    .toLocaleLowerCase();
  const words = text.split(/[\s,.;:()/-]+/);
  return search
    .toLocaleLowerCase()
    .split(/[\s,.;:()/-]+/)
    .filter(Boolean)
    .every((part) => words.some((word) => word.startsWith(part)));
}

/** The part of the library that is shown, by pattern. */
export function liftsByPattern(
  lifts: readonly LiftDto[],
  search: string,
  isArchived: boolean,
): Group<LiftDto>[] {
  const shown = lifts.filter(
    (lift) => (lift.archivedAt !== null) === isArchived && matchesSearch(lift, search),
  );
  return grouped(shown, PATTERN_ORDER, (lift) => lift.pattern, capital);
}
