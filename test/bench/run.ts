import { cpus, loadavg } from 'node:os';
import { readConfig } from '../../server/platform/config';
import { openDatabase } from '../../server/platform/database';
import { openObjectStore } from '../../server/platform/object-store';
import { openStage } from '../support/stage';
import { benchClient } from './client';
import { benchMedia } from './media';
import { benchQueue } from './queue';
import { benchRange } from './range';
import { table, type Row } from './table';
import { benchUploads } from './uploads';

/** `npm run bench` measures everything; `npm run bench -- media queue` only what is named. */
const NAMES = ['client', 'media', 'range', 'uploads', 'queue'] as const;
const asked = process.argv.slice(2);
const unknown = asked.find((name) => !NAMES.some((known) => known === name));
if (unknown) throw new Error(`There is no measurement called ${unknown}. There are: ${NAMES.join(', ')}.`);
const wants = (name: (typeof NAMES)[number]) => asked.length === 0 || asked.includes(name);

const rows: Row[] = [];
const add = (more: readonly Row[]) => {
  rows.push(...more);
  for (const row of more) console.log(`${row.metric}: ${row.bare}, ${row.ours}, ${row.ratio}`);
};

console.log(
  `${String(cpus().length)} cores, load ${loadavg()
    .map((load) => load.toFixed(1))
    .join(' ')}`,
);
if (wants('media')) add(await benchMedia());
const stage = await openStage();
process.env['MIDFOOT_URL'] = stage.url;
const config = readConfig(stage.env);
const database = openDatabase(config.databaseUrl);
try {
  if (wants('client')) add(await benchClient());
  const { makeWorld } = await import('../e2e/support/world');
  const world = await makeWorld();
  const store = openObjectStore(config.store);
  if (wants('range')) {
    const proxyKeyOf = async (clipId: string) => {
      const clip: { output_prefix: string } | undefined = await database('clips')
        .where('id', clipId)
        .first('output_prefix');
      if (!clip) throw new Error('the clip is not in the database');
      return `${clip.output_prefix}/proxy.mp4`;
    };
    add(await benchRange(store, world, proxyKeyOf));
  }
  if (wants('uploads')) add(await benchUploads(stage, world, store));
  if (wants('queue')) add(await benchQueue(database, world));
} finally {
  await database.destroy();
  await stage.stop();
}
console.log(`\n${table(rows)}`);
