import type { AssignmentDto, Refilm, TakeDto, View } from '@contract';
import { inSentence, isOpen, latestTake, type Now } from '../shared/take-words/take-words';
import { dayWords } from '../shared/times/time-words';

/** An assignment that wants filming, with the take that is begun, if any, and the coach's request for another one. */
export interface ToFilm {
  assignment: AssignmentDto;
  take: TakeDto | null;
  refilm: Refilm | null;
  views: readonly View[];
}

/** A take that was handed in and has no answer yet. */
export interface UnderWay {
  assignment: AssignmentDto;
  take: TakeDto;
}

/** What Today shows, in the order in which it is shown. */
export interface Plan {
  toFilm: ToFilm[];
  underWay: UnderWay[];
}

/** When a card wants to be filmed by, ms; the far end of time when nobody said. */
function wantedMs({ assignment, refilm }: ToFilm): number {
  const at = refilm?.by ?? assignment.trainAt;
  return at === null ? Number.POSITIVE_INFINITY : Date.parse(at);
}

/** The answered takes after which a coach may have asked for another one. */
export function perhapsAskedAgain(assignments: readonly AssignmentDto[]): TakeDto[] {
  return assignments.flatMap((assignment) => {
    const take = latestTake(assignment.myTakes);
    return assignment.closedAt === null && take?.state === 'answered' ? [take] : [];
  });
}

/**
 * Sorts assignments into what wants filming (soonest training first; those without a day after them, newest first) and
 * what is under way (first due first).
 * @param refilms the coaches' requests for another take, by the id of the answered take
 */
export function planOf(assignments: readonly AssignmentDto[], refilms: ReadonlyMap<string, Refilm>): Plan {
  const toFilm: ToFilm[] = [];
  const underWay: UnderWay[] = [];
  for (const assignment of assignments) {
    const take = latestTake(assignment.myTakes);
    if (take && isOpen(take)) toFilm.push({ assignment, take, refilm: null, views: take.views });
    else if (take && take.state !== 'answered') underWay.push({ assignment, take });
    else if (assignment.closedAt === null) {
      const refilm = take ? (refilms.get(take.id) ?? null) : null;
      const views = refilm?.views ?? assignment.lift.brief.views;
      if (!take || refilm) toFilm.push({ assignment, take: null, refilm, views });
    }
  }
  const newestFirst = (a: ToFilm, b: ToFilm): number =>
    a.assignment.createdAt < b.assignment.createdAt ? 1 : -1;
  toFilm.sort((a, b) => {
    const [first, second] = [wantedMs(a), wantedMs(b)];
    return first === second ? newestFirst(a, b) : first - second;
  });
  underWay.sort((a, b) => (a.take.answerBy ?? '').localeCompare(b.take.answerBy ?? ''));
  return { toFilm, underWay };
}

/** Reps × rounds that wait behind the answer, or null when the assignment does not say. */
export function repsAhead({ reps, rounds }: Pick<AssignmentDto, 'reps' | 'rounds'>): number | null {
  return reps === null ? null : reps * (rounds ?? 1);
}

/** `before Thursday’s 150`, `before tomorrow`, `before the 150 on Thu 10 Dec`; empty when no day ahead is known. */
export function beforeWords(assignment: AssignmentDto, { nowMs, zone }: Now): string {
  const atMs = assignment.trainAt === null ? Number.NaN : Date.parse(assignment.trainAt);
  if (!(atMs > nowMs)) return '';
  const day = dayWords(atMs, nowMs, zone);
  const reps = repsAhead(assignment);
  const isName = !/\d/.test(day);
  if (reps === null)
    return isName ? ` before ${day === 'today' ? 'today’s training' : day}` : ` before ${day}`;
  return isName ? ` before ${day}’s ${reps}` : ` before the ${reps} on ${day}`;
}

/** The sentence at the head of Today. */
export function todayHeading(plan: Plan, unread: readonly TakeDto[], now: Now): string {
  const [next] = plan.toFilm;
  if (next) {
    const again = next.refilm ? ' again' : '';
    return `Film your ${inSentence(next.assignment.lift.name)}${again}${beforeWords(next.assignment, now)}.`;
  }
  const [answer] = unread;
  if (answer) {
    return unread.length === 1
      ? `Your ${inSentence(answer.lift.name)} is answered.`
      : `${unread.length} answers wait for you.`;
  }
  const { length } = plan.underWay;
  if (length > 0)
    return `Nothing to film. ${length === 1 ? 'One take is' : `${length} takes are`} on the way.`;
  return 'Nothing to film today.';
}
