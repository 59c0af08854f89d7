import { describe, expect, it } from 'vitest';
import { NewLift } from '../../server/contract/lifts';
import { faultsOf, LIFT_IDS } from '../clip-maker';
import { LIFTS_OF_THE_ARMS } from './lifts-of-the-arms';
import { LIFTS_OF_THE_LEGS } from './lifts-of-the-legs';

const LIFTS = [...LIFTS_OF_THE_LEGS, ...LIFTS_OF_THE_ARMS];

describe('the demo’s library', () => {
  it('holds each drawn lift once', () => {
    expect(LIFTS.map((one) => one.drawn).sort()).toEqual([...LIFT_IDS].sort());
  });

  for (const { drawn, lift, drawnFaults } of LIFTS) {
    it(`says of the ${lift.name.toLowerCase()} what the library takes`, () => {
      const parsed = NewLift.parse(lift);
      expect(parsed.faults.length).toBeGreaterThanOrEqual(6);
      expect(parsed.faults.length).toBeLessThanOrEqual(10);
      expect(new Set(parsed.faults.map((fault) => fault.name)).size).toBe(parsed.faults.length);
      expect(new Set(parsed.faults.map((fault) => fault.cue)).size).toBe(parsed.faults.length);
      expect(new Set(parsed.scales.map((scale) => scale.level))).toContain('easier');
      // A fault is looked for only in a view that the brief asks for.
      for (const fault of parsed.faults) {
        if (fault.view !== 'either') expect(parsed.brief.views).toContain(fault.view);
      }
      const drawable = faultsOf(drawn).map((fault) => fault.id);
      expect([...drawnFaults.values()].sort()).toEqual(drawable.sort());
    });
  }
});
