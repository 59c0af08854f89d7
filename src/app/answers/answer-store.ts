import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, filter, firstValueFrom, merge } from 'rxjs';
import type { TakeDetailDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { requestKey } from '../shared/request-key/request-key';
import { SessionStore } from '../session/session-store';
import { LiveEvents } from '../shell/live-events';
import { AnswersApi } from './answers-api';

const GATHER_MS = 250;

/** One take with its answer, kept true by events; opening it marks it read. Provided by the page. */
@Injectable()
export class AnswerStore {
  private readonly api = inject(AnswersApi);
  private readonly session = inject(SessionStore);
  private takeId: string | null = null;
  private againKey = requestKey();

  readonly take = signal<TakeDetailDto | null>(null);
  readonly problem = signal<Problem | null>(null);
  readonly replyProblem = signal<Problem | null>(null);
  readonly isReplying = signal(false);
  readonly actProblem = signal<Problem | null>(null);
  readonly isActing = signal(false);

  constructor() {
    const live = inject(LiveEvents);
    const ours = live.all.pipe(filter((event) => event.takeId === this.takeId && event.type !== 'take.read'));
    merge(ours, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(inject(DestroyRef)))
      .subscribe(() => void this.refresh());
  }

  async load(takeId: string): Promise<void> {
    this.takeId = takeId;
    this.take.set(null);
    await this.refresh();
  }

  async refresh(): Promise<void> {
    const { takeId } = this;
    if (takeId === null) return;
    try {
      const take = await firstValueFrom(this.api.take(takeId));
      if (takeId !== this.takeId) return;
      this.take.set(take);
      this.problem.set(null);
      await this.markRead(take);
    } catch (error) {
      if (takeId === this.takeId) this.problem.set(problemOf(error));
    }
  }

  /** @returns whether the reply was sent; if not, `replyProblem` says why */
  async reply(body: string, key: string): Promise<boolean> {
    const { takeId } = this;
    if (takeId === null) return false;
    this.isReplying.set(true);
    this.replyProblem.set(null);
    try {
      const reply = await firstValueFrom(this.api.reply(takeId, body, key));
      this.take.update((take) =>
        take?.answer && !take.answer.replies.some(({ id }) => id === reply.id)
          ? { ...take, answer: { ...take.answer, replies: [...take.answer.replies, reply] } }
          : take,
      );
      return true;
    } catch (error) {
      this.replyProblem.set(problemOf(error));
      return false;
    } finally {
      this.isReplying.set(false);
    }
  }

  /** Begins the next take. @returns whether it was begun; if not, `actProblem` says why */
  filmAgain(): Promise<boolean> {
    return this.act((take) => firstValueFrom(this.api.filmAgain(take.assignmentId, this.againKey)));
  }

  /** Takes it back. @returns whether that was done; if not, `actProblem` says why */
  withdraw(): Promise<boolean> {
    return this.act((take) => firstValueFrom(this.api.withdraw(take.id)));
  }

  private async act(work: (take: TakeDetailDto) => Promise<unknown>): Promise<boolean> {
    const take = this.take();
    if (!take || this.isActing()) return false;
    this.isActing.set(true);
    this.actProblem.set(null);
    try {
      await work(take);
      return true;
    } catch (error) {
      this.actProblem.set(problemOf(error));
      return false;
    } finally {
      this.isActing.set(false);
    }
  }

  /** A coach who looks at an answer has not read it for the member. */
  private async markRead(take: TakeDetailDto): Promise<void> {
    if (take.state !== 'answered' || take.readAt !== null) return;
    if (this.session.user()?.id !== take.member.id) return;
    await firstValueFrom(this.api.markRead(take.id));
    this.take.update((shown) =>
      shown?.id === take.id ? { ...shown, readAt: new Date().toISOString() } : shown,
    );
  }
}
