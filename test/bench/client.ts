import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { brotliCompressSync, gzipSync } from 'node:zlib';
import { clientDir } from '../../server/start/client-build';
import { projectDir } from '../../server/start/project';
import type { Row } from './table';

/** What a browser fetches before the first room: the page, its scripts and styles, compressed as the api serves them. */
export async function benchClient(): Promise<Row[]> {
  const dir = join(projectDir, clientDir);
  const page = await readFile(join(dir, 'index.html'), 'utf8');
  const texts = new Map([['index.html', page]]);
  const named = (text: string, pattern: RegExp) =>
    [...text.matchAll(pattern)].flatMap(([, name]) => name ?? []);
  const queue = named(page, /(?:src|href)="([^":]+\.(?:js|css))"/g);
  // What the first scripts import at once comes with them; what they import later does not.
  for (let name = queue.shift(); name !== undefined; name = queue.shift()) {
    if (texts.has(name)) continue;
    const text = await readFile(join(dir, name), 'utf8');
    texts.set(name, text);
    queue.push(...named(text, /(?:from|import)"\.\/([^"]+\.js)"/g));
  }
  const files = [...texts.values()].map((text) => Buffer.from(text));
  const kb = (press: (file: Buffer) => Buffer) =>
    files.reduce((sum, file) => sum + press(file).length, 0) / 1000;
  return [
    {
      metric: 'initial client transfer, brotli (gzip) / uncompressed',
      bare: `${kb((file) => file).toFixed(0)} kB`,
      ours: `${kb(brotliCompressSync).toFixed(0)} kB (${kb(gzipSync).toFixed(0)} kB)`,
      ratio: '',
      target: '≤ 180 kB',
    },
  ];
}
