/** One line of the bench: what was measured, the bare tool's figure, ours, and how they compare. */
export interface Row {
  readonly metric: string;
  readonly bare: string;
  readonly ours: string;
  readonly ratio: string;
  readonly target: string;
}

export function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  const upper = sorted[middle];
  const lower = sorted[middle - 1];
  if (upper === undefined) throw new Error('nothing was measured');
  return sorted.length % 2 === 1 || lower === undefined ? upper : (lower + upper) / 2;
}

export async function timed(work: () => Promise<unknown>): Promise<number> {
  const began = performance.now();
  await work();
  return performance.now() - began;
}

/** Times two ways of the same work in turns, so that both meet the same noise. @returns medians, ms */
export async function sideBySide(
  rounds: number,
  bare: () => Promise<unknown>,
  ours: () => Promise<unknown>,
): Promise<{ bareMs: number; oursMs: number }> {
  const times = { bare: [] as number[], ours: [] as number[] };
  for (let round = 0; round < rounds; round += 1) {
    const order = round % 2 === 0 ? (['bare', 'ours'] as const) : (['ours', 'bare'] as const);
    for (const which of order) times[which].push(await timed(which === 'bare' ? bare : ours));
  }
  return { bareMs: median(times.bare), oursMs: median(times.ours) };
}

export const ms = (value: number): string =>
  value < 10 ? `${value.toFixed(2)} ms` : `${value.toFixed(0)} ms`;
export const times = (value: number): string => `${value.toFixed(2)} ×`;

/** The rows as a table of Markdown. */
export function table(rows: readonly Row[]): string {
  const lines = rows.map(
    (row) => `| ${[row.metric, row.bare, row.ours, row.ratio, row.target].join(' | ')} |`,
  );
  return ['| metric | bare | ours | ratio | target |', '| --- | --- | --- | --- | --- |', ...lines].join(
    '\n',
  );
}
