import { provideHttpClient } from '@angular/common/http';
import {
  HttpTestingController,
  provideHttpClientTesting,
  type TestRequest,
} from '@angular/common/http/testing';
import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Subject } from 'rxjs';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { BoardDto, CommentDto, DraftAnswer, EventDto } from '@contract';
import { LiveEvents } from '../shell/live-events';
import { SessionStore } from '../session/session-store';
import { BoardStore } from './board-store';
import { DraftMirror } from './draft-mirror';

const DRAFT: DraftAnswer = { topCue: 'Sit back', composer: '' };

const board = (id: string, change: Partial<BoardDto> = {}): BoardDto =>
  ({
    take: { id, state: 'picked-up', clips: [] },
    lift: { faults: [{ id: 'f1' }, { id: 'f2' }], scales: [] },
    clips: [],
    comments: [],
    marks: [],
    measures: [],
    repMarks: [],
    draft: null,
    answer: null,
    earlierTakes: [],
    ...change,
  }) as unknown as BoardDto;

const comment = (id: string, atMs: number, body = 'Heels lift'): CommentDto => ({
  id,
  takeId: 't1',
  clipId: 'c1',
  view: 'side',
  atMs,
  endMs: null,
  body,
  drawing: null,
  faultId: null,
  author: { id: 'me', name: 'Maren Oduya' },
  createdAt: '2026-12-01T08:00:00.000Z',
});

const LAPSED = {
  type: 'about:blank',
  title: 'Not picked up',
  status: 409,
  detail: 'Pick the take up before you write on it.',
};

