import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  ElementRef,
  inject,
  input,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { Location } from '@angular/common';
import { MatButton } from '@angular/material/button';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import type { ClipDto, CommentDto, Drawing, MarkDto, MeasureDto, MeasureKind, View } from '@contract';
import { frameStartMs } from '@calc/frames';
import { EmptyState } from '../shared/empty-state/empty-state';
import { Keys } from '../shared/keys/keys';
import { Plumb } from '../shared/plumb/plumb';
import { ProblemBox } from '../shared/problems/problem-box';
import { Snackbar } from '../shared/snackbar/snackbar';
import { firstName } from '../shared/take-words/take-words';
import { clipTime } from '../shared/times/time-words';
import { SessionStore } from '../session/session-store';
import { AnswerForm } from './answer-form';
import { AskedFor } from './asked-for';
import { BoardApi } from './board-api';
import { BoardHead } from './board-head';
import { boardKeys } from './board-keys';
import { NOTICE_ACTS, noticeOf } from './board-notice';
import { BoardPlayer } from './board-player';
import { BoardStore, type Instant } from './board-store';
import { closedWords, commentBeside, inPhases, missingWords } from './board-words';
import { Checklist } from './checklist';
import { CommentList } from './comment-list';
import { DraftMirror } from './draft-mirror';
import { Lease, type LeaseState } from './lease';
import { MeasureList } from './measure-list';
import { measuredWords, Measuring } from './measuring';
import { Rail } from './rail';
import { RepTable } from './rep-table';
import { SaidBefore } from './said-before';
import { Seeing } from './seeing';
import { SentAnswer } from './sent-answer';
import { Transport } from './transport';

