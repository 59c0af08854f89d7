import type { BodyOf, libraryRoutes } from '../../server/contract';
import type { LiftId } from '../clip-maker';

type NewLift = BodyOf<typeof libraryRoutes.createLift>;
type FaultInput = NonNullable<NewLift['faults']>[number];

/** A lift of the demo's library, and the drawn figure's name for it and for those of its faults that it can show. */
export interface LibraryLift {
  readonly drawn: LiftId;
  readonly lift: NewLift;
  /** The drawn fault of each fault that can be drawn, by the fault's name. */
  readonly drawnFaults: ReadonlyMap<string, string>;
}

/** One fault: name, phase, view, cue, drill, and the drawn fault that shows it. */
export type FaultRow = readonly [
  name: string,
  phase: FaultInput['phase'],
  view: FaultInput['view'],
  cue: string,
  drill: string,
  drawn?: string,
];
type ScaleRow = readonly [level: 'easier' | 'same' | 'harder', name: string, note: string];

export function libraryLift(
  drawn: LiftId,
  about: Pick<NewLift, 'name' | 'pattern' | 'brief' | 'tempo'>,
  faults: readonly FaultRow[],
  scales: readonly ScaleRow[],
): LibraryLift {
  return {
    drawn,
    lift: {
      ...about,
      faults: faults.map(([name, phase, view, cue, drill]) => ({ name, phase, view, cue, drill })),
      scales: scales.map(([level, name, note]) => ({ level, name, note })),
    },
    drawnFaults: new Map(faults.flatMap(([name, , , , , id]) => (id ? [[name, id] as const] : []))),
  };
}
