import type { Request } from 'express';

const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/Edg\//, 'Edge'],
  [/Firefox\//, 'Firefox'],
  [/Chrom(e|ium)\//, 'Chrome'],
  [/Safari\//, 'Safari'],
];
const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/iPhone/, 'iPhone'],
  [/iPad/, 'iPad'],
  [/Android/, 'Android'],
  [/Mac OS X/, 'Mac'],
  [/Windows/, 'Windows'],
  [/Linux/, 'Linux'],
];

const first = (table: readonly (readonly [RegExp, string])[], agent: string) =>
  table.find(([pattern]) => pattern.test(agent))?.[1];

/** In a few words, what a call came from, for a person's own list of sessions. */
export function deviceOf(req: Request): string {
  const agent = req.get('user-agent') ?? '';
  const browser = first(BROWSERS, agent) ?? 'A program';
  const system = first(SYSTEMS, agent);
  return system ? `${browser} on ${system}` : browser;
}
