import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { of, Subject, throwError } from 'rxjs';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { InvitationDto, UserDto } from '@contract';
import { LiveEvents } from '../shell/live-events';
import { PeopleApi, type People } from './people-api';
import { PeopleStore } from './people-store';

const KAI: UserDto = {
  id: 'kai',
  gymId: 'g',
  name: 'Kai',
  email: 'kai@gym.example',
  role: 'coach',
  active: true,
  bornOn: null,
  kit: null,
  needsGuardianConsent: false,
  guardianConsent: null,
  createdAt: '2026-11-01T08:00:00.000Z',
};

function invitation(id: string, email: string): InvitationDto {
  return {
    id,
    email,
    name: 'New',
    role: 'member',
    gymName: 'Gym',
    invitedBy: 'Wilma',
    createdAt: '2026-12-01T08:00:00.000Z',
    expiresAt: '2026-12-08T08:00:00.000Z',
    acceptedAt: null,
  };
}

describe('the store of people', () => {
  const api = {
    people: vi.fn(),
    change: vi.fn(),
    recordConsent: vi.fn(),
    invite: vi.fn(),
    withdraw: vi.fn(),
  };

  async function open(): Promise<PeopleStore> {
    TestBed.configureTestingModule({
      providers: [
        PeopleStore,
        { provide: PeopleApi, useValue: api },
        { provide: LiveEvents, useValue: { of: () => new Subject(), resumed: new Subject() } },
      ],
    });
    const store = TestBed.inject(PeopleStore);
    await Promise.resolve();
    return store;
  }

  beforeEach(() => {
    vi.resetAllMocks();
    api.people.mockReturnValue(of({ items: [KAI], invitations: [invitation('i1', 'new@gym.example')] }));
  });

  it('puts a changed person in their place', async () => {
    const store = await open();
    api.change.mockReturnValue(of({ ...KAI, active: false }));
    expect(await store.change('kai', { active: false })).toBeNull();
    expect(store.people()?.[0]?.active).toBe(false);
  });

  it('gives back why a change was refused, and changes nothing', async () => {
    const store = await open();
    const refused = {
      type: 'urn:midfoot:problem:last-owner',
      title: 'No',
      status: 409,
      detail: 'The last owner.',
    };
    api.change.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 409, error: refused })));
    expect((await store.change('kai', { role: 'member' }))?.detail).toBe('The last owner.');
    expect(store.people()).toEqual([KAI]);
    expect(store.problem()).toBeNull();
  });

  it('shows one open invitation for an address that is invited again', async () => {
    const store = await open();
    api.invite.mockReturnValue(of(invitation('i2', 'new@gym.example')));
    expect(await store.invite({ email: 'new@gym.example', name: 'New', role: 'member' }, 'key')).toBeNull();
    expect(store.invitations().map(({ id }) => id)).toEqual(['i2']);
  });

  it('takes a withdrawn invitation off', async () => {
    const store = await open();
    api.withdraw.mockReturnValue(of(null));
    expect(await store.withdraw('i1')).toBeNull();
    expect(store.invitations()).toEqual([]);
  });

  it('passes over a list that was asked for before a change', async () => {
    const store = await open();
    const late = new Subject<People>();
    api.people.mockReturnValueOnce(late);
    const fetching = store.refresh();
    api.change.mockReturnValue(of({ ...KAI, role: 'owner' }));
    await store.change('kai', { role: 'owner' });
    late.next({ items: [KAI], invitations: [] });
    late.complete();
    await fetching;
    expect(store.people()?.[0]?.role).toBe('owner');
  });

  it('says why the list cannot be fetched, and keeps what it has', async () => {
    const store = await open();
    api.people.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 0 })));
    await store.refresh();
    expect(store.problem()?.title).toBe('No connection');
    expect(store.people()).toEqual([KAI]);
  });
});
