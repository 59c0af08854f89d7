import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { of, Subject, throwError, type Observable } from 'rxjs';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { AssignmentDetailDto, AssignmentDto, EventDto, LiftDto, Page } from '@contract';
import { LiveEvents } from '../shell/live-events';
import { AssignmentStore } from './assignment-store';
import { AssignmentsApi } from './assignments-api';
import { AssignmentsStore } from './assignments-store';

const LIFT: LiftDto = {
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
};

function assignment(id: string, change: Partial<AssignmentDto> = {}): AssignmentDto {
  return {
    id,
    lift: LIFT,
    title: `Film ${id}`,
    note: null,
    load: null,
    reps: null,
    rounds: null,
    trainAt: null,
    untilAnsweredScaleId: null,
    audience: { all: true },
    createdBy: { id: 'c', name: 'Maren Oduya' },
    createdAt: '2026-12-01T08:00:00.000Z',
    closedAt: null,
    counts: { asked: 2, filmed: 0 },
    myTakes: [],
    ...change,
  };
}

/** A page of `count` assignments, numbered from `from`. */
function page(from: number, count: number, next: string | null): Observable<Page<AssignmentDto>> {
  return of({ items: Array.from({ length: count }, (_one, i) => assignment(`a${from + i}`)), next });
}

const OUT_OF_REACH = new HttpErrorResponse({ status: 0 });

describe('the stores of assignments', () => {
  const happened = new Subject<EventDto>();
  const resumed = new Subject<void>();
  const api = {
    assignments: vi.fn<(limit: number, cursor?: string) => Observable<Page<AssignmentDto>>>(),
    assignment: vi.fn<(id: string) => Observable<AssignmentDetailDto>>(),
    close: vi.fn<(id: string) => Observable<AssignmentDto>>(),
    reopen: vi.fn<(id: string) => Observable<AssignmentDto>>(),
  };

  beforeEach(() => {
    vi.useFakeTimers();
    vi.resetAllMocks();
    TestBed.configureTestingModule({
      providers: [
        AssignmentsStore,
        AssignmentStore,
        { provide: AssignmentsApi, useValue: api },
        { provide: LiveEvents, useValue: { of: () => happened, resumed } },
      ],
    });
  });

  afterEach(() => vi.useRealTimers());

  it('show a page, then one more, and refresh both after an event', async () => {
    api.assignments.mockReturnValueOnce(page(0, 50, 'second'));
    const store = TestBed.inject(AssignmentsStore);
    await vi.advanceTimersByTimeAsync(0);
    expect(store.assignments()?.length).toBe(50);
    expect(store.hasMore()).toBe(true);

    api.assignments.mockReturnValueOnce(page(0, 50, 'second')).mockReturnValueOnce(page(50, 20, null));
    await store.more();
    expect(api.assignments).toHaveBeenLastCalledWith(50, 'second');
    expect(store.assignments()?.length).toBe(70);
    expect(store.hasMore()).toBe(false);

    api.assignments.mockReturnValueOnce(page(100, 50, 'second')).mockReturnValueOnce(page(150, 21, null));
    happened.next({} as EventDto);
    happened.next({} as EventDto);
    await vi.advanceTimersByTimeAsync(1000);
    expect(api.assignments).toHaveBeenCalledTimes(5);
    expect(store.assignments()?.at(0)?.id).toBe('a100');
    expect(store.assignments()?.length).toBe(71);
  });

  it('ask for nothing more at the end', async () => {
    api.assignments.mockReturnValueOnce(page(0, 3, null));
    const store = TestBed.inject(AssignmentsStore);
    await vi.advanceTimersByTimeAsync(0);
    await store.more();
    expect(api.assignments).toHaveBeenCalledTimes(1);
  });

  it('keep the list when a fetch fails, say so, and recover', async () => {
    api.assignments.mockReturnValueOnce(page(0, 3, null));
    const store = TestBed.inject(AssignmentsStore);
    await vi.advanceTimersByTimeAsync(0);
    api.assignments.mockReturnValueOnce(throwError(() => OUT_OF_REACH));
    await store.refresh();
    expect(store.assignments()?.length).toBe(3);
    expect(store.problem()?.title).toBe('No connection');
    api.assignments.mockReturnValueOnce(page(0, 4, null));
    await store.refresh();
    expect(store.assignments()?.length).toBe(4);
    expect(store.problem()).toBeNull();
  });

  it('close and open an assignment again without losing who was asked', async () => {
    const asked = [{ member: { id: 'm', name: 'Tove Lindqvist' }, takes: 0, latest: null }];
    const store = TestBed.inject(AssignmentStore);
    api.assignment.mockReturnValueOnce(of({ ...assignment('a1'), asked }));
    await store.open('a1');

    api.close.mockReturnValueOnce(of(assignment('a1', { closedAt: '2026-12-01T10:00:00.000Z' })));
    expect(await store.setClosed(true)).toBe(true);
    expect(store.assignment()?.closedAt).toBe('2026-12-01T10:00:00.000Z');
    expect(store.assignment()?.asked).toEqual(asked);

    api.reopen.mockReturnValueOnce(throwError(() => OUT_OF_REACH));
    expect(await store.setClosed(false)).toBe(false);
    expect(store.assignment()?.closedAt).toBe('2026-12-01T10:00:00.000Z');
    expect(store.problem()?.title).toBe('No connection');
  });
});
