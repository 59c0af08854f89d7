import type { Request, Response } from 'express';
import multer, { MulterError, type StorageEngine } from 'multer';
import { createHash } from 'node:crypto';
import { Transform, type TransformCallback } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { SNIFF_BYTES, sniffContainer } from '../../media/sniff';
import { AppError, malformed, refused } from '../../platform/errors';
import type { ObjectStore } from '../../platform/object-store';

const NO_PROGRESS_MS = 30_000;
/** What multipart framing and small fields may add to the file, bytes. */
const FRAMING_BYTES = 64 * 1024;
/** How long a refused sender may go on before its connection is cut, ms. */
const DRAIN_MS = 10_000;

export interface ReceivedFile {
  readonly sizeBytes: number;
  readonly sha256: string;
}

export interface UploadTarget {
  readonly store: ObjectStore;
  readonly key: string;
  readonly maxBytes: number;
  /** Without a byte for this long the sender is taken for gone, ms. */
  readonly noProgressMs?: number;
}

const megabytes = (bytes: number) => Math.floor(bytes / 1_000_000);

const tooLarge = (maxBytes: number) =>
  new AppError(
    413,
    'too-large',
    `A clip may have at most ${megabytes(maxBytes)} MB. Trim it to the reps that were asked for, or film at 1080p.`,
  );
const wrongKind = () =>
  new AppError(
    415,
    'not-a-video',
    'This file is not a video that can be read. Choose a clip from your phone’s camera: MP4, MOV, 3GP or WebM.',
  );
const empty = () => refused('empty-file', 'The file is empty. Choose the clip again.');
const stalled = () =>
  new AppError(
    408,
    'stalled',
    'Nothing arrived for half a minute. Check the network and send the clip again.',
  );
const disconnected = () =>
  new AppError(400, 'disconnected', 'The connection broke before the whole clip had come. Send it again.');
const noFile = () =>
  malformed([{ path: 'file', message: 'Send the clip as the part named file of a multipart form.' }]);

/** Hands bytes on untouched, counts and hashes them on the way, and looks at the first ones. */
class Inspector extends Transform {
  readonly #hash = createHash('sha256');
  #head: Buffer[] = [];
  #headBytes = 0;
  #sniffed = false;
  sizeBytes = 0;

  constructor(private readonly onProgress: () => void) {
    super({ highWaterMark: 1024 * 1024 });
  }

  #sniff(): boolean {
    this.#sniffed = true;
    const known = sniffContainer(Buffer.concat(this.#head).subarray(0, SNIFF_BYTES)).kind === 'video';
    this.#head = [];
    return known;
  }

  override _transform(chunk: Buffer, _encoding: BufferEncoding, done: TransformCallback): void {
    this.onProgress();
    this.sizeBytes += chunk.length;
    this.#hash.update(chunk);
    if (!this.#sniffed) {
      this.#head.push(chunk);
      this.#headBytes += chunk.length;
      if (this.#headBytes >= SNIFF_BYTES && !this.#sniff()) {
        done(wrongKind());
        return;
      }
    }
    done(null, chunk);
  }

  override _flush(done: TransformCallback): void {
    if (this.sizeBytes === 0) done(empty());
    else if (!this.#sniffed && !this.#sniff()) done(wrongKind());
    else done();
  }

  sha256(): string {
    return this.#hash.digest('hex');
  }
}

function fromMulter(error: unknown, maxBytes: number): unknown {
  if (!(error instanceof MulterError)) return error;
  if (error.code === 'LIMIT_FILE_SIZE') return tooLarge(maxBytes);
  return malformed([
    { path: error.field ?? 'file', message: `The form could not be read: ${error.message}.` },
  ]);
}

/**
 * Receives the part named `file` straight into the store: never whole in memory, never on disk. The object appears
 * only when every byte has arrived and passed; after any error there is none under the key.
 * @throws AppError 400, 408, 413, 415 or 422, as soon as the reason is known and without waiting for the rest
 */
export async function receiveUpload(
  req: Request,
  res: Response,
  target: UploadTarget,
): Promise<ReceivedFile> {
  const declared = Number(req.get('content-length') ?? '0');
  if (declared > target.maxBytes + FRAMING_BYTES) throw tooLarge(target.maxBytes);
  if (!req.is('multipart/form-data')) throw noFile();

  const abort = new AbortController();
  let received: ReceivedFile | null = null;
  let writing: Promise<void> = Promise.resolve();

  const outcome = new Promise<void>((resolve, reject) => {
    const fail = (error: unknown) => {
      abort.abort();
      reject(error instanceof Error ? error : new Error(String(error)));
    };
    let storing = false;
    const timer = setTimeout(() => {
      // Once the file has come, it is the store that takes its time, not the sender.
      if (storing) timer.refresh();
      else fail(stalled());
    }, target.noProgressMs ?? NO_PROGRESS_MS);
    abort.signal.addEventListener('abort', () => {
      clearTimeout(timer);
    });

    const storage: StorageEngine = {
      _handleFile(_req, file, done) {
        const inspector = new Inspector(() => timer.refresh());
        inspector.once('finish', () => {
          storing = true;
        });
        file.stream.once('limit', () => {
          fail(tooLarge(target.maxBytes));
        });
        writing = Promise.all([
          pipeline(file.stream, inspector, { signal: abort.signal }),
          target.store.putStream(target.key, inspector, 'application/octet-stream', abort.signal),
        ]).then(() => {
          received = { sizeBytes: inspector.sizeBytes, sha256: inspector.sha256() };
          storing = false;
          timer.refresh();
        });
        writing.then(
          () => {
            done(null, {});
          },
          (error: unknown) => {
            fail(error);
            done(error);
          },
        );
      },
      _removeFile(_req, _file, done) {
        done(null);
      },
    };
    const parse = multer({
      storage,
      defParamCharset: 'utf8',
      limits: {
        fileSize: target.maxBytes,
        files: 1,
        fields: 10,
        parts: 12,
        fieldNameSize: 255,
        fieldSize: 4096,
        fieldNestingDepth: 1,
        fieldArrayIndexLimit: 0,
        headerPairs: 20,
      },
    }).single('file');
    parse(req, res, (error: unknown) => {
      clearTimeout(timer);
      if (error) fail(fromMulter(error, target.maxBytes));
      else resolve();
    });
  });

  try {
    await outcome;
    if (!received) throw noFile();
    return received;
  } catch (error) {
    // Wait until the store has let go, so that nothing can appear under the key afterwards; how that ended is told
    // by `error` already.
    await Promise.allSettled([writing]);
    await target.store.deletePrefix(target.key);
    letGo(req);
    throw req.destroyed && !(error instanceof AppError) ? disconnected() : error;
  }
}

/** Lets a refused sender read the answer, then ends the connection if it will not stop sending. */
function letGo(req: Request): void {
  if (req.readableEnded || req.destroyed) return;
  req.resume();
  const cut = setTimeout(() => {
    req.destroy();
  }, DRAIN_MS);
  cut.unref();
  req.once('close', () => {
    clearTimeout(cut);
  });
}
