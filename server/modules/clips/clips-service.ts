import type { Request, Response } from 'express';
import type { View } from '../../contract/common';
import type { ClipDto } from '../../contract/takes';
import { inTransaction, type Database, type Transaction } from '../../platform/database';
import { AppError, conflict, forbidden, notFound, refused } from '../../platform/errors';
import { recordEvent } from '../../platform/events';
import type { Actor } from '../../platform/http/actor';
import { createRateLimit } from '../../platform/http/rate-limits';
import { newId } from '../../platform/ids';
import { enqueueJob } from '../../platform/jobs';
import type { Platform } from '../../platform/platform';
import { clipDto, clipsOfTakes, loadVisible, lockedTake, mayBeSeen, type TakeRow } from '../takes';
import {
  clipAccess,
  clipIdAt,
  deleteClip,
  filmedMs,
  insertClip,
  noteViewed,
  setTrim,
  type ClipAccess,
} from './clips-repository';
import { createStoredResponses } from './stored-response';
import { receiveUpload } from './upload-stream';

const UPLOADS_A_DAY = 60;
/** The shortest part that can show a rep, ms (common practice, no source). */
const SHORTEST_TRIM_MS = 400;
const HOUR = 3_600_000;
/** Views noted already, so that each range of a film does not ask the database. */
const VIEWS_KEPT = 10_000;

type MediaKind = 'proxy' | 'poster' | 'filmstrip' | 'original';

export interface ClipsService {
  /** Takes in one clip from the request's multipart body. */
  upload(actor: Actor, takeId: string, view: View, req: Request, res: Response): Promise<ClipDto>;
  remove(actor: Actor, clipId: string): Promise<void>;
  trim(actor: Actor, clipId: string, trim: { startMs: number; endMs: number } | null): Promise<ClipDto>;
  sendMedia(actor: Actor, clipId: string, kind: MediaKind, req: Request, res: Response): Promise<void>;
  sendThumbnail(actor: Actor, clipId: string, n: number, req: Request, res: Response): Promise<void>;
}

const homeOf = (gymId: string, takeId: string, clipId: string) =>
  `gyms/${gymId}/takes/${takeId}/clips/${clipId}/`;

function mustTakeClips(take: TakeRow, actor: Actor): void {
  if (take.memberId !== actor.userId) throw notFound('That take');
  if (take.state !== 'draft' && take.state !== 'unplayable') {
    throw conflict(
      'not-a-draft',
      'This take has been sent, so its clips stay as they are. Withdraw it or film another one.',
    );
  }
}

