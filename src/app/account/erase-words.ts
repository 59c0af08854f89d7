import type { Role } from '@contract';
import type { Question } from '../shared/confirm/question';

/** What erasing does, said beside the act. */
export function eraseWords(role: Role): string {
  if (role === 'member') {
    return 'Your name, address, takes and clips are deleted for good, with the answers to them. Save your data first if you want to keep any of it.';
  }
  const owner =
    role === 'owner'
      ? ' A gym needs an active owner, so make somebody else an owner first if you are the last.'
      : '';
  return `Your name and address are deleted for good, and takes you have picked up go back to the queue. Answers you sent stay with the members they are for, from “Former coach”.${owner}`;
}

export function eraseQuestion(role: Role): Question {
  return {
    heading: 'Erase yourself for good?',
    body:
      role === 'member'
        ? 'All your clips go, too. Nobody can bring them back, neither your gym nor we.'
        : 'Nobody can bring your account back, neither your gym nor we.',
    confirmLabel: 'Erase me',
    cancelLabel: 'Keep my account',
  };
}