/** A measure or a drawing shows while the picture is this near its instant, ms. */
const NEAR_MS = 60;
/** The board: one take, seen from all its views on one clock, and answered. */
@Component({
  selector: 'mf-board-page',
  imports: [
    AnswerForm,
    AskedFor,
    BoardHead,
    BoardPlayer,
    Checklist,
    CommentList,
    EmptyState,
    MatButton,
    MeasureList,
    Plumb,
    ProblemBox,
    Rail,
    RepTable,
    RouterLink,
    SaidBefore,
    SentAnswer,
    Transport,
  ],
  providers: [BoardStore, DraftMirror, Lease, Measuring, Seeing],
  host: { class: 'mf-night' },
  templateUrl: './board-page.html',
  styleUrl: './board-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoardPage {
  private readonly api = inject(BoardApi);
  private readonly router = inject(Router);
  private readonly location = inject(Location);
  private readonly snackbar = inject(Snackbar);
  private readonly session = inject(SessionStore);
  private readonly fragment = inject(ActivatedRoute).snapshot.fragment;
  private readonly composer = viewChild<ElementRef<HTMLInputElement>>('composer');

  protected readonly store = inject(BoardStore);
  protected readonly lease = inject(Lease);
  protected readonly measuring = inject(Measuring);
  protected readonly keys = inject(Keys);
  readonly seeing = inject(Seeing);
  readonly clock = this.seeing.clock;

  readonly takeId = input.required<string>();
  /** The view that is spoken about, from the address. */
  readonly view = input<string>();

  protected readonly noticeActs = NOTICE_ACTS;
  protected readonly measuredWords = measuredWords;

  protected readonly showsThen = signal(true);
  protected readonly openId = signal<string | null>(null);
  private readonly chosenView = signal<View | null>(null);
  private readonly thenView = signal<View | null>(null);

  protected readonly me = computed(() => this.session.user()?.id ?? null);
  protected readonly closed = computed(() => closedWords(this.store.take()?.state ?? 'waiting'));
  protected readonly canWrite = computed(() => {
    const { kind } = this.lease.state();
    return this.closed() === null && (kind === 'held' || kind === 'lapsed');
  });
  protected readonly shown = computed(() => this.store.clips());
  protected readonly active = computed<ClipDto | null>(() => {
    const wanted = this.chosenView() ?? this.view() ?? 'side';
    return this.shown().find((clip) => clip.view === wanted) ?? this.shown()[0] ?? null;
  });
  protected readonly fps = computed(() => this.active()?.fps ?? { num: 30, den: 1 });
  protected readonly activeReps = computed(() => {
    const reps = this.store.repMarks().find((one) => one.clipId === this.active()?.id);
    return reps && reps.marks.length > 0 ? reps : null;
  });
  /** The earlier take's clip that stands beside. */
  protected readonly then = computed<ClipDto | null>(() => {
    if (!this.showsThen()) return null;
    const clips = (this.store.last()?.take.clips ?? []).filter((clip) => clip.media !== null);
    const wanted = this.thenView() ?? this.active()?.view;
    return clips.find((clip) => clip.view === wanted) ?? clips[0] ?? null;
  });
  protected readonly thenLabel = computed(
    () => `take ${String(this.store.last()?.take.number ?? '')}, ${this.then()?.view ?? ''}`,
  );
  protected readonly whereWords = computed(() => {
    const span = this.seeing.span();
    const view = this.active()?.view ?? '';
    return span
      ? `${clipTime(span.startMs)} to ${clipTime(span.endMs)} ${view}`
      : `${clipTime(this.clock.positionMs())} ${view}`;
  });
  protected readonly cues = computed(() => {
    const seen = new Set(this.store.marks().flatMap((mark) => (mark.mark === 'seen' ? [mark.faultId] : [])));
    return (this.store.board()?.lift.faults ?? []).flatMap((fault) =>
      seen.has(fault.id) ? [fault.cue] : [],
    );
  });
  protected readonly notice = computed(() =>
    noticeOf(this.closed(), this.lease.state(), this.lease.wantsNext()),
  );

  constructor() {
    effect(() => {
      const takeId = this.takeId();
      untracked(() => void this.openTake(takeId));
    });
    effect(() => {
      const lengths = [...this.shown(), ...(this.then() ? [this.then()] : [])].map(
        (clip) => clip?.durationMs ?? 0,
      );
      this.clock.durationMs.set(Math.max(0, ...lengths));
    });
    // The address names the view and the instant while the picture stands, so that it can be handed on.
    effect(() => {
      if (this.clock.isPlaying() || !this.store.board()) return;
      const seconds = (this.clock.positionMs() / 1000).toFixed(3);
      const view = this.active()?.view ?? 'side';
      this.location.replaceState(`/board/${this.takeId()}`, `view=${view}#t=${seconds}`);
    });
    let before: LeaseState['kind'] = 'asking';
    effect(() => {
      const { kind } = this.lease.state();
      if (kind === 'held') untracked(() => this.regained(before));
      before = kind;
    });
    const remove = this.keys.register(boardKeys(this), (sign) => this.startTyping(sign));
    inject(DestroyRef).onDestroy(() => {
      remove();
      void this.leave();
    });
  }

  /** Chooses the view that is spoken about. */
  choose(view: View): void {
    if (this.shown().some((clip) => clip.view === view)) this.chosenView.set(view);
  }

  step(frames: number): void {
    this.openId.set(null);
    this.clock.step(frames, this.fps());
  }

  seek(toMs: number): void {
    this.openId.set(null);
    this.clock.pause();
    this.clock.seek(toMs);
  }

  turnBeside(): void {
    this.showsThen.update((shows) => !shows);
  }

  protected turnThen(): void {
    this.thenView.set(this.then()?.view === 'front' ? 'side' : 'front');
  }

  /** Goes to the next comment or the one before. */
  moveComment(by: 1 | -1): void {
    const next = commentBeside(this.store.comments(), this.openId(), this.clock.positionMs(), by);
    if (next) this.open(next);
  }

  protected open(comment: CommentDto): void {
    this.openId.set(comment.id);
    this.choose(comment.view);
    this.clock.pause();
    this.clock.seek(comment.atMs);
  }

  protected goTo(clipId: string, atMs: number): void {
    const clip = this.shown().find((one) => one.id === clipId);
    if (clip) this.choose(clip.view);
    this.seek(atMs);
  }

  protected goToMark(mark: MarkDto | undefined): void {
    if (mark && mark.atMs !== null) this.goTo(mark.clipId ?? '', mark.atMs);
  }

  async pressFault(faultId: string): Promise<void> {
    if (this.canWrite()) await this.store.pressFault(faultId, this.here());
  }

  pressFaultAt(index: number): void {
    const fault = inPhases(this.store.board()?.lift.faults ?? []).flatMap((group) => group.faults)[index];
    if (fault) void this.pressFault(fault.id);
  }

  measure(kind: MeasureKind): void {
    const at = this.here();
    if (!this.canWrite() || !at) return;
    this.clock.pause();
    if (this.measuring.kind() === kind) this.measuring.stop();
    else this.measuring.start(kind, at);
  }

  rep(kind: 'top' | 'bottom'): void {
    const at = this.here();
    if (this.canWrite() && at) void this.store.pressRep(at, kind);
  }

  /** Arrow keys: the last point while measuring, else frames and comments. */
  arrow(byX: number, byY: number): void {
    const active = this.active();
    if (this.measuring.kind() && active) this.measuring.nudge(byX, byY, this.sizeOf(active));
    else if (byX !== 0) this.step(byX);
    else this.moveComment(byY > 0 ? 1 : -1);
  }

  escape(): void {
    if (this.measuring.kind()) this.measuring.stop();
    else this.openId.set(null);
  }

  focusComposer(): void {
    this.clock.pause();
    this.composer()?.nativeElement.focus();
  }

  protected async comment(): Promise<void> {
    const at = this.here();
    if (!at) return;
    const span = this.seeing.span();
    const comment = await this.store.comment(
      span
        ? { ...at, atMs: Math.round(span.startMs), endMs: Math.min(this.lastMs(), Math.round(span.endMs)) }
        : at,
    );
    if (!comment) return;
    this.seeing.isOverSpan.set(false);
    this.openId.set(comment.id);
    // The keys act on the picture again; the next letter starts the next comment.
    this.composer()?.nativeElement.blur();
  }

  protected async deleteComment(comment: CommentDto): Promise<void> {
    if (await this.store.deleteComment(comment)) {
      this.snackbar.offerUndo('Comment deleted.', () => void this.store.restore(comment));
    }
  }

  async send(): Promise<void> {
    const board = this.store.board();
    if (!board || !this.canWrite()) return;
    const missing = missingWords(this.store.draft(), board.lift);
    if (missing.length > 0) {
      this.snackbar.say(`Not sent yet. ${missing.join(' ')}`);
      return;
    }
    if (!(await this.store.send())) return;
    this.lease.end();
    const words = `Sent to ${firstName(board.member.name)}.`;
    const next = await this.nextTake(board.take.id);
    this.snackbar.say(next ? `${words} Here is the next.` : `${words} Nothing else waits.`);
    await this.router.navigate(next ? ['/board', next] : ['/queue']);
  }

  protected async sendReply({ body, done }: { body: string; done: () => void }): Promise<void> {
    if (await this.store.reply(body)) done();
  }

  protected async deleteMeasure(one: MeasureDto): Promise<void> {
    const { clipId, atMs, kind, points, faultId } = one;
    if (!(await this.store.deleteMeasure(one.id))) return;
    this.snackbar.offerUndo('Measure deleted.', () => {
      void this.store.addMeasure({ clipId, atMs, kind, points, faultId });
    });
  }

  protected actOn(act: 'pick-up' | 'wait'): void {
    if (act === 'wait') this.lease.wantsNext.set(true);
    void this.lease.ask();
  }

  /** Nothing can be written on a take that is not held, so it is asked for first. */
  protected async tryAgain(): Promise<void> {
    await this.lease.ask();
    await this.store.flush();
  }

  protected sizeOf(clip: ClipDto): { width: number; height: number } {
    return { width: clip.width ?? 720, height: clip.height ?? 1280 };
  }

  protected measuresOn(clip: ClipDto): MeasureDto[] {
    const at = this.clock.positionMs();
    return this.store
      .measures()
      .filter((one) => one.clipId === clip.id && Math.abs(one.atMs - at) <= NEAR_MS);
  }

  protected drawingOn(clip: ClipDto): Drawing | null {
    const open = this.store.comments().find((one) => one.id === this.openId());
    return open?.clipId === clip.id ? open.drawing : null;
  }

  private here(): Instant | null {
    const clip = this.active();
    if (!clip) return null;
    return { clipId: clip.id, atMs: Math.min(this.lastMs(), Math.round(this.clock.positionMs())) };
  }

  /** The last instant of the clip that is spoken about. */
  private lastMs(): number {
    return Math.max(0, (this.active()?.durationMs ?? 0) - 1);
  }

  private startTyping(sign: string): void {
    const field = this.composer()?.nativeElement;
    if (!field) return;
    this.focusComposer();
    const words = this.store.draft().composer + sign;
    this.store.say({ composer: words });
    field.value = words;
    field.setSelectionRange(words.length, words.length);
  }

  /** The take is this coach's again: words that waited are kept, and what another coach did meanwhile is fetched. */
  private regained(before: LeaseState['kind']): void {
    if (before === 'lapsed') void this.store.flush();
    else if (before === 'taken' || before === 'free') void this.store.load(this.takeId());
  }

  /** Words first, for only who holds the take may keep them. */
  private async leave(): Promise<void> {
    await this.store.flush();
    await this.lease.leave();
  }

  private async openTake(takeId: string): Promise<void> {
    this.openId.set(null);
    this.chosenView.set(null);
    this.measuring.stop();
    this.clock.pause();
    await this.store.load(takeId);
    if (this.closed() === null && this.store.board()) void this.lease.open(takeId);
    const seconds = /^t=(\d+(?:\.\d+)?)$/.exec(this.fragment ?? '')?.[1];
    this.clock.seek(seconds ? Number(seconds) * 1000 : frameStartMs(0, this.fps()));
  }

  private async nextTake(answeredId: string): Promise<string | null> {
    try {
      const { items } = await firstValueFrom(this.api.nextInQueue());
      return items.find((item) => item.take.id !== answeredId)?.take.id ?? null;
    } catch {
      // The answer is sent; the queue page says itself if it cannot be fetched.
      return null;
    }
  }
}
