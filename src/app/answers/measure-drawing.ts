import type { MeasureDto, Point } from '@contract';

/** The paths of a measure's drawing in a box of 72 by 72: its lines, what they are held against, the arc between. */
export interface MeasureDrawing {
  line: string;
  reference: string;
  arc: string;
}

const BOX = 72;
const MARGIN = 10;
const ARC_RADIUS = 15;

const round = (value: number): number => Math.round(value * 10) / 10;
const at = ([x, y]: Point): string => `${round(x)} ${round(y)}`;

/** Points of the frame scaled into the box, all alike in both directions so that angles stay what they are. */
function intoBox(points: readonly Point[], size: { width: number; height: number }): Point[] {
  const pixels = points.map(([x, y]): Point => [x * size.width, y * size.height]);
  const xs = pixels.map(([x]) => x);
  const ys = pixels.map(([, y]) => y);
  const [left, top] = [Math.min(...xs), Math.min(...ys)];
  const [wide, high] = [Math.max(...xs) - left, Math.max(...ys) - top];
  const scale = (BOX - 2 * MARGIN) / Math.max(wide, high, 1);
  return pixels.map(([x, y]) => [
    BOX / 2 + (x - left - wide / 2) * scale,
    BOX / 2 + (y - top - high / 2) * scale,
  ]);
}

/** The shorter arc around `centre` from the direction of one point to that of another. */
function arcBetween(centre: Point, from: Point, to: Point): string {
  const direction = ([x, y]: Point): number => Math.atan2(y - centre[1], x - centre[0]);
  const [start, end] = [direction(from), direction(to)];
  const turn = Math.atan2(Math.sin(end - start), Math.cos(end - start));
  const point = (angle: number): string =>
    at([centre[0] + ARC_RADIUS * Math.cos(angle), centre[1] + ARC_RADIUS * Math.sin(angle)]);
  return `M${point(start)}A${ARC_RADIUS} ${ARC_RADIUS} 0 0 ${turn > 0 ? 1 : 0} ${point(end)}`;
}

/** Draws a measure: an angle as its two arms, a lean beside the vertical, a depth beside the horizontal. */
export function figureOf(
  measure: Pick<MeasureDto, 'kind' | 'points'>,
  size: { width: number; height: number },
): MeasureDrawing {
  const [first, second, third] = intoBox(measure.points, size);
  if (!first || !second) return { line: '', reference: '', arc: '' };
  if (measure.kind === 'angle') {
    if (!third) return { line: `M${at(first)}L${at(second)}`, reference: '', arc: '' };
    return {
      line: `M${at(first)}L${at(second)}L${at(third)}`,
      reference: '',
      arc: arcBetween(second, first, third),
    };
  }
  const line = `M${at(first)}L${at(second)}`;
  // A lean is read at its lower point against the vertical; a depth at the hip against the horizontal.
  const held: Point =
    measure.kind === 'lean'
      ? [first[0], MARGIN / 2]
      : [second[0] >= first[0] ? BOX - MARGIN / 2 : MARGIN / 2, first[1]];
  return { line, reference: `M${at(first)}L${at(held)}`, arc: arcBetween(first, held, second) };
}
