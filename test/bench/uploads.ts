import { randomBytes } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { Readable } from 'node:stream';
import type { TakeDto } from '../../server/contract';
import type { ObjectStore } from '../../server/platform/object-store';
import type { Stage } from '../support/stage';
import type { World } from '../e2e/support/world';
import { sideBySide, times, ms, type Row } from './table';

const MB = 1024 * 1024;
const SIZE = 100 * MB;
const ROUNDS = 3;
const PARALLEL = 10;

/** Bytes that begin like an MP4 file (ISO/IEC 14496-12); the rest cannot be pressed together. */
function clipBytes(): Buffer<ArrayBuffer> {
  const bytes = randomBytes(SIZE);
  bytes.writeUInt32BE(24, 0);
  bytes.write('ftypisom', 4, 'latin1');
  return bytes as Buffer<ArrayBuffer>;
}

const residentMb = (pid: number): number => {
  const kb = /VmRSS:\s+(\d+) kB/.exec(readFileSync(`/proc/${String(pid)}/status`, 'utf8'))?.[1];
  if (!kb) throw new Error('the api is not running');
  return Number(kb) / 1024;
};

/** 100 MB through the api against the same bytes straight to the store, and what ten at once cost in memory. */
export async function benchUploads(stage: Stage, world: World, store: ObjectStore): Promise<Row[]> {
  const bytes = clipBytes();
  const { api } = world.member;
  const take = await api.ok<TakeDto>('POST', `/api/assignments/${world.assignment.id}/takes`, {});
  const upload = async () => {
    const sent = await api.upload(`/api/takes/${take.id}/clips/front`, bytes);
    if (sent.status !== 201) throw new Error(`an upload was answered ${String(sent.status)}`);
  };
  const { bareMs, oursMs } = await sideBySide(
    ROUNDS,
    () => store.putStream(`bench/${String(Math.random())}`, Readable.from(inParts(bytes)), 'video/mp4'),
    upload,
  );
  await new Promise((resolve) => setTimeout(resolve, 3000));
  const idle = residentMb(stage.api.pid);
  let peak = idle;
  const sampling = setInterval(() => {
    peak = Math.max(peak, residentMb(stage.api.pid));
  }, 50);
  await Promise.all(Array.from({ length: PARALLEL }, upload));
  clearInterval(sampling);
  await store.deletePrefix('bench/');
  return [
    {
      metric: '100 MB upload through the api / straight to the store',
      bare: ms(bareMs),
      ours: ms(oursMs),
      ratio: times(oursMs / bareMs),
      target: '≤ 1.43',
    },
    {
      metric: 'api memory, ten parallel 100 MB uploads / idle',
      bare: `${idle.toFixed(0)} MB`,
      ours: `${peak.toFixed(0)} MB`,
      ratio: `+${(peak - idle).toFixed(0)} MB`,
      target: '≤ +150 MB',
    },
  ];
}

function* inParts(bytes: Buffer): Generator<Buffer> {
  for (let at = 0; at < bytes.length; at += 64 * 1024) yield bytes.subarray(at, at + 64 * 1024);
}
