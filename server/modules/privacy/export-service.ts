import archiver from 'archiver';
import type { Response } from 'express';
import { once } from 'node:events';
import type { Actor } from '../../platform/http/actor';
import type { Platform } from '../../platform/platform';
import { gymOf } from '../gyms';
import { createNotices } from '../notices';
import { findUser } from '../people';
import { createSessions } from '../sessions';
import { allTakesOf, clipsOfTakes } from '../takes';
import type { PrivacyDeps } from './privacy-deps';

export interface Exports {
  /** Streams a zip of all that is held on the actor, the clips as they were sent included. */
  send(actor: Actor, res: Response): Promise<void>;
}

export function createExports(platform: Platform, deps: PrivacyDeps): Exports {
  const { database, store, clock, logger } = platform;
  const notices = createNotices(platform);
  const sessions = createSessions(platform);
  return {
    async send(actor, res) {
      const { gymId, userId } = actor;
      const [user, gym, rows, places, told] = await Promise.all([
        findUser(database, gymId, userId, clock.now()),
        gymOf(database, gymId),
        allTakesOf(database, gymId, userId),
        sessions.list(actor),
        notices.list(gymId, userId),
      ]);
      const takes = [];
      for (const row of rows) takes.push(await deps.detailOf(actor, row.id));
      const clips = await clipsOfTakes(
        database,
        gymId,
        rows.map((row) => row.id),
      );

      const zip = archiver('zip', { store: true });
      res.status(200).type('zip');
      res.setHeader('Content-Disposition', 'attachment; filename="midfoot-my-data.zip"');
      res.setHeader('Cache-Control', 'no-store');
      zip.pipe(res);
      // A clip that cannot be read ends in a broken download, never in a zip that looks whole.
      zip.on('error', (error) => {
        logger.error({ err: error }, 'an export could not be written');
        res.destroy();
      });
      const left = new Promise<'left'>((resolve) => res.once('close', () => resolve('left')));
      const json = (name: string, value: unknown) => {
        zip.append(`${JSON.stringify(value, null, 2)}\n`, { name });
      };
      json('me.json', { user, gym: gym.name, sessions: places, notices: told.items });
      json('takes.json', takes);
      for (const clip of clips) {
        const take = rows.find((row) => row.id === clip.takeId);
        const bytes = await store.get(clip.originalKey);
        if (!take || !bytes) throw new Error(`the original of clip ${clip.id} is not in the store`);
        const day = take.createdAt.toISOString().slice(0, 10);
        zip.append(bytes, { name: `clips/${day} take ${take.number} ${clip.view} ${clip.id}` });
        // One clip after the other, so that the store is never asked for all at once.
        if ((await Promise.race([once(zip, 'entry'), left])) === 'left') return;
      }
      await zip.finalize();
    },
  };
}
