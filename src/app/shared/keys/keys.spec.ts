import { TestBed } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Preferences } from '../preferences/preferences';
import { Keys } from './keys';

function press(key: string, init: KeyboardEventInit = {}): KeyboardEvent {
  const event = new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...init });
  (document.activeElement ?? document.body).dispatchEvent(event);
  return event;
}

describe('the registry of keys', () => {
  let keys: Keys;
  beforeEach(() => (keys = TestBed.inject(Keys)));
  afterEach(() => {
    TestBed.inject(Preferences).switchShortcuts(true);
    document.body.replaceChildren();
  });

  it('runs what a key is bound to, and keeps the browser from acting too', () => {
    const run = vi.fn();
    keys.register([{ key: 'Space', label: 'play', group: 'Seeing', run }]);
    expect(press(' ').defaultPrevented).toBe(true);
    expect(run).toHaveBeenCalledTimes(1);
  });

  it('repeats a held key only where that is asked for', () => {
    const once = vi.fn();
    const again = vi.fn();
    keys.register([
      { key: 'c', label: 'comment', group: 'Saying', run: once },
      { key: 'ArrowRight', label: 'on', group: 'Seeing', run: again, repeats: true },
    ]);
    press('c', { repeat: true });
    press('ArrowRight', { repeat: true });
    expect(once).not.toHaveBeenCalled();
    expect(again).toHaveBeenCalledTimes(1);
  });

  it('forgets the keys of a page that was left', () => {
    const run = vi.fn();
    const remove = keys.register([{ key: 'c', label: 'comment', group: 'Saying', run }]);
    remove();
    press('c');
    expect(run).not.toHaveBeenCalled();
    expect(keys.bindings()).toEqual([]);
  });

  it('hands letters that nobody is bound to on as typing', () => {
    const typed = vi.fn();
    keys.register([{ key: 'c', label: 'comment', group: 'Saying', run: () => undefined }], typed);
    press('k');
    press('c');
    press('7');
    expect(typed.mock.calls).toEqual([['k']]);
  });

  it('does nothing while a text field has the focus or single keys are off', () => {
    const run = vi.fn();
    keys.register([{ key: 'c', label: 'comment', group: 'Saying', run }]);
    const field = document.body.appendChild(document.createElement('textarea'));
    field.focus();
    press('c');
    field.blur();
    TestBed.inject(Preferences).switchShortcuts(false);
    press('c');
    expect(run).not.toHaveBeenCalled();
  });

  it('does nothing while a dialog is open', () => {
    const run = vi.fn();
    keys.register([{ key: 'c', label: 'comment', group: 'Saying', run }]);
    const dialog = document.body.appendChild(document.createElement('div'));
    dialog.setAttribute('role', 'dialog');
    press('c');
    expect(run).not.toHaveBeenCalled();
  });
});
