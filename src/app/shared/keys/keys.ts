import { computed, DestroyRef, DOCUMENT, inject, Injectable, Injector, signal } from '@angular/core';
import { Preferences } from '../preferences/preferences';
import type { KeyBinding } from './key-binding';
import { mayAct, nameOfKey, placeOf } from './key-rules';

/** Keys of one page, put into the registry together and taken out together. */
interface KeySet {
  readonly bindings: readonly KeyBinding[];
  /** Takes a printable sign that no key is bound to. */
  readonly typed?: (sign: string) => void;
}

const OVERLAYS = '[role="dialog"], [role="alertdialog"], [role="menu"], .cdk-overlay-pane [role="listbox"]';

/**
 * The one registry of keys. Pages put their keys in while they are open; it gives each press to the newest that asked
 * for it, and shows them all on the sheet under `?`. Text fields, composition and open overlays are left alone.
 */
@Injectable({ providedIn: 'root' })
export class Keys {
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);
  private readonly preferences = inject(Preferences);
  private readonly sets = signal<readonly KeySet[]>([]);

  /** Every key that acts now, in the order in which pages named them. */
  readonly bindings = computed(() => this.sets().flatMap((set) => set.bindings));

  constructor() {
    const listen = (event: KeyboardEvent): void => this.take(event);
    this.document.addEventListener('keydown', listen);
    inject(DestroyRef).onDestroy(() => this.document.removeEventListener('keydown', listen));
  }

  /**
   * Puts keys in.
   * @param typed takes printable signs that no key is bound to
   * @returns takes them out again
   */
  register(bindings: readonly KeyBinding[], typed?: (sign: string) => void): () => void {
    const set: KeySet = typed ? { bindings, typed } : { bindings };
    this.sets.update((sets) => [...sets, set]);
    return () => this.sets.update((sets) => sets.filter((other) => other !== set));
  }

  /** Opens the sheet of keys. Its code is fetched with the first opening. */
  async showSheet(): Promise<void> {
    const [{ MatDialog }, { KeysSheet }] = await Promise.all([
      import('@angular/material/dialog'),
      import('./keys-sheet'),
    ]);
    this.injector.get(MatDialog).open(KeysSheet, {
      data: this.bindings,
      width: '720px',
      maxWidth: '94vw',
      autoFocus: 'dialog',
    });
  }

  private take(event: KeyboardEvent): void {
    const context = {
      place: placeOf(this.document.activeElement),
      isCovered: this.document.querySelector(OVERLAYS) !== null,
      hasSingleKeys: this.preferences.hasShortcuts(),
    };
    if (!mayAct(event, context)) return;
    const name = nameOfKey(event);
    if (name === '?' && this.bindings().length > 0) {
      event.preventDefault();
      void this.showSheet();
      return;
    }
    for (const set of [...this.sets()].reverse()) {
      const binding = set.bindings.find((candidate) => candidate.key === name);
      if (!binding) continue;
      // Nothing of the page's own may happen twice: Space must not scroll, a letter must not land in a field.
      event.preventDefault();
      if (!event.repeat || binding.repeats === true) binding.run();
      return;
    }
    this.pass(event);
  }

  private pass(event: KeyboardEvent): void {
    if (event.key.length !== 1 || event.key === ' ' || event.ctrlKey || event.metaKey || event.altKey) return;
    const taker = [...this.sets()].reverse().find((set) => set.typed !== undefined);
    if (!taker?.typed || !/\p{L}|@/u.test(event.key)) return;
    event.preventDefault();
    taker.typed(event.key);
  }
}
