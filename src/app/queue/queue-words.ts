import type { QueueItemDto } from '@contract';
import { dayAndTime } from '../shared/times/time-words';

const NUMBERS = [
  'No',
  'One',
  'Two',
  'Three',
  'Four',
  'Five',
  'Six',
  'Seven',
  'Eight',
  'Nine',
  'Ten',
  'Eleven',
  'Twelve',
];

function counted(count: number): string {
  return NUMBERS[count] ?? String(count);
}

/** The queue in a sentence: "Five takes wait. One says it hurts." */
export function queueSentence(waiting: number, hurting: number): string {
  if (waiting === 0) return 'Nothing waits.';
  const wait = waiting === 1 ? 'One take waits.' : `${counted(waiting)} takes wait.`;
  if (hurting === 0) return wait;
  return `${wait} ${hurting === 1 ? 'One says' : `${counted(hurting)} say`} it hurts.`;
}

/** When the member trains the lift, under the time left. */
export function trainingWords(item: Pick<QueueItemDto, 'neededBy'>, nowMs: number, zone: string): string {
  if (item.neededBy === null) return 'no rush';
  const words = dayAndTime(Date.parse(item.neededBy), nowMs, zone);
  return `trains ${words.replace(/^today /, '')}`;
}

/** A person's first name. */
export function firstName(name: string): string {
  return name.trim().split(/\s+/)[0] ?? name;
}

/** Who has the take, and for how long where that is known: "with Petru, 4 min", "with you". */
export function holderWords(name: string, isMe: boolean, sinceMs: number | null, nowMs: number): string {
  const who = `with ${isMe ? 'you' : firstName(name)}`;
  if (sinceMs === null || nowMs - sinceMs < 60_000) return who;
  return `${who}, ${Math.floor((nowMs - sinceMs) / 60_000)} min`;
}
