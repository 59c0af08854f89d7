import { distanceM, phoneHeight, repsWords } from './brief-words';

describe('the brief in words', () => {
  it('says the height of the phone by the body', () => {
    expect([40, 59, 60, 100, 115, 140].map(phoneHeight)).toEqual([
      'knee',
      'knee',
      'hip',
      'hip',
      'chest',
      'chest',
    ]);
  });

  it('says the distance to the nearest half metre', () => {
    expect([300, 240, 260, 10].map(distanceM)).toEqual([3, 2.5, 2.5, 0.5]);
  });

  it('says how many reps are wanted', () => {
    expect(repsWords({ repsMin: 1, repsMax: 1 })).toBe('1 rep');
    expect(repsWords({ repsMin: 3, repsMax: 3 })).toBe('3 reps');
    expect(repsWords({ repsMin: 2, repsMax: 3 })).toBe('2 or 3 reps');
    expect(repsWords({ repsMin: 2, repsMax: 5 })).toBe('2 to 5 reps');
  });
});
