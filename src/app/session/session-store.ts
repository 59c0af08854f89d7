import { computed, inject, Injectable, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import type { Role, SessionDto } from '@contract';
import { localChoice } from '../shared/preferences/local-choice';
import { problemOf } from '../shared/problems/problem';
import { GymZone } from '../shared/times/gym-zone';
import { SessionApi } from './session-api';

/** `unknown` until the server has been asked. */
export type SessionStatus = 'unknown' | 'signed-in' | 'signed-out';

const HINT_KEY = 'midfoot.signed-in';

/** The room that each role starts in. */
const HOME: Record<Role, string> = { member: '/today', coach: '/queue', owner: '/queue' };

/** Who is signed in here, to which gym. The cookies are out of reach of scripts; the server says whether they hold. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly api = inject(SessionApi);
  private readonly gymZone = inject(GymZone);
  private readonly session = signal<SessionDto | null>(null);
  private readonly asked = signal(false);
  private loading: Promise<SessionStatus> | null = null;

  readonly user = computed(() => this.session()?.user ?? null);
  readonly gym = computed(() => this.session()?.gym ?? null);
  readonly role = computed(() => this.session()?.user.role ?? null);
  /** Whether a coach's rooms are open: an owner can do all that a coach can. */
  readonly isStaff = computed(() => this.role() === 'coach' || this.role() === 'owner');
  readonly status = computed<SessionStatus>(() => {
    if (this.session()) return 'signed-in';
    return this.asked() ? 'signed-out' : 'unknown';
  });
  readonly home = computed(() => {
    const role = this.role();
    return role ? HOME[role] : '/sign-in';
  });

  /** Whether somebody was signed in here last time, so that asking the server is worth the wait. */
  hasHint(): boolean {
    return localChoice.read(HINT_KEY) !== null;
  }

  /** Asks the server once who is signed in. Rejects when the server cannot be reached; a later call asks again. */
  load(): Promise<SessionStatus> {
    if (this.asked()) return Promise.resolve(this.status());
    this.loading ??= this.ask().finally(() => (this.loading = null));
    return this.loading;
  }

  /** Asks anew, for instance after the gym or the person has been changed. */
  reload(): Promise<SessionStatus> {
    this.asked.set(false);
    return this.load();
  }

  /**
   * Asks while somebody is signed in whether they still are. Rejects when the server cannot be reached; a session that
   * has ended leads to the sign-in page.
   */
  async check(): Promise<SessionStatus> {
    try {
      this.accept(await firstValueFrom(this.api.stillMe()));
    } catch (error) {
      if (problemOf(error).status !== 401) throw error;
    }
    return this.status();
  }

  /** Takes over what signing in, opening a gym or accepting an invitation answered. */
  accept(session: SessionDto): void {
    this.session.set(session);
    this.gymZone.zone.set(session.gym.timeZone);
    this.asked.set(true);
    localChoice.write(HINT_KEY, 'yes');
  }

  /** Forgets the session here; the server has ended it or no longer knows it. */
  end(): void {
    this.session.set(null);
    this.asked.set(true);
    localChoice.write(HINT_KEY, null);
  }

  private async ask(): Promise<SessionStatus> {
    try {
      this.accept(await firstValueFrom(this.api.me()));
    } catch (error) {
      if (problemOf(error).status !== 401) throw error;
      this.end();
    }
    return this.status();
  }
}
