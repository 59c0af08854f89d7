import { HttpErrorResponse, HttpXsrfTokenExtractor } from '@angular/common/http';
import { DestroyRef, DOCUMENT, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { filter, firstValueFrom } from 'rxjs';
import type { Person } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { LiveEvents } from '../shell/live-events';
import { BoardApi } from './board-api';

/** Whether this coach has the take. */
export type LeaseState =
  | { readonly kind: 'asking' }
  | { readonly kind: 'held'; readonly untilMs: number }
  /** The lease ran out because the server could not be reached; it is asked for again and again. */
  | { readonly kind: 'lapsed' }
  | { readonly kind: 'taken'; readonly by: Person; readonly untilMs: number }
  /** Nobody has it, and this coach has not asked for it. */
  | { readonly kind: 'free' }
  /** Answered, withdrawn or not to be had. */
  | { readonly kind: 'over' }
  | { readonly kind: 'failed'; readonly problem: Problem };

const RENEW_MS = 30_000;
const RETRY_MS = 5_000;
/** The other coach's lease has surely run out so long after its end. */
const GRACE_MS = 1_500;

interface TakenProblem {
  by: Person;
  until: string;
}

function takenBy(error: unknown): TakenProblem | null {
  if (!(error instanceof HttpErrorResponse) || error.status !== 409) return null;
  const body = error.error as Partial<TakenProblem> | null;
  return body?.by && body.until ? { by: body.by, until: body.until } : null;
}

/** Picks a take up, keeps it while the board is open and puts it back when the board is left. */
@Injectable()
export class Lease {
  private readonly api = inject(BoardApi);
  private readonly tokens = inject(HttpXsrfTokenExtractor);
  private takeId: string | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;

  readonly state = signal<LeaseState>({ kind: 'asking' });
  /** Whether to take the take over as soon as the other coach's lease ends. */
  readonly wantsNext = signal(false);

  constructor() {
    const window = inject(DOCUMENT).defaultView;
    const destroyRef = inject(DestroyRef);
    const hide = (): void => this.putBackAtOnce();
    const show = (event: PageTransitionEvent): void => {
      if (event.persisted && this.takeId) void this.ask();
    };
    window?.addEventListener('pagehide', hide);
    window?.addEventListener('pageshow', show);
    inject(LiveEvents)
      .of('take.put-back', 'take.lapsed')
      .pipe(
        filter((event) => event.takeId === this.takeId),
        takeUntilDestroyed(destroyRef),
      )
      .subscribe(() => this.cameFree());
    destroyRef.onDestroy(() => {
      window?.removeEventListener('pagehide', hide);
      window?.removeEventListener('pageshow', show);
      clearTimeout(this.timer);
    });
  }

  /** Picks a take up; another that is held is put back first. */
  async open(takeId: string): Promise<void> {
    const left = this.takeId === takeId ? null : this.leave();
    this.takeId = takeId;
    this.wantsNext.set(false);
    this.state.set({ kind: 'asking' });
    await left;
    await this.ask();
  }

  /** Asks for the take, or renews; the answer is in `state`. */
  async ask(): Promise<void> {
    const { takeId } = this;
    if (!takeId) return;
    clearTimeout(this.timer);
    try {
      const { until } = await firstValueFrom(this.api.pickUp(takeId));
      if (takeId !== this.takeId) return;
      this.state.set({ kind: 'held', untilMs: Date.parse(until) });
      this.later(RENEW_MS);
    } catch (error) {
      if (takeId === this.takeId) this.refused(error);
    }
  }

  /** The take is answered or otherwise done with: nothing to renew or put back. */
  end(): void {
    clearTimeout(this.timer);
    this.takeId = null;
    this.state.set({ kind: 'over' });
  }

  /** Puts the take back, if it is this coach's. */
  async leave(): Promise<void> {
    clearTimeout(this.timer);
    const { takeId } = this;
    const isMine = this.isMine();
    this.takeId = null;
    if (!takeId || !isMine) return;
    try {
      await firstValueFrom(this.api.putBack(takeId));
    } catch {
      // Nothing is lost: a lease that nobody renews lapses by itself.
    }
  }

  private isMine(): boolean {
    const { kind } = this.state();
    return kind === 'held' || kind === 'lapsed';
  }

  private refused(error: unknown): void {
    const taken = takenBy(error);
    const problem = problemOf(error);
    if (taken) {
      const untilMs = Date.parse(taken.until);
      this.state.set({ kind: 'taken', by: taken.by, untilMs });
      if (this.wantsNext()) this.later(Math.max(RETRY_MS, untilMs - Date.now() + GRACE_MS));
    } else if (problem.status === 409) {
      this.end();
    } else if (problem.status === 0 || problem.status >= 500) {
      const state = this.state();
      if (state.kind === 'asking') this.state.set({ kind: 'failed', problem });
      else if (state.kind !== 'held' || state.untilMs <= Date.now()) this.state.set({ kind: 'lapsed' });
      this.later(RETRY_MS);
    } else {
      this.state.set({ kind: 'failed', problem });
    }
  }

  private cameFree(): void {
    if (this.state().kind === 'taken' && !this.wantsNext()) this.state.set({ kind: 'free' });
    else if (this.state().kind !== 'asking') void this.ask();
  }

  private later(waitMs: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.ask(), waitMs);
  }

  /** The page is going away: only a request that outlives it can still put the take back. */
  private putBackAtOnce(): void {
    const token = this.tokens.getToken();
    if (!this.takeId || !this.isMine() || token === null) return;
    void fetch(`/api/takes/${this.takeId}/pick-up`, {
      method: 'DELETE',
      keepalive: true,
      credentials: 'same-origin',
      headers: { 'X-XSRF-TOKEN': token },
    });
  }
}
