import type * as z from 'zod';
import { AppError } from '../errors';

/** Packs the last row's sort key into an opaque cursor. */
export function encodeCursor(key: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(key)).toString('base64url');
}

/** @throws AppError 400 when the cursor is not one of ours or not of the given shape */
export function decodeCursor<T extends z.ZodType>(cursor: string, shape: T): z.output<T> {
  try {
    return shape.parse(JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8')));
  } catch (error) {
    throw new AppError(
      400,
      'bad-cursor',
      'This page marker is not valid. Start from the first page.',
      {},
      { cause: error },
    );
  }
}
