import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { Subject, of, throwError, type Observable } from 'rxjs';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { EventDto, LiftDto } from '@contract';
import { LiveEvents } from '../shell/live-events';
import { LiftStore } from './lift-store';
import { LiftsApi } from './lifts-api';
import { LiftsStore } from './lifts-store';

function lift(change: Partial<LiftDto> = {}): LiftDto {
  return {
    id: 'l1',
    name: 'Goblet squat',
    pattern: 'squat',
    brief: {
      views: ['side'],
      repsMin: 2,
      repsMax: 3,
      cameraHeightCm: 90,
      cameraDistanceCm: 300,
      inFrame: '',
      note: '',
    },
    tempo: null,
    faults: [],
    scales: [],
    createdAt: '2026-11-02T08:00:00.000Z',
    archivedAt: null,
    ...change,
  };
}

const OUT_OF_REACH = new HttpErrorResponse({ status: 0 });

describe('the stores of lifts', () => {
  const happened = new Subject<EventDto>();
  const resumed = new Subject<void>();
  const api = {
    lifts: vi.fn<() => Observable<{ items: LiftDto[] }>>(),
    lift: vi.fn<(id: string) => Observable<LiftDto>>(),
    change: vi.fn<(id: string, change: object) => Observable<LiftDto>>(),
  };

  beforeEach(() => {
    vi.useFakeTimers();
    vi.resetAllMocks();
    TestBed.configureTestingModule({
      providers: [
        LiftStore,
        LiftsStore,
        { provide: LiftsApi, useValue: api },
        { provide: LiveEvents, useValue: { of: () => happened, resumed } },
      ],
    });
  });

  afterEach(() => vi.useRealTimers());

  it('fetch the library at once, and once for a bunch of events', async () => {
    api.lifts.mockReturnValueOnce(of({ items: [lift()] }));
    const store = TestBed.inject(LiftsStore);
    await vi.advanceTimersByTimeAsync(0);
    expect(store.lifts()?.map(({ name }) => name)).toEqual(['Goblet squat']);

    api.lifts.mockReturnValueOnce(of({ items: [lift({ name: 'Front squat' })] }));
    happened.next({} as EventDto);
    resumed.next();
    await vi.advanceTimersByTimeAsync(1000);
    expect(api.lifts).toHaveBeenCalledTimes(2);
    expect(store.lifts()?.map(({ name }) => name)).toEqual(['Front squat']);
  });

  it('keep what is shown when a fetch fails, and say so', async () => {
    api.lifts.mockReturnValueOnce(of({ items: [lift()] }));
    const store = TestBed.inject(LiftsStore);
    await vi.advanceTimersByTimeAsync(0);
    api.lifts.mockReturnValueOnce(throwError(() => OUT_OF_REACH));
    await store.load();
    expect(store.lifts()?.length).toBe(1);
    expect(store.problem()?.title).toBe('No connection');
  });

  it('drop the answer that a later question overtook', async () => {
    const slow = new Subject<LiftDto>();
    const store = TestBed.inject(LiftStore);
    api.lift.mockReturnValueOnce(slow);
    const first = store.open('l1');
    api.lift.mockReturnValueOnce(of(lift({ id: 'l2', name: 'Row' })));
    await store.open('l2');
    slow.next(lift());
    slow.complete();
    await first;
    expect(store.lift()?.name).toBe('Row');
  });

  it('archive the open lift, or say why not', async () => {
    const store = TestBed.inject(LiftStore);
    api.lift.mockReturnValueOnce(of(lift()));
    await store.open('l1');
    api.change.mockReturnValueOnce(throwError(() => OUT_OF_REACH));
    expect(await store.setArchived(true)).toBe(false);
    expect(store.problem()?.title).toBe('No connection');
    expect(store.lift()?.archivedAt).toBeNull();

    api.change.mockReturnValueOnce(of(lift({ archivedAt: '2026-12-01T10:00:00.000Z' })));
    expect(await store.setArchived(true)).toBe(true);
    expect(api.change).toHaveBeenLastCalledWith('l1', { archived: true });
    expect(store.lift()?.archivedAt).not.toBeNull();
    expect(store.problem()).toBeNull();
  });
});
