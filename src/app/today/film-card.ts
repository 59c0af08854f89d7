import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { MatButton } from '@angular/material/button';
import type { ClipDto, View } from '@contract';
import { FilmSlot } from '../shared/film-slot/film-slot';
import { repsWords } from '../shared/take-words/brief-words';
import { dueWords, stateSentence, untilAnsweredScale, viewsPhrase } from '../shared/take-words/take-words';
import { Clock } from '../shared/times/clock';
import { GymZone } from '../shared/times/gym-zone';
import type { ToFilm } from './today-plan';

/** An assignment that wants filming: its two slots are its body. */
@Component({
  selector: 'mf-film-card',
  imports: [FilmSlot, MatButton, RouterLink],
  templateUrl: './film-card.html',
  styleUrl: './film-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FilmCard {
  private readonly clock = inject(Clock);
  private readonly gym = inject(GymZone);

  readonly card = input.required<ToFilm>();

  protected readonly link = computed(() => ['/filming', this.card().assignment.id]);
  protected readonly brief = computed(() => this.card().assignment.lift.brief);
  protected readonly how = computed(() => {
    const { assignment, views } = this.card();
    const where = views.map((view) => `from the ${view}`).join(' and ');
    const load = assignment.load ? `, ${assignment.load}` : '';
    return `${repsWords(assignment.lift.brief)} ${where}${load}.`;
  });
  protected readonly again = computed(() => {
    const { refilm } = this.card();
    if (!refilm) return null;
    const by = refilm.by ? ` by ${dueWords(refilm.by, this.now())}` : '';
    const note = refilm.note ? ` “${refilm.note}”` : '';
    return `Your coach asks for ${viewsPhrase(refilm.views)} again${by}.${note}`;
  });
  protected readonly trained = computed(() => {
    const { trainAt } = this.card().assignment;
    return trainAt && Date.parse(trainAt) > this.clock.nowMs()
      ? `You train it ${dueWords(trainAt, this.now())}.`
      : null;
  });
  protected readonly state = computed(() => {
    const { take } = this.card();
    return take?.state === 'draft' && take.clips.length > 0 ? stateSentence(take, this.now()) : null;
  });
  protected readonly broken = computed(() => {
    const { take } = this.card();
    if (take?.state !== 'unplayable') return null;
    const clip = take.clips.find(({ problem }) => problem !== null);
    const problem = clip?.problem ?? take.problem;
    return problem ? { ...problem, view: clip?.view ?? null } : null;
  });
  protected readonly scale = computed(() =>
    untilAnsweredScale(this.card().assignment, (this.card().take?.pain ?? null) !== null),
  );

  private readonly now = computed(() => ({ nowMs: this.clock.nowMs(), zone: this.gym.zone() }));

  protected clipOf(view: View): ClipDto | null {
    return this.card().take?.clips.find((clip) => clip.view === view) ?? null;
  }
}