describe('the store of the board', () => {
  const happened = new Subject<EventDto>();
  let http: HttpTestingController;
  let store: BoardStore;

  /** Lets promises that stand ready go on. */
  const settle = () => vi.advanceTimersByTimeAsync(0);
  const waiting = (method: string, url: string): TestRequest => http.expectOne({ method, url });
  const refuse = (request: TestRequest) => request.flush(LAPSED, { status: 409, statusText: 'Conflict' });

  async function open(dto: BoardDto = board('t1')): Promise<void> {
    const loaded = store.load(dto.take.id);
    await settle();
    waiting('GET', `/api/takes/${dto.take.id}/board`).flush(dto);
    await loaded;
  }

  beforeEach(() => {
    vi.useFakeTimers();
    localStorage.clear();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        BoardStore,
        DraftMirror,
        { provide: SessionStore, useValue: { user: signal({ id: 'me' }) } },
        { provide: LiveEvents, useValue: { of: () => happened, resumed: new Subject() } },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    store = TestBed.inject(BoardStore);
  });

  afterEach(() => {
    http.verify();
    vi.useRealTimers();
    localStorage.clear();
  });

  it('keeps a draft in the browser at once and on the server a moment later, once', async () => {
    await open();
    store.say({ topCue: 'Sit' });
    store.say({ topCue: 'Sit back' });
    expect(TestBed.inject(DraftMirror).read('t1')).toEqual(DRAFT);
    expect(store.saving()).toBe('pending');
    await vi.advanceTimersByTimeAsync(2000);
    const put = waiting('PUT', '/api/takes/t1/draft');
    expect(put.request.body).toEqual(DRAFT);
    put.flush(DRAFT);
    await settle();
    expect(store.saving()).toBe('saved');
    expect(TestBed.inject(DraftMirror).read('t1')).toBeNull();
  });

  it('keeps words in the browser that the server would not take, and sends them when asked again', async () => {
    await open();
    store.say({ topCue: 'Sit back' });
    await vi.advanceTimersByTimeAsync(2000);
    refuse(waiting('PUT', '/api/takes/t1/draft'));
    await settle();
    expect(store.saving()).toBe('failed');
    expect(store.writeProblem()?.detail).toBe(LAPSED.detail);
    expect(TestBed.inject(DraftMirror).read('t1')).toEqual(DRAFT);
    const again = store.flush();
    await settle();
    waiting('PUT', '/api/takes/t1/draft').flush(DRAFT);
    await again;
    expect(store.saving()).toBe('saved');
    expect(store.writeProblem()).toBeNull();
  });

  it('prefers words that never reached the server to those it has', async () => {
    TestBed.inject(DraftMirror).keep('t1', DRAFT);
    await open(board('t1', { draft: { topCue: 'Older', composer: '' } }));
    expect(store.draft().topCue).toBe('Sit back');
    await vi.advanceTimersByTimeAsync(2000);
    expect(waiting('PUT', '/api/takes/t1/draft').request.body).toEqual(DRAFT);
  });

  it('keeps the words of one take before it shows another, which starts from its own', async () => {
    await open();
    store.say({ topCue: 'Sit back' });
    const loaded = store.load('t2');
    await settle();
    waiting('PUT', '/api/takes/t1/draft').flush(DRAFT);
    await settle();
    expect(store.board()).toBeNull();
    waiting('GET', '/api/takes/t2/board').flush(board('t2', { draft: { topCue: 'Other', composer: '' } }));
    await loaded;
    expect(store.draft().topCue).toBe('Other');
    expect(store.saving()).toBe('nothing');
  });

  it('puts a comment in its place in time and empties the composer', async () => {
    await open(board('t1', { comments: [comment('k1', 1000)] }));
    store.say({ composer: ' Heels lift ' });
    const made = store.comment({ clipId: 'c1', atMs: 400 });
    await settle();
    const post = waiting('POST', '/api/takes/t1/comments');
    expect(post.request.body).toEqual({ clipId: 'c1', atMs: 400, body: 'Heels lift' });
    expect(post.request.headers.has('Idempotency-Key')).toBe(true);
    post.flush(comment('k2', 400));
    await made;
    expect(store.comments().map((one) => one.id)).toEqual(['k2', 'k1']);
    expect(store.draft().composer).toBe('');
  });

  it('makes one comment of an Enter pressed twice, and keeps what is typed meanwhile', async () => {
    await open();
    store.say({ composer: 'Heels lift' });
    const first = store.comment({ clipId: 'c1', atMs: 400 });
    expect(await store.comment({ clipId: 'c1', atMs: 400 })).toBeNull();
    store.say({ composer: 'Heels lift and' });
    await settle();
    waiting('POST', '/api/takes/t1/comments').flush(comment('k1', 400));
    await first;
    expect(store.draft().composer).toBe('Heels lift and');
  });

  it('loses no words when a comment is refused', async () => {
    await open();
    store.say({ composer: 'Heels lift' });
    const made = store.comment({ clipId: 'c1', atMs: 400 });
    await settle();
    refuse(waiting('POST', '/api/takes/t1/comments'));
    expect(await made).toBeNull();
    expect(store.draft().composer).toBe('Heels lift');
    expect(store.comments()).toEqual([]);
  });

  it('gives a fault that is seen the instant, and one that is clear none', async () => {
    await open();
    const at = { clipId: 'c1', atMs: 900 };
    const seen = store.pressFault('f1', at);
    await settle();
    const put = waiting('PUT', '/api/takes/t1/marks');
    expect(put.request.body).toEqual({ marks: [{ faultId: 'f1', mark: 'seen', ...at }] });
    put.flush({ marks: [] });
    await seen;
    const clear = store.pressFault('f1', at);
    await settle();
    const next = waiting('PUT', '/api/takes/t1/marks');
    expect(next.request.body).toEqual({
      marks: [{ faultId: 'f1', mark: 'clear', clipId: null, atMs: null }],
    });
    next.flush({ marks: [] });
    await clear;
  });

  it('takes a mark back that the server did not take', async () => {
    await open();
    const pressed = store.pressFault('f1', null);
    expect(store.marks()).toHaveLength(1);
    await settle();
    refuse(waiting('PUT', '/api/takes/t1/marks'));
    await pressed;
    expect(store.marks()).toEqual([]);
  });

  it('builds each rep mark on the one pressed just before', async () => {
    await open();
    const top = store.pressRep({ clipId: 'c1', atMs: 100 }, 'top');
    const bottom = store.pressRep({ clipId: 'c1', atMs: 900 }, 'bottom');
    await settle();
    const marks = [{ atMs: 100, kind: 'top' }];
    waiting('PUT', '/api/clips/c1/rep-marks').flush({ clipId: 'c1', marks, tempo: [] });
    await top;
    await settle();
    const second = waiting('PUT', '/api/clips/c1/rep-marks');
    expect(second.request.body).toEqual({ marks: [...marks, { atMs: 900, kind: 'bottom' }] });
    second.flush({ clipId: 'c1', marks: [...marks, { atMs: 900, kind: 'bottom' }], tempo: [] });
    await bottom;
    expect(store.repMarks()[0]?.marks).toHaveLength(2);
  });

  it('sends the answer once and forgets the draft', async () => {
    await open();
    store.say({ topCue: 'Sit back', call: 'go' });
    const sent = store.send();
    expect(await store.send()).toBe(false);
    await settle();
    const post = waiting('POST', '/api/takes/t1/answer');
    expect(post.request.body).toEqual({ topCue: 'Sit back', call: 'go' });
    post.flush({});
    expect(await sent).toBe(true);
    await vi.advanceTimersByTimeAsync(5000);
    expect(TestBed.inject(DraftMirror).read('t1')).toBeNull();
  });

  it('does not send what lacks something', async () => {
    await open();
    expect(await store.send()).toBe(false);
  });

  it('shows what another coach did, and leaves what is being written alone', async () => {
    await open();
    store.say({ topCue: 'Sit back' });
    happened.next({ seq: 1, type: 'board.changed', takeId: 't1', actorId: 'you' } as EventDto);
    await vi.advanceTimersByTimeAsync(500);
    waiting('GET', '/api/takes/t1/board').flush(board('t1', { comments: [comment('k9', 10)] }));
    await settle();
    expect(store.comments()).toHaveLength(1);
    expect(store.draft().topCue).toBe('Sit back');
  });
});
