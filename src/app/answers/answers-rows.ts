import type { TakeDto } from '@contract';

/** Takes as the list shows them: handed in, those with an answer not yet read first, otherwise as they came. */
export function answerRows(takes: readonly TakeDto[]): TakeDto[] {
  const handedIn = takes.filter(({ state }) => state !== 'draft' && state !== 'withdrawn');
  const isUnread = (take: TakeDto): boolean => take.state === 'answered' && take.readAt === null;
  return [...handedIn.filter(isUnread), ...handedIn.filter((take) => !isUnread(take))];
}

/** The sentence at the head of the list. */
export function answersHeading(rows: readonly TakeDto[]): string {
  const unread = rows.filter(({ state, readAt }) => state === 'answered' && readAt === null).length;
  const waiting = rows.filter(({ state }) => ['processing', 'waiting', 'picked-up'].includes(state)).length;
  const first = unread === 1 ? 'One answer is new.' : unread > 1 ? `${unread} answers are new.` : '';
  const second = waiting === 1 ? 'One take waits.' : waiting > 1 ? `${waiting} takes wait.` : '';
  return (
    [first, second].filter(Boolean).join(' ') ||
    (rows.length > 0 ? 'All answers are read.' : 'No answers yet.')
  );
}
