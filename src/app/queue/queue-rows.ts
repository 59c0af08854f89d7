import type { QueueItemDto } from '@contract';

/** A row as it stands on the screen; `isGone` once its take no longer waits but its place is still held. */
export interface QueueRow {
  readonly item: QueueItemDto;
  readonly isGone: boolean;
}

/** What is shown, and what waits to be shown. */
export interface HeldRows {
  readonly rows: readonly QueueRow[];
  /** Takes that came in and have no row yet. */
  readonly newCount: number;
  /** Whether the order on the screen is no longer that of the queue. */
  readonly isMoved: boolean;
}

/** The rows of a fresh list, in its order. */
export function freshRows(items: readonly QueueItemDto[]): HeldRows {
  return { rows: items.map((item) => ({ item, isGone: false })), newCount: 0, isMoved: false };
}

/**
 * Takes over what changed inside the rows on the screen without moving any of them: what left stays in its place,
 * marked as gone; what came in is only counted.
 */
export function holdRows(shown: readonly QueueRow[], items: readonly QueueItemDto[]): HeldRows {
  const byId = new Map(items.map((item) => [item.take.id, item]));
  const rows = shown.map((row): QueueRow => {
    const item = byId.get(row.item.take.id);
    return item ? { item, isGone: false } : { item: row.item, isGone: true };
  });
  const shownIds = new Set(shown.map((row) => row.item.take.id));
  const kept = items.filter((item) => shownIds.has(item.take.id));
  const staying = rows.filter((row) => !row.isGone);
  return {
    rows,
    newCount: items.length - kept.length,
    isMoved: staying.some((row, index) => row.item.take.id !== kept[index]?.take.id),
  };
}
