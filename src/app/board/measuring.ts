import { computed, inject, Injectable, signal } from '@angular/core';
import type { MeasureDto, MeasureKind, Point } from '@contract';
import { measure } from '@calc/geometry';
import { BoardStore, type Instant } from './board-store';

/** What each kind asks for, point after point. */
const POINT_WORDS: Readonly<Record<MeasureKind, readonly string[]>> = {
  angle: ['one limb’s end', 'the joint', 'the other limb’s end'],
  lean: ['the lower end', 'the upper end'],
  depth: ['the hip', 'the knee'],
};

export const MEASURE_LABELS: Readonly<Record<MeasureKind, string>> = {
  angle: 'joint angle',
  lean: 'lean',
  depth: 'depth',
};

/** A measure as the board shows it: `joint angle 112° ± 3`; the ± is never shown as 0. */
export function measuredWords({
  kind,
  value,
  plusMinus,
}: Pick<MeasureDto, 'kind' | 'value' | 'plusMinus'>): string {
  return `${MEASURE_LABELS[kind]} ${String(Math.round(value))}° ± ${String(Math.max(1, Math.ceil(plusMinus)))}`;
}

/** The measure that is being taken: points on one still, kept when the last is placed. Provided by the page. */
@Injectable()
export class Measuring {
  private readonly store = inject(BoardStore);

  readonly kind = signal<MeasureKind | null>(null);
  readonly at = signal<Instant | null>(null);
  readonly points = signal<readonly Point[]>([]);
  readonly problem = signal<string | null>(null);

  /** What to place next, as a sentence. */
  readonly ask = computed(() => {
    const kind = this.kind();
    if (!kind) return null;
    const next = POINT_WORDS[kind][this.points().length];
    return next ? `${MEASURE_LABELS[kind]}: place ${next}. Arrows move the last point, Escape stops.` : null;
  });

  start(kind: MeasureKind, at: Instant): void {
    this.kind.set(kind);
    this.at.set(at);
    this.points.set([]);
    this.problem.set(null);
  }

  stop(): void {
    this.kind.set(null);
    this.at.set(null);
    this.points.set([]);
  }

  /** Moves the last point by picture points. */
  nudge(byX: number, byY: number, size: { width: number; height: number }): void {
    this.points.update((points) => {
      const last = points.at(-1);
      if (!last) return points;
      const within = (value: number) => Math.min(1, Math.max(0, value));
      return [
        ...points.slice(0, -1),
        [within(last[0] + byX / size.width), within(last[1] + byY / size.height)],
      ];
    });
  }

  async place(point: Point, size: { width: number; height: number }): Promise<void> {
    const [kind, at] = [this.kind(), this.at()];
    if (!kind || !at) return;
    const points = [...this.points(), point];
    this.points.set(points);
    if (points.length < POINT_WORDS[kind].length) return;
    const measured = measure(kind, points, size);
    if (!measured.ok) {
      this.points.set([]);
      this.problem.set('Those points lie on each other, so there is nothing to measure. Place them again.');
      return;
    }
    if (await this.store.addMeasure({ ...at, kind, points: [...points] })) this.stop();
  }
}
