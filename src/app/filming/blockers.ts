import type { TakeDto, View } from '@contract';
import { viewsPhrase } from '../shared/take-words/take-words';

/** What keeps a take from being handed in, each with what to do; empty when nothing does. */
export function blockers(
  take: Pick<TakeDto, 'clips'> | null,
  views: readonly View[],
  busy: readonly View[],
  needsConsent: boolean,
): string[] {
  const clips = take?.clips ?? [];
  const missing = views.filter((view) => !busy.includes(view) && !clips.some((clip) => clip.view === view));
  const broken = clips
    .filter((clip) => clip.state === 'unplayable' && views.includes(clip.view) && !busy.includes(clip.view))
    .map((clip) => clip.view);
  return [
    needsConsent
      ? 'You are under 18: a parent or guardian must agree first. Ask your coach to record it; your clips stay here.'
      : '',
    missing.length > 0 ? `Film ${viewsPhrase(missing)} first.` : '',
    busy.length > 0 ? `Wait until ${viewsPhrase(busy)} has been sent.` : '',
    broken.length > 0 ? `Film ${viewsPhrase(broken)} again: it cannot be played.` : '',
  ].filter(Boolean);
}
