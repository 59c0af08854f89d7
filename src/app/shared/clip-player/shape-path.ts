import type { Drawing, Point } from '@contract';

type Shape = Drawing['shapes'][number];

/** The displayed frame, pixels. */
interface FrameSize {
  width: number;
  height: number;
}

/** The head of an arrow against the frame's width, and half of its opening, radians. */
const HEAD_SHARE = 0.05;
const HEAD_HALF_ANGLE = 0.5;

const round = (value: number): number => Math.round(value * 10) / 10;

function arrowHead([x1, y1]: Point, [x2, y2]: Point, size: FrameSize): string {
  const direction = Math.atan2(y2 - y1, x2 - x1);
  const length = size.width * HEAD_SHARE;
  const end = (turn: number): string =>
    `${round(x2 - length * Math.cos(direction + turn))} ${round(y2 - length * Math.sin(direction + turn))}`;
  return `M${end(HEAD_HALF_ANGLE)}L${round(x2)} ${round(y2)}L${end(-HEAD_HALF_ANGLE)}`;
}

function polyline(points: readonly Point[]): string {
  return points.map(([x, y], index) => `${index === 0 ? 'M' : 'L'}${round(x)} ${round(y)}`).join('');
}

/**
 * A shape as the `d` of an SVG path in pixels of the frame. Points are fractions of the frame. A circle is given by
 * its centre and a point on it; a plumb is the vertical through its point. Empty when points are missing.
 */
export function shapePath(shape: Shape, size: FrameSize): string {
  const points = shape.points.map(([x, y]): Point => [x * size.width, y * size.height]);
  const [first, second] = points;
  if (!first) return '';
  if (shape.kind === 'plumb') return `M${round(first[0])} 0V${size.height}`;
  if (shape.kind === 'stroke' || shape.kind === 'angle') return polyline(points);
  if (!second) return '';
  if (shape.kind === 'line') return polyline([first, second]);
  if (shape.kind === 'arrow') return polyline([first, second]) + arrowHead(first, second, size);
  const radius = round(Math.hypot(second[0] - first[0], second[1] - first[1]));
  const left = round(first[0] - radius);
  const y = round(first[1]);
  return `M${left} ${y}a${radius} ${radius} 0 1 0 ${2 * radius} 0a${radius} ${radius} 0 1 0 ${-2 * radius} 0`;
}
