import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, firstValueFrom, merge, type Observable } from 'rxjs';
import type { InvitationDto, UserDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { requestKey } from '../shared/request-key/request-key';
import { LiveEvents } from '../shell/live-events';
import { PeopleApi, type NewInvitationBody, type People, type PersonChangeBody } from './people-api';

/** Events come in bunches; one fetch answers them all. */
const GATHER_MS = 250;

/** The people of the gym and the open invitations, kept true by events. Provided by the page. */
@Injectable()
export class PeopleStore {
  private readonly api = inject(PeopleApi);
  private readonly known = signal<People | null>(null);
  private fetches = 0;

  /** Null until they are here. */
  readonly people = computed(() => this.known()?.items ?? null);
  readonly invitations = computed<readonly InvitationDto[]>(() => this.known()?.invitations ?? []);
  /** Why the list could not be fetched. */
  readonly problem = signal<Problem | null>(null);

  constructor() {
    const live = inject(LiveEvents);
    merge(live.of('people.changed'), live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.refresh());
    void this.refresh();
  }

  async refresh(): Promise<void> {
    const fetch = ++this.fetches;
    try {
      const known = await firstValueFrom(this.api.people());
      // A later question overtook this one.
      if (fetch !== this.fetches) return;
      this.known.set(known);
      this.problem.set(null);
    } catch (error) {
      if (fetch === this.fetches) this.problem.set(problemOf(error));
    }
  }

  /**
   * Changes a role, or deactivates or reactivates.
   * @returns what went wrong, or null
   */
  change(id: string, change: PersonChangeBody): Promise<Problem | null> {
    return this.act(this.api.change(id, change), (user) => this.putUser(user));
  }

  /** @returns what went wrong, or null */
  recordConsent(id: string, guardianName: string, key: string): Promise<Problem | null> {
    return this.act(this.api.recordConsent(id, guardianName, key), (user) => this.putUser(user));
  }

  /** @returns what went wrong, or null */
  invite(invitation: NewInvitationBody, key = requestKey()): Promise<Problem | null> {
    return this.act(this.api.invite(invitation, key), (sent) =>
      this.putInvitations((open) => [sent, ...open.filter(({ email }) => email !== sent.email)]),
    );
  }

  /** @returns what went wrong, or null */
  withdraw(invitationId: string): Promise<Problem | null> {
    return this.act(this.api.withdraw(invitationId), () =>
      this.putInvitations((open) => open.filter(({ id }) => id !== invitationId)),
    );
  }

  private async act<T>(request: Observable<T>, then: (answer: T) => void): Promise<Problem | null> {
    try {
      const answer = await firstValueFrom(request);
      // A list asked for before the change must not come after it.
      this.fetches += 1;
      then(answer);
      return null;
    } catch (error) {
      return problemOf(error);
    }
  }

  private putUser(user: UserDto): void {
    this.known.update(
      (known) => known && { ...known, items: known.items.map((one) => (one.id === user.id ? user : one)) },
    );
  }

  private putInvitations(change: (open: readonly InvitationDto[]) => InvitationDto[]): void {
    this.known.update((known) => known && { ...known, invitations: change(known.invitations) });
  }
}
