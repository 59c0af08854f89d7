import { describe, expect, it } from 'vitest';
import type { QueueItemDto } from '@contract';
import { freshRows, holdRows } from './queue-rows';

const item = (id: string, holder: string | null = null) =>
  ({ take: { id }, pickedUpBy: holder === null ? null : { id: holder, name: holder } }) as QueueItemDto;
const ids = (held: { rows: readonly { item: QueueItemDto }[] }) => held.rows.map((row) => row.item.take.id);

describe('the queue while somebody points at it', () => {
  const shown = freshRows([item('a'), item('b'), item('c')]).rows;

  it('moves nothing when a take comes in, but counts it', () => {
    const held = holdRows(shown, [item('new'), item('a'), item('b'), item('c')]);
    expect(ids(held)).toEqual(['a', 'b', 'c']);
    expect(held.newCount).toBe(1);
    expect(held.isMoved).toBe(false);
  });

  it('keeps the place of a take that left and marks it as gone', () => {
    const held = holdRows(shown, [item('a'), item('c')]);
    expect(ids(held)).toEqual(['a', 'b', 'c']);
    expect(held.rows.map((row) => row.isGone)).toEqual([false, true, false]);
    expect(held.isMoved).toBe(false);
  });

  it('shows at once who has picked a take up', () => {
    const held = holdRows(shown, [item('a', 'Petru'), item('b'), item('c')]);
    expect(held.rows[0]?.item.pickedUpBy?.name).toBe('Petru');
  });

  it('tells when the order is another', () => {
    const held = holdRows(shown, [item('c'), item('a'), item('b')]);
    expect(ids(held)).toEqual(['a', 'b', 'c']);
    expect(held.isMoved).toBe(true);
  });

  it('takes a row back that was gone and waits again', () => {
    const gone = holdRows(shown, [item('a'), item('c')]);
    const held = holdRows(gone.rows, [item('a'), item('b'), item('c')]);
    expect(held.rows.every((row) => !row.isGone)).toBe(true);
    expect(held.newCount).toBe(0);
  });
});
