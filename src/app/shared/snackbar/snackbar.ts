import { Injectable, signal } from '@angular/core';

/** A short message at the foot of the screen, with at most one thing to do about it. */
export interface Snack {
  id: number;
  text: string;
  actionLabel: string | null;
  act: () => void;
}

const PLAIN_MS = 5_000;
/** Longer, because an undo must be reachable from a keyboard; the clock stops while it is pointed at or focused. */
const UNDO_MS = 12_000;

/** Says what was done. One message shows at a time; a new one takes its place. */
@Injectable({ providedIn: 'root' })
export class Snackbar {
  readonly current = signal<Snack | null>(null);

  private count = 0;
  private timer: ReturnType<typeof setTimeout> | undefined;

  /** Says something that needs no answer. */
  say(text: string): void {
    this.show({ text, actionLabel: null, act: () => undefined });
  }

  /** Says what was done and offers to take it back. */
  offerUndo(text: string, undo: () => void): void {
    this.show({ text, actionLabel: 'Undo', act: undo });
  }

  /** Says something and offers one act, for instance "Try again". */
  offer(text: string, actionLabel: string, act: () => void): void {
    this.show({ text, actionLabel, act });
  }

  act(): void {
    const snack = this.current();
    this.dismiss();
    snack?.act();
  }

  dismiss(): void {
    clearTimeout(this.timer);
    this.current.set(null);
  }

  /** Stops the clock while the message is pointed at or focused. */
  hold(): void {
    clearTimeout(this.timer);
  }

  /** Starts the clock again. */
  release(): void {
    const snack = this.current();
    if (!snack) return;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => this.dismiss(), snack.actionLabel ? UNDO_MS : PLAIN_MS);
  }

  private show(snack: Omit<Snack, 'id'>): void {
    this.current.set({ ...snack, id: ++this.count });
    this.release();
  }
}
