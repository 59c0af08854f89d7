import type { ScaleDto, AssignmentDto, TakeDto, View } from '@contract';
import { clockTime, dayAndTime, dayWords, relativeWords } from '../times/time-words';

/** What a sentence is said against: the present, epoch ms, and the gym's IANA zone. */
export interface Now {
  nowMs: number;
  zone: string;
}

/** The moment something is due, as short as it can be said: `17:30` today, else `Wednesday 17:00`. */
export function dueWords(at: string, { nowMs, zone }: Now): string {
  const atMs = Date.parse(at);
  return dayWords(atMs, nowMs, zone) === 'today' ? clockTime(atMs, zone) : dayAndTime(atMs, nowMs, zone);
}

/** The name by which a person is spoken of: the first word of it. */
export function firstName(name: string): string {
  return name.trim().split(/\s+/)[0] || 'Your coach';
}

/** Views as a phrase: `the front and the side`. */
export function viewsPhrase(views: readonly View[]): string {
  return views.map((view) => `the ${view}`).join(' and ');
}

/** A lift's name inside a sentence: `two-handed swing`; a name in capitals throughout keeps them. */
export function inSentence(liftName: string): string {
  const [first = '', second = ''] = [...liftName];
  const isAcronym = second !== '' && second === second.toUpperCase() && second !== second.toLowerCase();
  return isAcronym ? liftName : first.toLowerCase() + liftName.slice(first.length);
}

/** The views of a take that no clip has arrived for. */
export function missingViews(take: Pick<TakeDto, 'views' | 'clips'>): View[] {
  return take.views.filter((view) => !take.clips.some((clip) => clip.view === view));
}

function draftSentence(take: TakeDto): string {
  const missing = missingViews(take);
  if (missing.length === 0) {
    return take.views.length > 1
      ? 'Both clips are here; send them when you are ready.'
      : 'The clip is here; send it when you are ready.';
  }
  if (missing.length === take.views.length) return 'Not filmed yet.';
  const here = take.views.filter((view) => !missing.includes(view));
  return `${viewsPhrase(here).replace(/^t/, 'T')} is here; ${viewsPhrase(missing)} is still to film.`;
}

/** How a take stands, as one sentence for its member. */
export function stateSentence(take: TakeDto, now: Now): string {
  switch (take.state) {
    case 'draft':
      return draftSentence(take);
    case 'processing':
      return 'Your clips are being prepared.';
    case 'waiting': {
      if (take.answerBy === null) return 'Waiting for a coach.';
      if (Date.parse(take.answerBy) < now.nowMs) {
        return `Waiting; the answer was due ${dueWords(take.answerBy, now)} and is late. Your gym sees that.`;
      }
      return `Waiting; your gym answers by ${dueWords(take.answerBy, now)}.`;
    }
    case 'picked-up': {
      const who = take.pickedUpBy ? firstName(take.pickedUpBy.name) : 'A coach';
      const what = take.clips.length > 1 ? 'clips' : 'clip';
      const by =
        take.answerBy && Date.parse(take.answerBy) >= now.nowMs
          ? `; answer by ${dueWords(take.answerBy, now)}`
          : '';
      return `${who} has your ${what}${by}.`;
    }
    case 'answered':
      return take.answeredAt === null
        ? 'Answered.'
        : `Answered ${relativeWords(Date.parse(take.answeredAt), now.nowMs)}.`;
    case 'unplayable':
      return take.problem?.message ?? 'A clip of this take could not be played.';
    case 'withdrawn':
      return 'You took this take back; its clips are deleted.';
  }
}

/**
 * The scale to use until a coach has answered; null when the coach named none, and when something hurts, for then the
 * lift is stopped and no version of it is offered.
 */
export function untilAnsweredScale(assignment: AssignmentDto, isHurting: boolean): ScaleDto | null {
  if (isHurting) return null;
  return assignment.lift.scales.find((scale) => scale.id === assignment.untilAnsweredScaleId) ?? null;
}

/** The last take that still counts (one taken back does not), of takes in order, oldest first. */
export function latestTake(takes: readonly TakeDto[]): TakeDto | null {
  return takes.filter((take) => take.state !== 'withdrawn').at(-1) ?? null;
}

/** Whether a take may still be filmed and worded: not handed in, or handed in but unplayable. */
export function isOpen(take: TakeDto): boolean {
  return take.state === 'draft' || take.state === 'unplayable';
}
