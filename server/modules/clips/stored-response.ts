import type { Request, Response } from 'express';
import { createHash } from 'node:crypto';
import { pipeline } from 'node:stream/promises';
import { notFound } from '../../platform/errors';
import type { ObjectStore } from '../../platform/object-store';
import { ifRangeHolds, noneMatchNames, requestedRange } from './byte-range';

/** Sizes kept in memory; a player asks for many ranges of one object. */
const SIZES_KEPT = 5000;

/** Answers requests with objects of the store, in whole or in part. */
export interface StoredResponses {
  /**
   * Sends the object under `key`, which never changes once it is there, with byte ranges (RFC 9110).
   * @throws AppError 404 when there is no such object
   */
  send(req: Request, res: Response, key: string, contentType: string): Promise<void>;
}

/** A player that seeks or closes leaves in the middle of an answer; that is no failure. */
function isLeaving(error: unknown, gone: AbortSignal): boolean {
  if (!(error instanceof Error)) return false;
  const closed = 'code' in error && error.code === 'ERR_STREAM_PREMATURE_CLOSE';
  return closed || (gone.aborted && error.name === 'AbortError');
}

export function createStoredResponses(store: ObjectStore): StoredResponses {
  const sizes = new Map<string, number>();

  const sizeOf = async (key: string): Promise<number> => {
    const known = sizes.get(key);
    if (known !== undefined) return known;
    const head = await store.head(key);
    if (!head) throw notFound('That clip');
    if (sizes.size >= SIZES_KEPT) sizes.delete(sizes.keys().next().value ?? '');
    sizes.set(key, head.sizeBytes);
    return head.sizeBytes;
  };

  return {
    async send(req, res, key, contentType) {
      const size = await sizeOf(key);
      const etag = `"${createHash('sha256').update(key).digest('base64url').slice(0, 27)}"`;
      res.set({
        'Accept-Ranges': 'bytes',
        'Cache-Control': 'private, max-age=3600',
        'Content-Disposition': 'inline',
        'Content-Type': contentType,
        'X-Content-Type-Options': 'nosniff',
        ETag: etag,
      });
      if (noneMatchNames(req.get('if-none-match'), etag)) {
        res.removeHeader('Content-Type');
        res.status(304).end();
        return;
      }
      const asked =
        req.method === 'GET' && ifRangeHolds(req.get('if-range'), etag)
          ? requestedRange(req.get('range'), size)
          : 'whole';
      if (asked === 'unsatisfiable') {
        res.removeHeader('Content-Type');
        res.set('Content-Range', `bytes */${size}`).status(416).end();
        return;
      }
      const range = asked === 'whole' ? undefined : asked;
      res.set('Content-Length', String(range ? range.end - range.start + 1 : size));
      if (range) res.status(206).set('Content-Range', `bytes ${range.start}-${range.end}/${size}`);
      if (req.method === 'HEAD') {
        res.end();
        return;
      }
      await stream(res, key, range);
    },
  };

  async function stream(res: Response, key: string, range: { start: number; end: number } | undefined) {
    const gone = new AbortController();
    const leave = () => {
      gone.abort();
    };
    res.once('close', leave);
    try {
      const body = await store.get(key, range, gone.signal);
      if (!body) {
        sizes.delete(key);
        for (const name of ['Content-Length', 'Content-Range', 'ETag', 'Content-Type', 'Cache-Control'])
          res.removeHeader(name);
        res.status(200);
        throw notFound('That clip');
      }
      await pipeline(body, res);
    } catch (error) {
      if (!isLeaving(error, gone.signal)) throw error;
    } finally {
      res.off('close', leave);
    }
  }
}
