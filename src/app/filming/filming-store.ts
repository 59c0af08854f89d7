import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { debounceTime, filter, firstValueFrom, merge } from 'rxjs';
import type { AssignmentDto, ClipDto, Refilm, TakeDto, View } from '@contract';
import { problemOf, type Problem } from '../shared/problems/problem';
import { requestKey } from '../shared/request-key/request-key';
import { isOpen, latestTake } from '../shared/take-words/take-words';
import { LiveEvents } from '../shell/live-events';
import { FilmingApi, type Words } from './filming-api';

/** Words are kept this long after the last key, ms. */
const SAVE_AFTER_MS = 600;
const GATHER_MS = 250;

/** How the keeping of what the member says stands. */
export type Saving = 'nothing' | 'pending' | 'saved' | 'failed';

/**
 * One assignment being filmed: its open take, or the one that was handed in last. The draft lives on the server, so
 * that a reload or another phone finds it again; it is made when it is first needed. Provided by the page.
 */
@Injectable()
export class FilmingStore {
  private readonly api = inject(FilmingApi);
  private beginning: Promise<TakeDto> | null = null;
  private beginKey = requestKey();
  private unsaved: Words = {};
  private saveTimer: ReturnType<typeof setTimeout> | undefined;
  private writing: Promise<void> = Promise.resolve();

  readonly assignment = signal<AssignmentDto | null>(null);
  /** The open take; null before it is first needed, and while the last one is on its way. */
  readonly take = signal<TakeDto | null>(null);
  /** The last take that was handed in, while it is what the page shows. */
  readonly sent = signal<TakeDto | null>(null);
  /** The coach's request that this take answers. */
  readonly refilm = signal<Refilm | null>(null);
  readonly problem = signal<Problem | null>(null);
  readonly saving = signal<Saving>('nothing');
  readonly saveProblem = signal<Problem | null>(null);
  readonly submitProblem = signal<Problem | null>(null);
  readonly isSubmitting = signal(false);

  readonly views = computed<readonly View[]>(
    () => this.take()?.views ?? this.refilm()?.views ?? this.assignment()?.lift.brief.views ?? [],
  );
  readonly number = computed(
    () => this.take()?.number ?? (this.assignment()?.myTakes.at(-1)?.number ?? 0) + 1,
  );

  constructor() {
    const live = inject(LiveEvents);
    const destroyRef = inject(DestroyRef);
    live
      .of('clip.progress')
      .pipe(takeUntilDestroyed(destroyRef))
      .subscribe(({ clipId, percent }) => this.noteProgress(clipId, percent ?? 0));
    const changes = live
      .of(
        'clip.ready',
        'clip.unplayable',
        'take.waiting',
        'take.picked-up',
        'take.answered',
        'take.unplayable',
        'take.retried',
      )
      .pipe(filter(({ takeId }) => takeId === (this.take() ?? this.sent())?.id));
    merge(changes, live.resumed)
      .pipe(debounceTime(GATHER_MS), takeUntilDestroyed(destroyRef))
      .subscribe(() => void this.refresh());
    destroyRef.onDestroy(() => void this.flush());
  }

