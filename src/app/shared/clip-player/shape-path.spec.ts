import { shapePath } from './shape-path';

const size = { width: 720, height: 1280 };

describe('a drawing on a frame', () => {
  it('stands in pixels of the frame', () => {
    expect(
      shapePath(
        {
          kind: 'line',
          points: [
            [0.5, 0.5],
            [0.25, 0.75],
          ],
        },
        size,
      ),
    ).toBe('M360 640L180 960');
  });

  it('keeps a circle round on a frame that is not square', () => {
    const path = shapePath(
      {
        kind: 'circle',
        points: [
          [0.5, 0.5],
          [0.6, 0.5],
        ],
      },
      size,
    );
    expect(path).toBe('M288 640a72 72 0 1 0 144 0a72 72 0 1 0 -144 0');
  });

  it('hangs a plumb through the whole height', () => {
    expect(shapePath({ kind: 'plumb', points: [[0.5, 0.2]] }, size)).toBe('M360 0V1280');
  });

  it('gives an arrow a head that ends at its tip', () => {
    const path = shapePath(
      {
        kind: 'arrow',
        points: [
          [0.1, 0.5],
          [0.5, 0.5],
        ],
      },
      size,
    );
    expect(path.startsWith('M72 640L360 640M')).toBe(true);
    expect(path).toContain('L360 640L');
  });

  it('draws nothing where a point is missing', () => {
    expect(shapePath({ kind: 'arrow', points: [[0.1, 0.5]] }, size)).toBe('');
  });
});
