import express from 'express';
import { createServer, request, type IncomingMessage, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterEach, expect, it } from 'vitest';
import { AppError } from '../../platform/errors';
import type { ObjectStore } from '../../platform/object-store';
import { receiveUpload, type ReceivedFile } from './upload-stream';

let server: Server;
afterEach(() => {
  server.closeAllConnections();
  return new Promise((resolve) => server.close(resolve));
});

/** A store that reads what it is given and forgets it; `slowMs` passes before it says that it is done. */
function sink(slowMs = 0) {
  const seen = { bytes: 0, aborted: false, deleted: [] as string[] };
  const store: Pick<ObjectStore, 'putStream' | 'deletePrefix'> = {
    async putStream(_key, body, _type, signal) {
      signal?.addEventListener('abort', () => {
        seen.aborted = true;
      });
      for await (const chunk of body) seen.bytes += (chunk as Buffer).length;
      await new Promise((resolve) => setTimeout(resolve, slowMs));
    },
    deletePrefix(prefix) {
      seen.deleted.push(prefix);
      return Promise.resolve(0);
    },
  };
  return { seen, store: store as ObjectStore };
}

async function listen(store: ObjectStore, noProgressMs: number): Promise<string> {
  const app = express();
  app.post('/', async (req, res) => {
    try {
      res.json(await receiveUpload(req, res, { store, key: 'clips/one', maxBytes: 1_000_000, noProgressMs }));
    } catch (error) {
      res.status(error instanceof AppError ? error.status : 500).json({});
    }
  });
  server = createServer(app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}/`;
}

const HEAD = '--b\r\ncontent-disposition: form-data; name="file"; filename="clip.mp4"\r\n\r\n';
const FILM = Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypisom'), Buffer.alloc(9000)]);

function post(url: string): { send: ReturnType<typeof request>; answer: Promise<IncomingMessage> } {
  const send = request(url, {
    method: 'POST',
    headers: { 'content-type': 'multipart/form-data; boundary=b' },
  });
  const answer = new Promise<IncomingMessage>((resolve, reject) => {
    send.once('response', resolve);
    send.once('error', reject);
  });
  return { send, answer };
}

it('gives up on a sender from whom nothing comes any more, and leaves nothing', async () => {
  const { seen, store } = sink();
  const { send, answer } = post(await listen(store, 50));
  send.write(HEAD);
  send.write(FILM);
  expect((await answer).statusCode).toBe(408);
  expect(seen).toMatchObject({ aborted: true, deleted: ['clips/one'] });
  send.destroy();
});

it('waits for a slow store without blaming the sender', async () => {
  const { seen, store } = sink(200);
  const { send, answer } = post(await listen(store, 50));
  send.write(HEAD);
  send.write(FILM);
  send.end('\r\n--b--\r\n');
  const response = await answer;
  const chunks: Buffer[] = [];
  for await (const chunk of response) chunks.push(chunk as Buffer);
  expect(response.statusCode).toBe(200);
  expect((JSON.parse(Buffer.concat(chunks).toString()) as ReceivedFile).sizeBytes).toBe(FILM.length);
  expect(seen).toMatchObject({ bytes: FILM.length, aborted: false, deleted: [] });
});

it('tells a sender without a length at once that the file is too large', async () => {
  const { seen, store } = sink();
  const { send, answer } = post(await listen(store, 5000));
  send.write(HEAD);
  send.write(Buffer.concat([FILM, Buffer.alloc(1_000_000)]));
  expect((await answer).statusCode).toBe(413);
  expect(seen.deleted).toEqual(['clips/one']);
  send.destroy();
});