  async load(assignmentId: string): Promise<void> {
    try {
      const assignment = await firstValueFrom(this.api.assignment(assignmentId));
      const latest = latestTake(assignment.myTakes);
      const answer =
        latest?.state === 'answered' ? (await firstValueFrom(this.api.take(latest.id))).answer : null;
      this.refilm.set(answer?.refilm ?? null);
      this.take.set(latest && isOpen(latest) ? latest : null);
      this.sent.set(latest && !isOpen(latest) && latest.state !== 'answered' ? latest : null);
      this.assignment.set(assignment);
      this.problem.set(null);
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  /** Turns from the take that was handed in to a new one. */
  filmAnother(): void {
    this.sent.set(null);
    this.beginKey = requestKey();
  }

  /** The open take, begun now if there is none. Rejects when it cannot be begun. */
  openTake(): Promise<TakeDto> {
    const take = this.take();
    const assignment = this.assignment();
    if (take) return Promise.resolve(take);
    if (!assignment) return Promise.reject(new Error('No assignment is loaded.'));
    this.beginning ??= firstValueFrom(this.api.begin(assignment.id, firstWords(assignment), this.beginKey))
      .then((begun) => {
        this.take.set(begun);
        return begun;
      })
      .finally(() => (this.beginning = null));
    return this.beginning;
  }

  /** Takes over what the member says and keeps it on the server a moment after the last change. */
  say(words: Words): void {
    this.unsaved = { ...this.unsaved, ...words };
    this.saving.set('pending');
    clearTimeout(this.saveTimer);
    this.saveTimer = setTimeout(() => void this.flush(), SAVE_AFTER_MS);
  }

  /** Keeps at once what is not kept yet. What the server refuses is told in `saveProblem`. */
  flush(): Promise<void> {
    clearTimeout(this.saveTimer);
    // One after the other, so that an older word never overtakes a newer one.
    this.writing = this.writing.then(() => this.write());
    return this.writing;
  }

  /** A clip has arrived. */
  noteClip(clip: ClipDto): void {
    this.take.update((take) =>
      take?.id === clip.takeId
        ? { ...take, clips: [...take.clips.filter(({ view }) => view !== clip.view), clip] }
        : take,
    );
    this.submitProblem.set(null);
  }

  /** Removes a clip. Rejects when the server refuses. */
  async removeClip(clip: ClipDto): Promise<void> {
    await firstValueFrom(this.api.remove(clip.id));
    this.take.update((take) =>
      take ? { ...take, clips: take.clips.filter(({ id }) => id !== clip.id) } : take,
    );
  }

  /** Asks the server to prepare an unplayable take once more. */
  async retry(): Promise<void> {
    await this.handIn((takeId) => firstValueFrom(this.api.retry(takeId)));
  }

  /** Hands the take in, with everything said. */
  async submit(): Promise<void> {
    await this.flush();
    if (this.saving() === 'failed') return;
    await this.handIn((takeId) => firstValueFrom(this.api.submit(takeId)));
  }

  private async handIn(act: (takeId: string) => Promise<TakeDto>): Promise<void> {
    const take = this.take();
    if (!take || this.isSubmitting()) return;
    this.isSubmitting.set(true);
    this.submitProblem.set(null);
    try {
      const sent = await act(take.id);
      this.sent.set(sent);
      this.take.set(null);
      this.assignment.update((known) =>
        known ? { ...known, myTakes: [...known.myTakes.filter(({ id }) => id !== sent.id), sent] } : known,
      );
    } catch (error) {
      this.submitProblem.set(problemOf(error));
    } finally {
      this.isSubmitting.set(false);
    }
  }

  private async write(): Promise<void> {
    const words = this.unsaved;
    if (Object.keys(words).length === 0) return;
    this.unsaved = {};
    try {
      const { id } = await this.openTake();
      this.mind(await firstValueFrom(this.api.change(id, words)));
      this.saveProblem.set(null);
      this.saving.set(Object.keys(this.unsaved).length > 0 ? 'pending' : 'saved');
    } catch (error) {
      this.unsaved = { ...words, ...this.unsaved };
      this.saveProblem.set(problemOf(error));
      this.saving.set('failed');
    }
  }

  private async refresh(): Promise<void> {
    const shown = this.take() ?? this.sent();
    if (!shown) return;
    try {
      this.mind(await firstValueFrom(this.api.take(shown.id)));
    } catch (error) {
      // A lost network is told by the banner, and the line's return fetches again.
      if (problemOf(error).status !== 0) this.problem.set(problemOf(error));
    }
  }

  /** Takes over a take as the server tells it; one that turned out unplayable comes back to be mended. */
  private mind(take: TakeDto): void {
    if (this.sent()?.id === take.id) {
      if (take.state !== 'unplayable') return this.sent.set(take);
      this.sent.set(null);
      this.take.set(take);
    } else if (this.take()?.id === take.id) {
      this.take.set(take);
    }
  }

  private noteProgress(clipId: string | null, percent: number): void {
    const note = (take: TakeDto | null): TakeDto | null =>
      take?.clips.some(({ id }) => id === clipId)
        ? {
            ...take,
            clips: take.clips.map((clip) =>
              clip.id === clipId && clip.state !== 'ready'
                ? { ...clip, state: 'processing', progress: Math.max(clip.progress, percent) }
                : clip,
            ),
          }
        : take;
    this.take.update(note);
    this.sent.update(note);
  }
}

/** What a new take says by itself: the assignment's load, and its time while that is ahead. */
function firstWords(assignment: AssignmentDto): Words {
  const isAhead = assignment.trainAt !== null && Date.parse(assignment.trainAt) > Date.now();
  return { load: assignment.load, neededBy: isAhead ? assignment.trainAt : null };
}
