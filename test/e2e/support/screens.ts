/** A screen by the address a person opens; `ID` parts come from the world. */
export interface Screen {
  readonly name: string;
  readonly who: 'nobody' | 'member' | 'coach' | 'owner';
  readonly path: string;
}

export interface ScreenIds {
  readonly liftId: string;
  readonly assignmentId: string;
  readonly waitingId: string;
  readonly answeredId: string;
  readonly memberId: string;
}

/** Every screen of the product. */
export const screens = (ids: ScreenIds): readonly Screen[] => [
  { name: 'sign-in', who: 'nobody', path: '/sign-in' },
  { name: 'open-a-gym', who: 'nobody', path: '/open-a-gym' },
  { name: 'forgot', who: 'nobody', path: '/forgot' },
  { name: 'reset', who: 'nobody', path: '/reset/a-link-that-was-used' },
  { name: 'invitation', who: 'nobody', path: '/invitation/a-link-that-is-gone' },
  { name: 'cautions', who: 'nobody', path: '/cautions' },
  { name: 'mailbox', who: 'nobody', path: '/mailbox' },
  { name: 'today', who: 'member', path: '/today' },
  { name: 'filming', who: 'member', path: `/filming/${ids.assignmentId}` },
  { name: 'answers', who: 'member', path: '/answers' },
  { name: 'answer', who: 'member', path: `/answers/${ids.answeredId}` },
  { name: 'progress', who: 'member', path: '/progress' },
  { name: 'account', who: 'member', path: '/account' },
  { name: 'not-here', who: 'member', path: '/nothing/is/here' },
  { name: 'queue', who: 'coach', path: '/queue' },
  { name: 'unplayable', who: 'coach', path: '/queue/unplayable' },
  { name: 'board', who: 'coach', path: `/board/${ids.waitingId}` },
  { name: 'board-answered', who: 'coach', path: `/board/${ids.answeredId}` },
  { name: 'assignments', who: 'coach', path: '/assignments' },
  { name: 'assignment', who: 'coach', path: `/assignments/${ids.assignmentId}` },
  { name: 'assignment-new', who: 'coach', path: '/assignments/new' },
  { name: 'lifts', who: 'coach', path: '/lifts' },
  { name: 'lift', who: 'coach', path: `/lifts/${ids.liftId}` },
  { name: 'lift-edit', who: 'coach', path: `/lifts/${ids.liftId}/edit` },
  { name: 'lift-new', who: 'coach', path: '/lifts/new' },
  { name: 'progress-of-a-member', who: 'coach', path: `/progress/${ids.memberId}` },
  { name: 'people', who: 'owner', path: '/people' },
  { name: 'invite', who: 'owner', path: '/people/invite' },
  { name: 'gym', who: 'owner', path: '/gym' },
  { name: 'turnaround', who: 'owner', path: '/turnaround' },
];
