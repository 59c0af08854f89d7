import { figureOf } from './measure-drawing';

const size = { width: 720, height: 1280 };

/** The points of a path's straight lines. */
const pointsOf = (path: string): number[][] =>
  [...path.matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)].map(([, x, y]) => [Number(x), Number(y)]);

describe('the drawing of a measure', () => {
  it('keeps the angle of a frame that is not square', () => {
    // 45 degrees in pixels: 144 px to the right and 144 px up, which as fractions is 0.2 and 0.1125.
    const { line } = figureOf(
      {
        kind: 'lean',
        points: [
          [0.4, 0.6],
          [0.6, 0.4875],
        ],
      },
      size,
    );
    const [[x1, y1] = [], [x2, y2] = []] = pointsOf(line);
    expect(Number(x2) - Number(x1)).toBeCloseTo(Number(y1) - Number(y2), 1);
  });

  it('holds a lean against the vertical through its lower point', () => {
    const { reference } = figureOf(
      {
        kind: 'lean',
        points: [
          [0.5, 0.8],
          [0.6, 0.5],
        ],
      },
      size,
    );
    const [[x1] = [], [x2, y2] = []] = pointsOf(reference);
    expect(x2).toBe(x1);
    expect(y2).toBeLessThan(10);
  });

  it('draws an angle by its two arms, the vertex between them', () => {
    const { line, reference } = figureOf(
      {
        kind: 'angle',
        points: [
          [0.4, 0.3],
          [0.5, 0.5],
          [0.4, 0.7],
        ],
      },
      size,
    );
    expect(pointsOf(line)).toHaveLength(3);
    expect(reference).toBe('');
  });

  it('draws nothing without points', () => {
    expect(figureOf({ kind: 'depth', points: [] }, size)).toEqual({ line: '', reference: '', arc: '' });
  });
});
