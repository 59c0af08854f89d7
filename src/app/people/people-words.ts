import type { InvitationDto, Role, UserDto } from '@contract';
import type { Question } from '../shared/confirm/question';

/** Which people the list shows. */
export const SHOWN = ['all', 'members', 'coaches', 'owners', 'inactive'] as const;
export type Shown = (typeof SHOWN)[number];

const ROLE_OF: Partial<Record<Shown, Role>> = { members: 'member', coaches: 'coach', owners: 'owner' };
const ROLE_ORDER: Record<Role, number> = { owner: 0, coach: 1, member: 2 };

/** What each role is for, said where one is chosen. */
export const ROLE_WORDS: Record<Role, string> = {
  member: 'Films lifts and reads the answers.',
  coach: 'Assigns lifts, answers takes and invites members.',
  owner: 'All that a coach does, and runs the gym: people, the promise, turnaround.',
};

/** Whom somebody may invite: a coach members alone. */
export function invitableRoles(role: Role | null): readonly Role[] {
  return role === 'owner' ? ['member', 'coach', 'owner'] : ['member'];
}

/** Deactivated people are under their own heading only. */
export function isShown(user: UserDto, shown: Shown): boolean {
  if (shown === 'inactive') return !user.active;
  return user.active && (shown === 'all' || user.role === ROLE_OF[shown]);
}

/** Letters without their marks and case, so that "asa" finds "Åsa". */
const plain = (text: string): string => text.normalize('NFD').replace(/\p{M}/gu, '').toLocaleLowerCase('en');

/** Whether every word looked for is in the name or the address. */
export function matches(person: Pick<UserDto, 'name' | 'email'>, search: string): boolean {
  const where = plain(`${person.name} ${person.email}`);
  return plain(search)
    .split(/\s+/)
    .every((word) => where.includes(word));
}

/** Staff first, then by name. */
export function inOrder(people: readonly UserDto[]): UserDto[] {
  return [...people].sort(
    (a, b) => ROLE_ORDER[a.role] - ROLE_ORDER[b.role] || a.name.localeCompare(b.name, 'en'),
  );
}

const counted = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

/** The head of the page: who there is. */
export function peopleWords(people: readonly UserDto[]): string {
  const active = people.filter((person) => person.active);
  const of = (role: Role) => active.filter((person) => person.role === role).length;
  const members = of('member');
  const staff = active.length - members;
  return `${members === 0 ? 'No members yet' : counted(members, 'member', 'members')}, ${counted(
    staff,
    'coach or owner',
    'coaches and owners',
  )}.`;
}

/** What stands under it: what wants doing, or nothing. */
export function dueWords(people: readonly UserDto[], invitations: readonly InvitationDto[]): string {
  const consents = people.filter((person) => person.active && person.needsGuardianConsent).length;
  const due = [
    invitations.length === 0
      ? ''
      : `${counted(invitations.length, 'invitation waits', 'invitations wait')} to be accepted.`,
    consents === 0
      ? ''
      : `${counted(consents, 'member needs', 'members need')} a guardian’s consent before a coach can see their clips.`,
  ];
  return due.filter(Boolean).join(' ') || 'Everyone who belongs to this gym.';
}

export function deactivateQuestion(user: UserDto): Question {
  const takes = user.role === 'member' ? '' : ' Takes they have picked up go back to the queue.';
  return {
    heading: `Deactivate ${user.name}?`,
    body:
      `They are signed out everywhere and cannot sign in.${takes} ` +
      'Nothing of theirs is deleted, and you can reactivate them at any time.',
    confirmLabel: 'Deactivate',
    cancelLabel: 'Leave active',
  };
}

export function reactivateQuestion(user: UserDto): Question {
  return {
    heading: `Reactivate ${user.name}?`,
    body: `They can sign in again as ${user.role}, with the password they had.`,
    confirmLabel: 'Reactivate',
    cancelLabel: 'Leave deactivated',
  };
}

export function roleQuestion(user: UserDto, role: Role, isSelf: boolean): Question {
  const takes =
    role === 'member' && user.role !== 'member' ? ' Takes they have picked up go back to the queue.' : '';
  const who = isSelf ? 'You' : user.name;
  const own = isSelf && role !== 'owner' ? ' Only another owner can make you one again.' : '';
  return {
    heading: isSelf ? `Stop being ${user.role}?` : `Make ${user.name} ${withArticle(role)}?`,
    body: `${who} will be ${withArticle(role)}: ${ROLE_WORDS[role].charAt(0).toLowerCase()}${ROLE_WORDS[role].slice(1)}${takes}${own}`,
    confirmLabel: `Make ${isSelf ? 'me' : 'them'} ${withArticle(role)}`,
    cancelLabel: `Keep ${user.role}`,
  };
}

export function withArticle(role: Role): string {
  return role === 'owner' ? 'an owner' : `a ${role}`;
}

/** A calendar day as people say it: `3 May 2010`. */
export function calendarWords(day: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    timeZone: 'UTC',
    day: 'numeric',
    month: 'long',
    year: 'numeric',
  }).format(Date.parse(`${day}T00:00:00Z`));
}
