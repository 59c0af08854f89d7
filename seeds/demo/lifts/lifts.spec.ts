import { describe, expect, it } from 'vitest';
import { NewLift } from '../../../server/contract/lifts';
import { faultsOf, LIFT_IDS } from '../../clip-maker';
import { LIBRARY } from '.';

describe('the demo’s library', () => {
  it('holds each drawn lift once', () => {
    expect(LIBRARY.map((one) => one.drawn).sort()).toEqual([...LIFT_IDS].sort());
  });

  for (const { drawn, lift, drawnFaults } of LIBRARY) {
    it(`says of the ${lift.name.toLowerCase()} what the library takes`, () => {
      const parsed = NewLift.parse(lift);
      expect(parsed.faults.length).toBeGreaterThanOrEqual(6);
      expect(parsed.faults.length).toBeLessThanOrEqual(10);
      expect(new Set(parsed.faults.map((fault) => fault.name)).size).toBe(parsed.faults.length);
      expect(new Set(parsed.faults.map((fault) => fault.cue)).size).toBe(parsed.faults.length);
      // A cue is short enough to be said aloud between two reps.
      for (const fault of parsed.faults) expect(fault.cue.length).toBeLessThanOrEqual(70);
      expect([...new Set(parsed.scales.map((scale) => scale.level))].sort()).toEqual([
        'easier',
        'harder',
        'same',
      ]);
      // A fault is looked for only in a view that the brief asks for.
      for (const fault of parsed.faults) {
        if (fault.view !== 'either') expect(parsed.brief.views).toContain(fault.view);
      }
      const drawable = faultsOf(drawn).map((fault) => fault.id);
      expect([...drawnFaults.values()].sort()).toEqual(drawable.sort());
    });
  }
});
