import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { SessionStore } from '../session/session-store';
import { DraftMirror } from './draft-mirror';

describe('the draft kept in the browser', () => {
  const user = signal({ id: 'maren' });
  let mirror: DraftMirror;

  beforeEach(() => {
    localStorage.clear();
    user.set({ id: 'maren' });
    TestBed.configureTestingModule({
      providers: [DraftMirror, { provide: SessionStore, useValue: { user } }],
    });
    mirror = TestBed.inject(DraftMirror);
  });

  afterEach(() => localStorage.clear());

  it('comes back as it was written, take by take, until it is forgotten', () => {
    mirror.keep('t1', { topCue: 'Sit back', composer: 'and' });
    expect(mirror.read('t1')).toEqual({ topCue: 'Sit back', composer: 'and' });
    expect(mirror.read('t2')).toBeNull();
    mirror.forget('t1');
    expect(mirror.read('t1')).toBeNull();
  });

  it('is not shown to somebody else at the same machine', () => {
    mirror.keep('t1', { topCue: 'Sit back', composer: '' });
    user.set({ id: 'petru' });
    expect(mirror.read('t1')).toBeNull();
  });

  it('is passed over when it cannot be read', () => {
    for (const text of ['{"topCue":', 'null', '{"topCue":1,"composer":""}']) {
      localStorage.setItem('midfoot.draft.maren.t1', text);
      expect(mirror.read('t1')).toBeNull();
    }
  });
});
