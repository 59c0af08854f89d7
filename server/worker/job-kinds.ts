import { deleteObjects } from './delete-objects';
import type { JobKinds } from './handler';
import { giveUpClip, processClip } from './process-clip';
import { sendMail } from './send-mail';
import { warnOfTake } from './warn-take';

/** How each kind of job is done. */
export const JOB_KINDS: JobKinds = {
  'clip.process': { run: processClip, onDead: giveUpClip },
  'mail.send': { run: sendMail },
  'objects.delete': { run: deleteObjects },
  'take.warn': { run: warnOfTake },
};
