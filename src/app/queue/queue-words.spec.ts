import { describe, expect, it } from 'vitest';
import { firstName, holderWords, queueSentence, trainingWords } from './queue-words';

const now = Date.parse('2026-12-01T09:00:00Z');

describe('the words of the queue', () => {
  it('says how many wait and how many hurt', () => {
    expect(queueSentence(0, 0)).toBe('Nothing waits.');
    expect(queueSentence(1, 0)).toBe('One take waits.');
    expect(queueSentence(5, 1)).toBe('Five takes wait. One says it hurts.');
    expect(queueSentence(31, 2)).toBe('31 takes wait. Two say it hurts.');
  });

  it('says when the member trains, in the gym’s zone', () => {
    const trains = (neededBy: string | null) => trainingWords({ neededBy }, now, 'Europe/Stockholm');
    expect(trains('2026-12-01T15:30:00Z')).toBe('trains 16:30');
    expect(trains('2026-12-02T08:00:00Z')).toBe('trains tomorrow 09:00');
    expect(trains(null)).toBe('no rush');
  });

  it('says who has it and for how long, where that is known', () => {
    expect(holderWords('Petru Salas', false, now - 4 * 60_000, now)).toBe('with Petru, 4 min');
    expect(holderWords('Petru Salas', false, null, now)).toBe('with Petru');
    expect(holderWords('Maren Oduya', true, now - 20_000, now)).toBe('with you');
  });

  it('takes the first of a person’s names', () => {
    expect(firstName('Siv Haraldsdóttir')).toBe('Siv');
  });
});
