import type { AnswerDto, CommentDto, MarkDto, MeasureDto, TakeDetailDto, View } from '@contract';
import { firstName, viewsPhrase } from '../shared/take-words/take-words';
import { durationWords } from '../shared/times/time-words';

/** What to do with the load, in the member's words. */
export function callWords(answer: Pick<AnswerDto, 'call' | 'scale'>): string {
  switch (answer.call) {
    case 'go':
      return 'Go as planned';
    case 'light':
      return 'Keep it light';
    case 'scale':
      return answer.scale ? `Use: ${answer.scale.name}` : 'Use an easier version';
  }
}

/** Who answered and how fast: `Maren, 2 h after you sent it`. */
export function answeredWords(answer: AnswerDto, submittedAt: string | null): string {
  const who = firstName(answer.author.name);
  if (submittedAt === null) return who;
  return `${who}, ${durationWords(Date.parse(answer.answeredAt) - Date.parse(submittedAt))} after you sent it`;
}

/** Comments in the order in which they happen; of two at one instant the front comes first, then the one written first. */
export function inTime(comments: readonly CommentDto[]): CommentDto[] {
  return [...comments].sort(
    (a, b) => a.atMs - b.atMs || a.view.localeCompare(b.view) || a.createdAt.localeCompare(b.createdAt),
  );
}

/** What a measure is called, and what its sign means. `value` is in degrees, see the contract for each kind. */
export function measureWords({ kind, value }: Pick<MeasureDto, 'kind' | 'value'>): string {
  const degrees = Math.round(value);
  switch (kind) {
    case 'angle':
      return 'joint angle';
    case 'lean':
      if (degrees === 0) return 'upright';
      return degrees > 0 ? 'lean, to the right of the picture' : 'lean, to the left of the picture';
    case 'depth':
      if (degrees === 0) return 'thigh level';
      return degrees > 0 ? 'hip below the knee' : 'hip above the knee';
  }
}

/** A measure as it is shown: `112° ± 3`, whole degrees; where the words tell the side, no sign. The ± is never shown as 0. */
export function measureValue({
  kind,
  value,
  plusMinus,
}: Pick<MeasureDto, 'kind' | 'value' | 'plusMinus'>): string {
  const degrees = kind === 'angle' ? value : Math.abs(value);
  return `${Math.round(degrees)}° ± ${Math.max(1, Math.ceil(plusMinus))}`;
}

/** A fault's name beside its mark. */
export interface NamedMark {
  mark: MarkDto;
  name: string;
  cue: string | null;
}

const MARK_ORDER = { seen: 0, clear: 1, hidden: 2 } as const;

/** Marks with the names of their faults: seen first, then clear, then hidden. */
export function namedMarks(take: TakeDetailDto, marks: readonly MarkDto[]): NamedMark[] {
  const { faults } = take.assignment.lift;
  return marks
    .map((mark) => {
      const fault = faults.find(({ id }) => id === mark.faultId);
      return { mark, name: fault?.name ?? 'A fault no longer on the list', cue: fault?.cue ?? null };
    })
    .sort((a, b) => MARK_ORDER[a.mark.mark] - MARK_ORDER[b.mark.mark]);
}

/** The label of the act that answers a request for another take: `Film it again, side only`. */
export function againWords(asked: readonly View[], briefViews: readonly View[]): string {
  if (asked.length === 1 && briefViews.length > 1) return `Film it again, ${asked[0] ?? ''} only`;
  return asked.length > 1 ? `Film it again, ${viewsPhrase(asked)}` : 'Film it again';
}

const EVENT_WORDS: Partial<Record<string, string>> = {
  'take.submitted': 'sent',
  'take.waiting': 'ready for a coach',
  'take.picked-up': 'picked up',
  'take.put-back': 'put back',
  'take.lapsed': 'back in the queue',
  'take.answered': 'answered',
  'take.read': 'read',
  'take.unplayable': 'could not be played',
  'take.retried': 'tried again',
  'take.withdrawn': 'taken back',
  'take.replied': 'reply',
};
/** Whose act is worth naming: what a coach did. */
const BY_COACH: readonly string[] = ['take.picked-up', 'take.answered', 'take.put-back'];

/** The steps of a take that its member cares for, each as words; a step said twice in a row is said once. */
export function historyLine(history: TakeDetailDto['history']): { at: string; words: string }[] {
  const steps = history.flatMap(({ type, at, by }) => {
    const words = EVENT_WORDS[type];
    if (words === undefined) return [];
    return [{ at, words: by && BY_COACH.includes(type) ? `${words} by ${firstName(by.name)}` : words }];
  });
  return steps.filter((step, index) => steps[index - 1]?.words !== step.words);
}