export function createClips(platform: Platform): ClipsService {
  const { database, store, config, clock } = platform;
  const uploads = createRateLimit(database, 'clip-upload', UPLOADS_A_DAY, 24 * 3600);
  const responses = createStoredResponses(store);
  const viewed = new Set<string>();

  const countUpload = async (memberId: string) => {
    try {
      await uploads.consume(memberId);
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      throw new AppError(
        429,
        'too-many-clips',
        `That were ${UPLOADS_A_DAY} clips within a day, as many as one member may send. Send the next one tomorrow.`,
        error.extra,
        { cause: error },
      );
    }
  };

  const dtoOf = async (db: Database | Transaction, gymId: string, takeId: string, clipId: string) => {
    const row = (await clipsOfTakes(db, gymId, [takeId])).find((clip) => clip.id === clipId);
    if (!row) throw notFound('That clip');
    return clipDto(row);
  };

  /** The clip and its take, both the caller's own and open to changes; the take is held. */
  const ownClip = async (trx: Transaction, actor: Actor, clipId: string): Promise<ClipAccess> => {
    const clip = await clipAccess(trx, actor.gymId, clipId);
    if (!clip) throw notFound('That clip');
    const take = await lockedTake(trx, actor.gymId, clip.takeId);
    if (take.memberId !== actor.userId) throw notFound('That clip');
    mustTakeClips(take, actor);
    return clip;
  };

  const removeIn = async (trx: Transaction, gymId: string, takeId: string, clipId: string, now: Date) => {
    await deleteClip(trx, gymId, clipId);
    await enqueueJob(trx, 'objects.delete', { prefixes: [homeOf(gymId, takeId, clipId)] }, now);
  };

  const keep = (
    actor: Actor,
    takeId: string,
    view: View,
    clip: Omit<Parameters<typeof insertClip>[1], 'gymId' | 'takeId' | 'view'>,
  ) =>
    inTransaction(database, async (trx) => {
      const { gymId, userId } = actor;
      const now = clock.now();
      mustTakeClips(await lockedTake(trx, gymId, takeId), actor);
      const replaced = await clipIdAt(trx, gymId, takeId, view);
      if (replaced) await removeIn(trx, gymId, takeId, replaced, now);
      await insertClip(trx, { ...clip, gymId, takeId, view }, now);
      await enqueueJob(trx, 'clip.process', { clipId: clip.id, gymId }, now, {
        dedupeKey: `clip.process:${clip.id}`,
      });
      await recordEvent(
        trx,
        {
          gymId,
          type: 'clip.uploaded',
          actorId: userId,
          takeId,
          clipId: clip.id,
          to: { staff: false, userId },
        },
        now,
      );
      return dtoOf(trx, gymId, takeId, clip.id);
    });

  /** @throws AppError 404, or 403 for coaches while a guardian's consent is missing */
  const seen = async (actor: Actor, clipId: string): Promise<ClipAccess> => {
    const clip = await clipAccess(database, actor.gymId, clipId);
    if (!clip) throw notFound('That clip');
    const isOwn = clip.memberId === actor.userId;
    if (!isOwn && (actor.role === 'member' || clip.takeState === 'draft')) throw notFound('That clip');
    await mayBeSeen(database, actor, { gymId: actor.gymId, memberId: clip.memberId }, clock.now());
    return clip;
  };

  const note = async (actor: Actor, clipId: string) => {
    const now = clock.now();
    const hour = new Date(Math.floor(now.getTime() / HOUR) * HOUR);
    const key = `${actor.userId}:${clipId}:${hour.getTime()}`;
    if (viewed.has(key)) return;
    await noteViewed(database, actor.gymId, actor.userId, clipId, hour, now);
    if (viewed.size >= VIEWS_KEPT) viewed.clear();
    viewed.add(key);
  };

  const published = (clip: ClipAccess): string => {
    if (!clip.ready || clip.outputPrefix === null) throw notFound('That part of the clip');
    return clip.outputPrefix;
  };

  return {
    async upload(actor, takeId, view, req, res) {
      const take = await loadVisible(database, actor, takeId);
      mustTakeClips(take, actor);
      if (!take.views.includes(view)) {
        throw refused(
          'view-not-asked',
          `This take asks for ${take.views.map((asked) => `the ${asked} view`).join(' and ')}, not the ${view} view.`,
        );
      }
      await countUpload(actor.userId);
      const id = newId();
      const originalKey = `${homeOf(actor.gymId, takeId, id)}original`;
      const received = await receiveUpload(req, res, {
        store,
        key: originalKey,
        maxBytes: config.uploadMaxBytes,
      });
      try {
        return await keep(actor, takeId, view, { id, originalKey, ...received });
      } catch (error) {
        await store.deletePrefix(originalKey);
        throw error;
      }
    },

    remove: (actor, clipId) =>
      inTransaction(database, async (trx) => {
        const clip = await ownClip(trx, actor, clipId);
        await removeIn(trx, actor.gymId, clip.takeId, clipId, clock.now());
      }),

    trim: (actor, clipId, trim) =>
      inTransaction(database, async (trx) => {
        const clip = await ownClip(trx, actor, clipId);
        const filmed = await filmedMs(trx, actor.gymId, clipId);
        if (trim && trim.endMs - trim.startMs < SHORTEST_TRIM_MS) {
          throw refused(
            'trim-too-short',
            'Keep at least half a second: set the end further from the start.',
            [{ path: 'trim.endMs', message: 'Set the end at least half a second after the start.' }],
          );
        }
        if (trim && filmed !== null && trim.endMs > filmed) {
          throw refused('trim-too-long', 'The clip ends before that. Set the end within the clip.', [
            { path: 'trim.endMs', message: `The clip is ${filmed} ms long.` },
          ]);
        }
        await setTrim(trx, actor.gymId, clipId, trim);
        await enqueueJob(trx, 'clip.process', { clipId, gymId: actor.gymId }, clock.now(), {
          dedupeKey: `clip.process:${clipId}:${newId()}`,
        });
        return dtoOf(trx, actor.gymId, clip.takeId, clipId);
      }),

    async sendMedia(actor, clipId, kind, req, res) {
      const clip = await seen(actor, clipId);
      if (kind === 'original') {
        if (clip.memberId !== actor.userId && !clip.coachesSeeOriginals) {
          throw forbidden(
            'Your gym keeps originals to their members. The owner can change that on the gym’s page.',
          );
        }
        await note(actor, clipId);
        await responses.send(req, res, clip.originalKey, 'video/mp4');
        return;
      }
      const prefix = published(clip);
      if (kind === 'proxy') {
        await note(actor, clipId);
        await responses.send(req, res, `${prefix}/proxy.mp4`, 'video/mp4');
        return;
      }
      await responses.send(req, res, `${prefix}/${kind}.jpg`, 'image/jpeg');
    },

    async sendThumbnail(actor, clipId, n, req, res) {
      const prefix = published(await seen(actor, clipId));
      await responses.send(req, res, `${prefix}/thumb-${String(n).padStart(2, '0')}.jpg`, 'image/jpeg');
    },
  };
}
