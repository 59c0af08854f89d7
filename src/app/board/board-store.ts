import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, filter, firstValueFrom, merge } from 'rxjs';
import type { BoardDto, ClipDto, CommentDto, DraftAnswer, MarkDto, MeasureDto } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { SessionStore } from '../session/session-store';
import { LiveEvents } from '../shell/live-events';
import { BoardApi, type NewMeasure, type RepMarks } from './board-api';
import { answerOf, nextMark, withMark } from './board-words';
import { DraftMirror, EMPTY_DRAFT } from './draft-mirror';

/** Words go to the server this long after the last key, ms. */
const SAVE_AFTER_MS = 700;
const GATHER_MS = 250;

/** An instant of one clip. */
export interface Instant {
  readonly clipId: string;
  readonly atMs: number;
}

/** How the keeping of the draft stands. */
export type Saving = 'nothing' | 'pending' | 'saved' | 'failed';

const inOrder = (comments: readonly CommentDto[]): CommentDto[] =>
  [...comments].sort((a, b) => a.atMs - b.atMs || a.createdAt.localeCompare(b.createdAt));

/** One take on the board: what was filmed and what the coach says about it. Provided by the page. */
@Injectable()
export class BoardStore {
  private readonly api = inject(BoardApi);
  private readonly mirror = inject(DraftMirror);
  private readonly session = inject(SessionStore);
  private isCommenting = false;
  private saveTimer: ReturnType<typeof setTimeout> | undefined;
  /** Writes go one after the other, so that an older one never overtakes a newer. */
  private writing: Promise<unknown> = Promise.resolve();

  readonly board = signal<BoardDto | null>(null);
  readonly comments = signal<readonly CommentDto[]>([]);
  readonly marks = signal<readonly MarkDto[]>([]);
  readonly measures = signal<readonly MeasureDto[]>([]);
  readonly repMarks = signal<readonly RepMarks[]>([]);
  readonly draft = signal<DraftAnswer>(EMPTY_DRAFT);
  readonly saving = signal<Saving>('nothing');
  /** The board could not be fetched. */
  readonly problem = signal<Problem | null>(null);
  /** Something could not be written; it is still on the screen. */
  readonly writeProblem = signal<Problem | null>(null);
  readonly isSending = signal(false);

  readonly take = computed(() => this.board()?.take ?? null);
  readonly clips = computed<readonly ClipDto[]>(() =>
    (this.board()?.clips ?? []).filter((clip) => clip.media !== null),
  );
  readonly earlier = computed(() => this.board()?.earlierTakes ?? []);
  /** The newest earlier take that was answered, else the newest. */
  readonly last = computed(() => this.earlier().find((one) => one.answer) ?? this.earlier()[0] ?? null);

