import { describe, expect, it } from 'vitest';
import type { InvitationDto, UserDto } from '@contract';
import {
  calendarWords,
  deactivateQuestion,
  dueWords,
  inOrder,
  invitableRoles,
  isShown,
  matches,
  peopleWords,
  roleQuestion,
} from './people-words';

function person(name: string, change: Partial<UserDto> = {}): UserDto {
  return {
    id: name,
    gymId: 'g',
    name,
    email: `${name.toLowerCase().replace(/\W+/g, '.')}@gym.example`,
    role: 'member',
    active: true,
    bornOn: null,
    kit: null,
    needsGuardianConsent: false,
    guardianConsent: null,
    createdAt: '2026-11-01T08:00:00.000Z',
    ...change,
  };
}

const INVITATION: InvitationDto = {
  id: 'i',
  email: 'new@gym.example',
  name: 'New',
  role: 'member',
  gymName: 'Gym',
  invitedBy: 'Wilma',
  createdAt: '2026-12-01T08:00:00.000Z',
  expiresAt: '2026-12-08T08:00:00.000Z',
  acceptedAt: null,
};

describe('the words for people', () => {
  it('lets a coach invite members alone', () => {
    expect(invitableRoles('coach')).toEqual(['member']);
    expect(invitableRoles('owner')).toEqual(['member', 'coach', 'owner']);
  });

  it('shows deactivated people under their own heading only', () => {
    const gone = person('Gone', { active: false });
    expect(isShown(gone, 'all')).toBe(false);
    expect(isShown(gone, 'members')).toBe(false);
    expect(isShown(gone, 'inactive')).toBe(true);
    expect(isShown(person('Coach', { role: 'coach' }), 'members')).toBe(false);
  });

  it('finds by every word, whatever the marks and case', () => {
    const asa = person('Åsa Holm', { email: 'asa@north.example' });
    expect(matches(asa, 'asa')).toBe(true);
    expect(matches(asa, 'HOLM å')).toBe(true);
    expect(matches(asa, 'north')).toBe(true);
    expect(matches(asa, 'asa petru')).toBe(false);
    expect(matches(asa, '')).toBe(true);
  });

  it('puts staff first, then goes by name', () => {
    const people = [
      person('Bo'),
      person('Zoe', { role: 'owner' }),
      person('Abe'),
      person('Kai', { role: 'coach' }),
    ];
    expect(inOrder(people).map(({ name }) => name)).toEqual(['Zoe', 'Kai', 'Abe', 'Bo']);
  });

  it('says who there is, leaving deactivated people out', () => {
    const people = [person('A'), person('B', { active: false }), person('C', { role: 'owner' })];
    expect(peopleWords(people)).toBe('1 member, 1 coach or owner.');
    expect(peopleWords([person('C', { role: 'owner' }), person('D', { role: 'coach' })])).toBe(
      'No members yet, 2 coaches and owners.',
    );
  });

  it('says what wants doing', () => {
    expect(dueWords([person('A')], [])).toBe('Everyone who belongs to this gym.');
    const young = person('Y', { needsGuardianConsent: true });
    expect(dueWords([young], [INVITATION])).toContain('1 invitation waits to be accepted. 1 member needs');
    expect(dueWords([{ ...young, active: false }], [])).toBe('Everyone who belongs to this gym.');
  });

  it('says what deactivating does, takes only where some can be picked up', () => {
    expect(deactivateQuestion(person('Kai', { role: 'coach' })).body).toContain('go back to the queue');
    expect(deactivateQuestion(person('Bo')).body).not.toContain('queue');
    expect(deactivateQuestion(person('Bo')).body).toContain('signed out everywhere');
  });

  it('says what a change of role does', () => {
    const kai = person('Kai', { role: 'coach' });
    expect(roleQuestion(kai, 'member', false).body).toContain('go back to the queue');
    expect(roleQuestion(kai, 'owner', false).heading).toBe('Make Kai an owner?');
    const own = roleQuestion(person('Wilma', { role: 'owner' }), 'coach', true);
    expect(own.heading).toBe('Stop being owner?');
    expect(own.body).toContain('Only another owner');
  });

  it('writes a day as it is said', () => {
    expect(calendarWords('2010-05-03')).toBe('3 May 2010');
  });
});
