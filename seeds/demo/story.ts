import type {
  AnswerOf,
  AssignmentDto,
  BodyOf,
  LiftDto,
  TakeDto,
  boardRoutes,
  takeRoutes,
} from '../../server/contract';
import type { LiftId, View } from '../clip-maker';
import { fileOf, momentMs, type DrawnPair } from './clips';
import type { Desk, DeskPerson } from './desk';
import { LIBRARY } from './lifts';

type Words = BodyOf<typeof takeRoutes.createTake>;
type SendAnswer = BodyOf<typeof boardRoutes.sendAnswer>;
type Board = AnswerOf<typeof boardRoutes.getBoard>;

/** What a coach says at one instant of a rep: its lowest or highest point, or where the fault spoken of shows. */
export interface Said {
  readonly view: View;
  readonly at: 'bottom' | 'top' | 'fault';
  readonly rep?: number;
  readonly body: string;
  /** The library's name of the fault it is about. */
  readonly fault?: string;
}

export interface Answered {
  readonly said: readonly Said[];
  /** Faults seen, by the library's name; the others are marked clear in the views that show them. */
  readonly seen: readonly string[];
  readonly topCue: string;
  readonly call: SendAnswer['call'];
  /** The scale to use, by its name. */
  readonly scale?: string;
  readonly refilm?: SendAnswer['refilm'];
}

const READY_TRIES = 1200;

async function untilReady(desk: Desk, member: DeskPerson, takeId: string): Promise<TakeDto> {
  for (let tries = 0; tries < READY_TRIES; tries += 1) {
    const take = await desk.call<TakeDto>(member, 'GET', `/api/takes/${takeId}`);
    if (take.state !== 'processing') return take;
    await new Promise((resolve) => setTimeout(resolve, 250));
  }
  throw new Error(`the clips of take ${takeId} were not ready in time`);
}

/** A member films: uploads the pair, says the words, hands the take in, and the worker makes it ready. */
export async function film(
  desk: Desk,
  dir: string,
  member: DeskPerson,
  assignment: AssignmentDto,
  pair: DrawnPair,
  words: Words = {},
): Promise<string> {
  const take = await desk.call<TakeDto>(member, 'POST', `/api/assignments/${assignment.id}/takes`, words);
  for (const view of take.views) await desk.upload(member, take.id, view, fileOf(dir, pair, view));
  await desk.call(member, 'POST', `/api/takes/${take.id}/submit`);
  const ready = await untilReady(desk, member, take.id);
  if (ready.state !== 'waiting') throw new Error(`take ${take.id} is ${ready.state} and not waiting`);
  return take.id;
}

/** A member hands in a clip that turns out to hold no picture. */
export async function filmBroken(
  desk: Desk,
  dir: string,
  member: DeskPerson,
  assignment: AssignmentDto,
  pair: DrawnPair,
  brokenFile: string,
): Promise<void> {
  const take = await desk.call<TakeDto>(member, 'POST', `/api/assignments/${assignment.id}/takes`, {});
  // The worker looks at the clips after the take was handed in, as when both come at once.
  await desk.work(false);
  await desk.upload(member, take.id, 'front', fileOf(dir, pair, 'front'));
  await desk.upload(member, take.id, 'side', brokenFile);
  await desk.call(member, 'POST', `/api/takes/${take.id}/submit`);
  await desk.work(true);
  const ready = await untilReady(desk, member, take.id);
  if (ready.state !== 'unplayable') throw new Error(`take ${take.id} is ${ready.state} and not unplayable`);
}

function faultOf(lift: LiftDto, name: string) {
  const fault = lift.faults.find((one) => one.name === name);
  if (!fault) throw new Error(`${lift.name} has no fault "${name}"`);
  return fault;
}

/** The drawn figure's name for a fault of the library. */
function drawnFault(lift: LiftId, name: string): string {
  const id = LIBRARY.find((one) => one.drawn === lift)?.drawnFaults.get(name);
  if (!id) throw new Error(`the ${lift} can’t be drawn with "${name}"`);
  return id;
}

/** A coach picks the take up, comments at the instants that the drawing is true for, marks, and sends. */
export async function answer(
  desk: Desk,
  coach: DeskPerson,
  takeId: string,
  pair: DrawnPair,
  answered: Answered,
): Promise<void> {
  await desk.call(coach, 'POST', `/api/takes/${takeId}/pick-up`);
  const board = await desk.call<Board>(coach, 'GET', `/api/takes/${takeId}/board`);
  const clipOf = (view: View) => {
    const clip = board.clips.find((one) => one.view === view);
    if (!clip) throw new Error(`take ${takeId} has no ${view} clip`);
    return clip;
  };
  const instantOf = ({ view, at, rep = 1, fault = '' }: Said) =>
    momentMs(pair, view, at === 'fault' ? { fault: drawnFault(pair.lift, fault) } : at, rep);
  for (const said of answered.said) {
    await desk.call(coach, 'POST', `/api/takes/${takeId}/comments`, {
      clipId: clipOf(said.view).id,
      atMs: instantOf(said),
      body: said.body,
      ...(said.fault ? { faultId: faultOf(board.lift, said.fault).id } : {}),
    });
  }
  const seen = new Set(answered.seen.map((name) => faultOf(board.lift, name).id));
  await desk.call(coach, 'PUT', `/api/takes/${takeId}/marks`, {
    marks: board.lift.faults.map((fault) => {
      if (!seen.has(fault.id)) return { faultId: fault.id, mark: 'clear' };
      const said = answered.said.find((one) => one.fault === fault.name);
      return said
        ? { faultId: fault.id, mark: 'seen', clipId: clipOf(said.view).id, atMs: instantOf(said) }
        : { faultId: fault.id, mark: 'seen' };
    }),
  });
  const scale = answered.scale ? board.lift.scales.find((one) => one.name === answered.scale) : undefined;
  await desk.call(coach, 'POST', `/api/takes/${takeId}/answer`, {
    topCue: answered.topCue,
    call: answered.call,
    ...(scale ? { scaleId: scale.id } : {}),
    ...(answered.refilm ? { refilm: answered.refilm } : {}),
  });
}

/** A pair of the lift drawn for one person. */
export const pairOf = (
  lift: LiftId,
  seed: number,
  faults: Record<string, number> = {},
  views: readonly View[] = ['front', 'side'],
): DrawnPair => ({ lift, seed, faults, views });
