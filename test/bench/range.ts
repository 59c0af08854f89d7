import type { ObjectStore } from '../../server/platform/object-store';
import { filmedTake, type World } from '../e2e/support/world';
import { median, ms, timed, times, type Row } from './table';

const CALLS = 60;
const RANGE = { start: 16_384, end: 16_384 + 65_535 };

/** 64 KiB of a film through the api, authorised, against the same bytes of the store itself. */
export async function benchRange(
  store: ObjectStore,
  world: World,
  proxyKeyOf: (clipId: string) => Promise<string>,
): Promise<Row[]> {
  const take = await filmedTake(world.member, world.assignment.id);
  const clip = take.clips.find((one) => one.view === 'side');
  if (!clip?.media) throw new Error('the clip is not ready');
  const key = await proxyKeyOf(clip.id);
  const url = clip.media.proxy;
  const direct = async () => {
    const body = await store.get(key, RANGE);
    for await (const chunk of body ?? []) void chunk;
  };
  const through = async () => {
    const answer = await world.coach.api.fetch(url, {
      headers: { Range: `bytes=${String(RANGE.start)}-${String(RANGE.end)}` },
    });
    if (answer.status !== 206) throw new Error(`the range was answered ${String(answer.status)}`);
    await answer.arrayBuffer();
  };
  for (let i = 0; i < 5; i += 1) {
    await direct();
    await through();
  }
  const [bare, ours]: [number[], number[]] = [[], []];
  for (let i = 0; i < CALLS; i += 1) {
    bare.push(await timed(direct));
    ours.push(await timed(through));
  }
  return [
    {
      metric: '64 KiB range of a film through the api / the store itself',
      bare: ms(median(bare)),
      ours: ms(median(ours)),
      ratio: times(median(ours) / median(bare)),
      target: '≤ 2',
    },
  ];
}
