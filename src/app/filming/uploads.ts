import { HttpEventType } from '@angular/common/http';
import { computed, DestroyRef, DOCUMENT, inject, Injectable, signal } from '@angular/core';
import type { Subscription } from 'rxjs';
import type { View } from '@contract';
import { problemOf } from '../shared/problems/problem';
import { requestKey } from '../shared/request-key/request-key';
import { checkFile, checkVideo, readVideo } from './file-checks';
import { FilmingApi } from './filming-api';
import { FilmingStore } from './filming-store';
import { IDLE, isDrop, isUnderWay, nextUpload, retryWaitMs, type Upload, type UploadEvent } from './upload';

/** A server that refuses a large file may cut the line, which looks like a lost network: do not try for ever. */
const MOST_TRIES = 6;

type Uploads = Readonly<Record<View, Upload>>;

/** The sending of both views from this browser. Provided by the page. */
@Injectable()
export class ClipUploads {
  private readonly api = inject(FilmingApi);
  private readonly store = inject(FilmingStore);
  private readonly document = inject(DOCUMENT);
  private readonly running = new Map<View, Subscription>();
  private readonly timers = new Map<View, ReturnType<typeof setTimeout>>();

  readonly state = signal<Uploads>({ front: IDLE, side: IDLE });
  readonly isBusy = computed(() => Object.values(this.state()).some(isUnderWay));

  constructor() {
    const window = this.document.defaultView;
    const resume = (): void => {
      for (const view of this.stopped()) void this.send(view);
    };
    window?.addEventListener('online', resume);
    inject(DestroyRef).onDestroy(() => {
      window?.removeEventListener('online', resume);
      for (const subscription of this.running.values()) subscription.unsubscribe();
      for (const timer of this.timers.values()) clearTimeout(timer);
    });
  }

  /** Checks a file and sends it. */
  async choose(view: View, file: File): Promise<void> {
    this.halt(view);
    const chosen = { file, key: requestKey() };
    this.step(view, { type: 'chosen', chosen });
    const refusal = checkFile(file) ?? checkVideo(await readVideo(file, this.document));
    const now = this.state()[view];
    // Another file was chosen, or this one given up, while it was looked at.
    if (now.kind !== 'checking' || now.chosen !== chosen) return;
    if (refusal) this.step(view, { type: 'refused', refusal });
    else await this.send(view);
  }

  cancel(view: View): void {
    this.halt(view);
    this.step(view, { type: 'cancelled' });
  }

  /** Sends the kept file once more, from its start. */
  async send(view: View): Promise<void> {
    this.halt(view);
    this.step(view, { type: 'started' });
    const state = this.state()[view];
    if (state.kind !== 'sending') return;
    try {
      const take = await this.store.openTake();
      if (this.state()[view] !== state) return;
      this.running.set(view, this.follow(view, take.id, state.chosen.file, state.chosen.key));
    } catch (error) {
      this.fail(view, error);
    }
  }

  private follow(view: View, takeId: string, file: File, key: string): Subscription {
    return this.api.send(takeId, view, file, key).subscribe({
      next: (event) => {
        if (event.type === HttpEventType.UploadProgress) {
          const totalBytes = event.total ?? file.size;
          this.step(view, {
            type: 'progressed',
            sentBytes: event.loaded,
            totalBytes,
            atMs: performance.now(),
          });
        } else if (event.type === HttpEventType.Response && event.body) {
          this.store.noteClip(event.body);
          this.step(view, { type: 'arrived' });
        }
      },
      error: (error: unknown) => this.fail(view, error),
    });
  }

  private fail(view: View, error: unknown): void {
    const problem = problemOf(error);
    const state = this.state()[view];
    const tries = state.kind === 'sending' ? state.tries : 0;
    if (!isDrop(problem) || tries >= MOST_TRIES) return this.step(view, { type: 'failed', problem });
    this.step(view, { type: 'dropped' });
    this.timers.set(
      view,
      setTimeout(() => void this.send(view), retryWaitMs(tries)),
    );
  }

  private stopped(): View[] {
    const { front, side } = this.state();
    return [
      ...(front.kind === 'stopped' ? ['front' as const] : []),
      ...(side.kind === 'stopped' ? ['side' as const] : []),
    ];
  }

  private step(view: View, event: UploadEvent): void {
    this.state.update((states) => ({ ...states, [view]: nextUpload(states[view], event) }));
  }

  private halt(view: View): void {
    this.running.get(view)?.unsubscribe();
    clearTimeout(this.timers.get(view));
  }
}
