import type { Role } from '@contract';
import type { IconName } from '../shared/icons/icon-set';

/** One room in the navigation. */
export interface NavigationItem {
  path: string;
  label: string;
  icon: IconName;
}

const MEMBER: readonly NavigationItem[] = [
  { path: '/today', label: 'Today', icon: 'videocam' },
  { path: '/answers', label: 'Answers', icon: 'forum' },
  { path: '/progress', label: 'Progress', icon: 'trending-up' },
];

const COACH: readonly NavigationItem[] = [
  { path: '/queue', label: 'Queue', icon: 'list-alt' },
  { path: '/assignments', label: 'Assignments', icon: 'assignment' },
  { path: '/lifts', label: 'Lifts', icon: 'fitness-center' },
  { path: '/people', label: 'People', icon: 'group' },
];

const OWNER: readonly NavigationItem[] = [
  ...COACH,
  { path: '/turnaround', label: 'Turnaround', icon: 'timer' },
  { path: '/gym', label: 'Gym', icon: 'tune' },
];

/** The rooms of a role, in the order in which they are shown. */
export function navigationFor(role: Role | null): readonly NavigationItem[] {
  switch (role) {
    case 'member':
      return MEMBER;
    case 'coach':
      return COACH;
    case 'owner':
      return OWNER;
    default:
      return [];
  }
}
