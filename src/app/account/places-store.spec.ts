import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { of, throwError } from 'rxjs';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { AccountApi, type SignedInPlace } from './account-api';
import { PlacesStore } from './places-store';

function place(id: string, lastUsedAt: string, current = false): SignedInPlace {
  return { id, device: `Device ${id}`, createdAt: '2026-11-01T08:00:00.000Z', lastUsedAt, current };
}

describe('the places where I am signed in', () => {
  const api = { places: vi.fn(), endPlace: vi.fn() };

  async function open(): Promise<PlacesStore> {
    TestBed.configureTestingModule({ providers: [PlacesStore, { provide: AccountApi, useValue: api }] });
    const store = TestBed.inject(PlacesStore);
    await Promise.resolve();
    return store;
  }

  beforeEach(() => {
    vi.resetAllMocks();
    const items = [
      place('old', '2026-11-02T08:00:00.000Z'),
      place('new', '2026-12-01T08:00:00.000Z'),
      place('here', '2026-11-20T08:00:00.000Z', true),
    ];
    api.places.mockReturnValue(of({ items }));
  });

  it('puts this browser first, then the last used', async () => {
    const store = await open();
    expect(store.places()?.map(({ id }) => id)).toEqual(['here', 'new', 'old']);
  });

  it('takes off a place that was ended', async () => {
    const store = await open();
    api.endPlace.mockReturnValue(of(null));
    expect(await store.end('old')).toBe(true);
    expect(store.places()?.map(({ id }) => id)).toEqual(['here', 'new']);
    expect(store.endingId()).toBeNull();
  });

  it('keeps a place that could not be ended, and says why', async () => {
    const store = await open();
    api.endPlace.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 0 })));
    expect(await store.end('old')).toBe(false);
    expect(store.places()).toHaveLength(3);
    expect(store.problem()?.title).toBe('No connection');
  });
});