  constructor() {
    const live = inject(LiveEvents);
    const destroyRef = inject(DestroyRef);
    const mine = () => this.session.user()?.id;
    const changes = live
      .of('board.changed', 'take.answered', 'take.withdrawn', 'take.unplayable', 'take.waiting')
      .pipe(filter((event) => event.takeId === this.take()?.id && event.actorId !== mine()));
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(destroyRef))
      .subscribe(() => void this.refresh());
  }

  /**
   * Fetches a take, with what was written on it so far: words that never reached the server win over the server's.
   * What still waits to be kept of the take shown before goes first.
   */
  async load(takeId: string): Promise<void> {
    this.problem.set(null);
    if (this.take()?.id !== takeId) {
      await this.flush();
      this.board.set(null);
      this.writeProblem.set(null);
      this.saving.set('nothing');
    }
    try {
      const board = await firstValueFrom(this.api.board(takeId));
      this.show(board);
      const unsaved = this.mirror.read(takeId);
      this.draft.set(unsaved ?? board.draft ?? EMPTY_DRAFT);
      if (unsaved && board.take.state !== 'answered') this.save();
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  /** Changes the draft; it is kept here at once and on the server a moment later. */
  say(change: Partial<DraftAnswer>): void {
    const takeId = this.take()?.id;
    if (!takeId) return;
    this.draft.update((draft) => ({ ...draft, ...change }));
    this.mirror.keep(takeId, this.draft());
    this.save();
  }

  /** Comments at an instant, or over a span, with what stands in the composer. */
  async comment(at: Instant & { readonly endMs?: number }): Promise<CommentDto | null> {
    const body = this.draft().composer.trim();
    // Enter held or pressed twice makes one comment.
    if (body === '' || this.isCommenting) return null;
    this.isCommenting = true;
    const comment = await this.add({ ...at, body });
    this.isCommenting = false;
    // Only what was sent is cleared: the coach may have typed on.
    if (comment && this.draft().composer.trim() === body) this.say({ composer: '' });
    return comment;
  }

  async changeComment(commentId: string, body: string): Promise<void> {
    const changed = await this.write(() => firstValueFrom(this.api.changeComment(commentId, { body })));
    if (!changed) return;
    this.comments.update((all) => inOrder(all.map((one) => (one.id === commentId ? changed : one))));
  }

  async deleteComment(comment: CommentDto): Promise<boolean> {
    const done = await this.write(async () => {
      await firstValueFrom(this.api.deleteComment(comment.id));
      return true;
    });
    if (done) this.comments.update((all) => all.filter((one) => one.id !== comment.id));
    return done === true;
  }

  /** Puts a deleted comment back, as a new one with the same words at the same instant. */
  restore({ clipId, atMs, endMs, body, drawing, faultId }: CommentDto): Promise<CommentDto | null> {
    return this.add({ clipId, atMs, body, endMs, drawing, faultId });
  }

  /** Moves a fault's mark on; a fault seen takes the instant. */
  async pressFault(faultId: string, at: Instant | null): Promise<void> {
    const present = this.marks().find((mark) => mark.faultId === faultId)?.mark ?? null;
    const mark = nextMark(present);
    const set: MarkDto | null = mark && {
      faultId,
      mark,
      clipId: mark === 'seen' ? (at?.clipId ?? null) : null,
      atMs: mark === 'seen' ? (at?.atMs ?? null) : null,
    };
    await this.putMarks(withMark(this.marks(), faultId, set));
  }

  /** Marks every fault that is not marked yet as clear. */
  async clearRest(): Promise<void> {
    const marked = new Set(this.marks().map((mark) => mark.faultId));
    const rest = (this.board()?.lift.faults ?? [])
      .filter((fault) => !marked.has(fault.id))
      .map((fault): MarkDto => ({ faultId: fault.id, mark: 'clear', clipId: null, atMs: null }));
    if (rest.length > 0) await this.putMarks([...this.marks(), ...rest]);
  }

  async addMeasure(measure: NewMeasure): Promise<boolean> {
    const takeId = this.take()?.id;
    if (!takeId) return false;
    const added = await this.write(() => firstValueFrom(this.api.addMeasure(takeId, measure)));
    if (added) this.measures.update((all) => [...all, added]);
    return added !== null;
  }

  async deleteMeasure(measureId: string): Promise<boolean> {
    const done = await this.write(async () => {
      await firstValueFrom(this.api.deleteMeasure(measureId));
      return true;
    });
    if (done) this.measures.update((all) => all.filter((one) => one.id !== measureId));
    return done === true;
  }

  /** Marks the top or bottom of a rep at an instant; the same again takes it off. */
  async pressRep(at: Instant, kind: 'top' | 'bottom'): Promise<void> {
    // All marks of the clip go as a whole, so each press builds on what the press before it made.
    await this.write(async () => {
      const known = this.repMarks().find((one) => one.clipId === at.clipId)?.marks ?? [];
      const isOff = known.some((mark) => mark.kind === kind && mark.atMs === at.atMs);
      const others = known.filter((mark) => mark.atMs !== at.atMs);
      const marks = isOff ? others : [...others, { atMs: at.atMs, kind }];
      const kept = await firstValueFrom(this.api.putRepMarks(at.clipId, marks));
      this.repMarks.update((all) => [...all.filter((one) => one.clipId !== at.clipId), kept]);
    });
  }

  /** Sends the answer. @returns whether it is sent */
  async send(): Promise<boolean> {
    const board = this.board();
    const answer = board && answerOf(this.draft(), board.lift);
    if (!board || !answer || this.isSending()) return false;
    this.isSending.set(true);
    clearTimeout(this.saveTimer);
    const sent = await this.write(() => firstValueFrom(this.api.sendAnswer(board.take.id, answer)));
    this.isSending.set(false);
    if (!sent) return false;
    this.mirror.forget(board.take.id);
    this.saving.set('nothing');
    return true;
  }

  async reply(body: string): Promise<boolean> {
    const takeId = this.take()?.id;
    if (!takeId) return false;
    const sent = await this.write(() => firstValueFrom(this.api.reply(takeId, body)));
    if (sent) await this.refresh();
    return sent !== null;
  }

  /** Sends the draft now, if it is waiting to be sent. */
  async flush(): Promise<void> {
    clearTimeout(this.saveTimer);
    if (this.saving() === 'pending' || this.saving() === 'failed') await this.putDraft();
  }

  private async add(comment: Parameters<BoardApi['addComment']>[1]): Promise<CommentDto | null> {
    const takeId = this.take()?.id;
    if (!takeId) return null;
    const added = await this.write(() => firstValueFrom(this.api.addComment(takeId, comment)));
    if (added) this.comments.update((all) => inOrder([...all, added]));
    return added;
  }

  private async putMarks(marks: readonly MarkDto[]): Promise<void> {
    const takeId = this.take()?.id;
    if (!takeId) return;
    const before = this.marks();
    this.marks.set(marks);
    const kept = await this.write(() => firstValueFrom(this.api.putMarks(takeId, marks)));
    // What the server did not take must not look as if it had.
    if (!kept && this.marks() === marks) this.marks.set(before);
  }

  private async refresh(): Promise<void> {
    const takeId = this.take()?.id;
    if (!takeId) return;
    try {
      this.show(await firstValueFrom(this.api.board(takeId)));
    } catch (error) {
      this.writeProblem.set(problemOf(error));
    }
  }

  private show(board: BoardDto): void {
    this.board.set(board);
    this.comments.set(inOrder(board.comments));
    this.marks.set(board.marks);
    this.measures.set(board.measures);
    this.repMarks.set(board.repMarks);
  }

  private save(): void {
    this.saving.set('pending');
    clearTimeout(this.saveTimer);
    this.saveTimer = setTimeout(() => void this.putDraft(), SAVE_AFTER_MS);
  }

  private async putDraft(): Promise<void> {
    const takeId = this.take()?.id;
    if (!takeId) return;
    const draft = this.draft();
    const kept = await this.write(() => firstValueFrom(this.api.putDraft(takeId, draft)));
    if (!kept) {
      this.saving.set('failed');
      return;
    }
    if (this.draft() !== draft) return;
    this.saving.set('saved');
    this.mirror.forget(takeId);
  }

  /** Runs a write in its turn; null, with the problem shown, when it fails. */
  private write<T>(work: () => Promise<T>): Promise<T | null> {
    const turn = this.writing.then(async () => {
      try {
        const result = await work();
        this.writeProblem.set(null);
        return result;
      } catch (error) {
        this.writeProblem.set(problemOf(error));
        return null;
      }
    });
    this.writing = turn;
    return turn;
  }
}
