import type { AssignmentDetailDto, AssignmentDto, TakeState } from '@contract';

/** One member asked, and how far they are. */
export type AskedMember = AssignmentDetailDto['asked'][number];

type Work = Pick<AssignmentDto, 'load' | 'reps' | 'rounds'>;

/** The work coming up: `8 reps × 4 rounds, 24 kg`; null where the assignment says none of it. */
export function workWords({ load, reps, rounds }: Work): string | null {
  const parts: string[] = [];
  const repWords = reps === null ? null : reps === 1 ? '1 rep' : `${reps} reps`;
  const roundWords = rounds === null ? null : rounds === 1 ? '1 round' : `${rounds} rounds`;
  if (repWords && roundWords) parts.push(`${repWords} × ${roundWords}`);
  else if (repWords ?? roundWords) parts.push(repWords ?? roundWords ?? '');
  if (load) parts.push(load);
  return parts.length === 0 ? null : parts.join(', ');
}

/** Who was asked, in few words: `all members`, `1 member`, `3 members`. */
export function audienceWords(audience: AssignmentDto['audience']): string {
  if ('all' in audience) return 'all members';
  const { length } = audience.memberIds;
  return length === 1 ? '1 member' : `${length} members`;
}

/** How far the members are: "2 of 4 have filmed." */
export function filmedWords({ asked, filmed }: { asked: number; filmed: number }): string {
  if (asked === 0) return 'Nobody is asked.';
  if (asked === 1)
    return filmed === 0 ? 'The member asked has not filmed yet.' : 'The member asked has filmed.';
  if (filmed === 0) return `None of ${asked} has filmed yet.`;
  if (filmed >= asked) return `All ${asked} have filmed.`;
  return `${filmed} of ${asked} ${filmed === 1 ? 'has' : 'have'} filmed.`;
}

/** How many of them wait for an answer: "2 wait for an answer."; null when nobody does. */
export function waitingWords(groups: readonly AskedGroup[]): string | null {
  const waiting = groups.find(({ place }) => place === 'waiting')?.rows.length ?? 0;
  if (waiting === 0) return null;
  return waiting === 1 ? '1 waits for an answer.' : `${waiting} wait for an answer.`;
}

/** The assignments in a sentence: "3 assignments are open." */
export function openWords(open: number, isAll: boolean): string {
  if (open === 0) return isAll ? 'No assignment is open.' : 'No newer assignment is open.';
  const count = isAll ? String(open) : `${open} or more`;
  return open === 1 && isAll ? '1 assignment is open.' : `${count} assignments are open.`;
}

/** Where a member's newest take stands, for the coach. */
export const PLACES = ['waiting', 'unplayable', 'not-filmed', 'answered'] as const;
export type Place = (typeof PLACES)[number];

const HEADINGS: Record<Place, string> = {
  waiting: 'Waiting for an answer',
  unplayable: 'Cannot be played',
  'not-filmed': 'Not filmed yet',
  answered: 'Answered',
};

const STATES: Record<TakeState, string> = {
  draft: 'filming',
  processing: 'being prepared',
  waiting: 'waits',
  'picked-up': 'picked up',
  answered: 'answered',
  unplayable: 'cannot be played',
  withdrawn: 'taken back',
};

function placeOf(state: TakeState | null): Place {
  switch (state) {
    case 'processing':
    case 'waiting':
    case 'picked-up':
      return 'waiting';
    case 'answered':
      return 'answered';
    case 'unplayable':
      return 'unplayable';
    case null:
    case 'draft':
    case 'withdrawn':
      return 'not-filmed';
  }
}

/** One member asked, as a row. */
export interface AskedRow {
  memberId: string;
  name: string;
  /** `take 2, waits`; null before a take was handed in. */
  words: string | null;
  submittedAt: string | null;
  /** The page to go to and what to do there; null where there is nothing to open. */
  link: { path: string[]; label: string } | null;
}

/** Members in one place. */
export interface AskedGroup {
  place: Place;
  heading: string;
  rows: AskedRow[];
}

function linkOf(place: Place, { latest }: AskedMember): AskedRow['link'] {
  if (!latest) return null;
  switch (place) {
    case 'waiting':
      return latest.state === 'processing' ? null : { path: ['/board', latest.takeId], label: 'Open board' };
    case 'answered':
      return { path: ['/answers', latest.takeId], label: 'Read the answer' };
    case 'unplayable':
      return { path: ['/queue', 'unplayable'], label: 'See why' };
    case 'not-filmed':
      return null;
  }
}

function rowOf(place: Place, asked: AskedMember): AskedRow {
  const { member, latest } = asked;
  return {
    memberId: member.id,
    name: member.name,
    words: latest ? `take ${latest.number}, ${STATES[latest.state]}` : null,
    submittedAt: place === 'not-filmed' ? null : (latest?.submittedAt ?? null),
    link: linkOf(place, asked),
  };
}

/** Everyone who was asked, by where their newest take stands: what wants the coach first. Longest waiting first. */
export function askedGroups(asked: readonly AskedMember[]): AskedGroup[] {
  return PLACES.map((place) => ({
    place,
    heading: HEADINGS[place],
    rows: asked
      .filter(({ latest }) => placeOf(latest?.state ?? null) === place)
      .map((one) => rowOf(place, one))
      .sort(
        (a, b) => (a.submittedAt ?? '').localeCompare(b.submittedAt ?? '') || a.name.localeCompare(b.name),
      ),
  })).filter(({ rows }) => rows.length > 0);
}

/** Members whose name has every searched word at the beginning of one of its own. */
export function findMembers<T extends { name: string }>(members: readonly T[], search: string): T[] {
  const parts = search.toLocaleLowerCase().split(/\s+/).filter(Boolean);
  return members.filter(({ name }) => {
    const words = name.toLocaleLowerCase().split(/[\s-]+/);
    return parts.every((part) => words.some((word) => word.startsWith(part)));
  });
}
