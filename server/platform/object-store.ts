import {
  DeleteObjectsCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
} from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import { Readable } from 'node:stream';
import type { Config } from './config';

export interface StoredObject {
  readonly sizeBytes: number;
  readonly etag: string;
}

/** Bytes by key in anything that speaks S3. Keys are ours: `gym/…`, never a name from outside. */
export interface ObjectStore {
  /** Streams to `key` in parts; the object appears only when complete. Aborting the signal leaves nothing visible. */
  putStream(key: string, body: Readable, contentType: string, signal?: AbortSignal): Promise<void>;
  putFile(key: string, path: string, contentType: string, signal?: AbortSignal): Promise<void>;
  /** Null when there is no such object. */
  head(key: string): Promise<StoredObject | null>;
  /** A stream of the whole, or of bytes `start` to `end` inclusive; null when there is no such object. */
  get(key: string, range?: { start: number; end: number }, signal?: AbortSignal): Promise<Readable | null>;
  deletePrefix(prefix: string): Promise<number>;
  list(prefix: string): AsyncIterable<string>;
  ping(): Promise<void>;
}

/** S3 parts; the smallest allowed is 5 MiB, and two in flight bound the memory of one upload. */
const PART_BYTES = 5 * 1024 * 1024;
const PARTS_IN_FLIGHT = 2;

function isMissing(error: unknown): boolean {
  return error instanceof Error && (error.name === 'NoSuchKey' || error.name === 'NotFound');
}

export function openObjectStore(config: Config['store']): ObjectStore {
  const client = new S3Client({
    region: config.region,
    endpoint: config.endpoint,
    forcePathStyle: true,
    credentials: { accessKeyId: config.accessKey, secretAccessKey: config.secretKey },
    // The SDK's own default checksum framing is stored as content by some S3 servers.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
  const Bucket = config.bucket;

  const putStream: ObjectStore['putStream'] = async (key, body, contentType, signal) => {
    const upload = new Upload({
      client,
      params: { Bucket, Key: key, Body: body, ContentType: contentType },
      partSize: PART_BYTES,
      queueSize: PARTS_IN_FLIGHT,
    });
    const abort = () => {
      void upload.abort();
    };
    signal?.addEventListener('abort', abort, { once: true });
    try {
      signal?.throwIfAborted();
      await upload.done();
    } finally {
      signal?.removeEventListener('abort', abort);
    }
  };

  const list: ObjectStore['list'] = async function* (prefix) {
    let token: string | undefined;
    do {
      const page = await client.send(
        new ListObjectsV2Command({ Bucket, Prefix: prefix, ContinuationToken: token }),
      );
      for (const object of page.Contents ?? []) if (object.Key) yield object.Key;
      token = page.IsTruncated ? page.NextContinuationToken : undefined;
    } while (token);
  };

  return {
    putStream,
    list,
    async putFile(key, path, contentType, signal) {
      const { size } = await stat(path);
      if (size > PART_BYTES) {
        await putStream(key, createReadStream(path), contentType, signal);
        return;
      }
      await client.send(
        new PutObjectCommand({
          Bucket,
          Key: key,
          Body: createReadStream(path),
          ContentLength: size,
          ContentType: contentType,
        }),
        signal ? { abortSignal: signal } : {},
      );
    },
    async head(key) {
      try {
        const head = await client.send(new HeadObjectCommand({ Bucket, Key: key }));
        return { sizeBytes: head.ContentLength ?? 0, etag: head.ETag ?? `"${key}"` };
      } catch (error) {
        if (isMissing(error)) return null;
        throw error;
      }
    },
    async get(key, range, signal) {
      try {
        const answer = await client.send(
          new GetObjectCommand({
            Bucket,
            Key: key,
            Range: range ? `bytes=${range.start}-${range.end}` : undefined,
          }),
          signal ? { abortSignal: signal } : {},
        );
        return answer.Body instanceof Readable ? answer.Body : Readable.from([]);
      } catch (error) {
        if (isMissing(error)) return null;
        throw error;
      }
    },
    async deletePrefix(prefix) {
      const keys: string[] = [];
      for await (const key of list(prefix)) keys.push(key);
      for (let i = 0; i < keys.length; i += 500) {
        const Objects = keys.slice(i, i + 500).map((Key) => ({ Key }));
        const answer = await client.send(
          new DeleteObjectsCommand({ Bucket, Delete: { Objects, Quiet: true } }),
        );
        const failed = answer.Errors?.[0];
        if (failed)
          throw new Error(
            `the store did not delete ${failed.Key ?? prefix}: ${failed.Message ?? 'no reason given'}`,
          );
      }
      return keys.length;
    },
    async ping() {
      await client.send(new HeadBucketCommand({ Bucket }));
    },
  };
}
