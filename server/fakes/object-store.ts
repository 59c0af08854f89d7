import { mkdir, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import S3rver from 's3rver';

/**
 * The program that stands in for an S3 store on one machine. It checks no signatures and lets anyone read, so it
 * listens on loopback only.
 *
 *     node --openssl-legacy-provider --import tsx server/fakes/object-store.ts --dir DIR --port PORT --bucket NAME
 *
 * Without the option for node, listing more than a page of keys fails: s3rver signs its page tokens with a cipher
 * that OpenSSL 3 keeps in its legacy provider.
 */
const { values } = parseArgs({
  options: { dir: { type: 'string' }, port: { type: 'string' }, bucket: { type: 'string' } },
});
const { dir, bucket } = values;
const port = Number(values.port);
if (dir === undefined || bucket === undefined || !Number.isInteger(port)) {
  process.stderr.write('Usage: object-store.ts --dir DIR --port PORT --bucket NAME\n');
  process.exit(2);
}

await mkdir(dir, { recursive: true });
// s3rver cannot abort a multipart upload: what was sent before a client went away would stay for ever. Nobody
// is in the middle of an upload now, as we are only starting.
await rm(join(dir, bucket, '._S3rver_uploads'), { recursive: true, force: true });

const server = new S3rver({
  directory: dir,
  address: '127.0.0.1',
  port,
  silent: true,
  vhostBuckets: false,
  configureBuckets: [{ name: bucket, configs: [] }],
});
await server.run();
// Node closes a connection that was idle for five seconds. A busy client notices too late and sends its next object
// down it, which cannot be sent twice; so it is left to clients to close theirs.
server.httpServer.keepAliveTimeout = 0;
process.stdout.write(`Object store ready on 127.0.0.1:${String(port)}\n`);

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => {
    // A polite close would wait for kept-alive connections. An upload cut off here ends as if its client had gone.
    process.exit(0);
  });
}
