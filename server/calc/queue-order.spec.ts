import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { answerBy, compareQueuePlaces, queueRank, type QueuePlace } from './queue-order';

const at = (hour: number) => new Date(Date.UTC(2026, 11, 1, hour));

describe('answer by', () => {
  it('is the earlier of when the answer is needed and the end of the promise', () => {
    expect(answerBy(at(9), at(12))).toEqual(at(9));
    expect(answerBy(at(15), at(12))).toEqual(at(12));
    expect(answerBy(null, at(12))).toEqual(at(12));
  });
});

describe('the order of the queue', () => {
  it('puts pain first, then what is due first, then the oldest', () => {
    const places: QueuePlace[] = [
      { rank: queueRank(false), answerBy: at(9), id: 'c' },
      { rank: queueRank(false), answerBy: at(8), id: 'd' },
      { rank: queueRank(true), answerBy: at(20), id: 'e' },
      { rank: queueRank(false), answerBy: at(9), id: 'b' },
    ];
    expect(places.sort(compareQueuePlaces).map((place) => place.id)).toEqual(['e', 'd', 'b', 'c']);
  });

  it('keeps the worst lateness least (Jackson 1955): no other order of the same work does better', () => {
    const job = fc.record({ length: fc.integer({ min: 1, max: 9 }), due: fc.integer({ min: 1, max: 20 }) });
    const worst = (jobs: readonly { length: number; due: number }[]) => {
      let clock = 0;
      return Math.max(...jobs.map(({ length, due }) => (clock += length) - due));
    };
    fc.assert(
      fc.property(fc.array(job, { minLength: 1, maxLength: 5 }), (jobs) => {
        const ours = jobs
          .map((entry, i) => ({ ...entry, rank: 1, answerBy: at(entry.due), id: String(i) }))
          .sort(compareQueuePlaces);
        expect(worst(ours)).toBe(Math.min(...orders(jobs).map(worst)));
      }),
      { numRuns: 100 },
    );
  });
});

function orders<T>(items: readonly T[]): T[][] {
  if (items.length < 2) return [[...items]];
  return items.flatMap((item, i) =>
    orders([...items.slice(0, i), ...items.slice(i + 1)]).map((rest) => [item, ...rest]),
  );
}
