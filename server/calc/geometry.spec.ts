import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { measure, type FramePoint, type MeasureKind } from './geometry';

/** A frame of one pixel, so that fractions are pixels; vectors below are given in pixels. */
const UNIT = { width: 1, height: 1 };
const PORTRAIT = { width: 1080, height: 1920 };

function valueOf(kind: MeasureKind, points: readonly FramePoint[], size = UNIT): number {
  const result = measure(kind, points, size);
  if (!result.ok) throw new Error(result.reason);
  return result.value;
}
function plusMinusOf(kind: MeasureKind, points: readonly FramePoint[], sigmaPx: number): number {
  const result = measure(kind, points, UNIT, sigmaPx);
  if (!result.ok) throw new Error(result.reason);
  return result.plusMinus;
}

describe('a joint angle', () => {
  // Constructed vectors; the angles follow from elementary geometry.
  it.each<[string, FramePoint[], number]>([
    [
      'right',
      [
        [0, 1],
        [0, 0],
        [1, 0],
      ],
      90,
    ],
    [
      'straight',
      [
        [-1, 0],
        [0, 0],
        [1, 0],
      ],
      180,
    ],
    [
      'half of a right angle',
      [
        [1, 0],
        [0, 0],
        [1, 1],
      ],
      45,
    ],
    [
      'obtuse',
      [
        [1, 0],
        [0, 0],
        [-1, 1],
      ],
      135,
    ],
    [
      'of a 3-4-5 triangle',
      [
        [0, 0],
        [3, 0],
        [0, 4],
      ],
      53.130102,
    ],
    [
      'of a 3-4-5 triangle at its other end',
      [
        [0, 0],
        [0, 4],
        [3, 0],
      ],
      36.869898,
    ],
    [
      'of a knee',
      [
        [420, 1130],
        [660, 1110],
        [600, 1480],
      ],
      76.025332,
    ],
    [
      'of a hip',
      [
        [560, 760],
        [420, 1130],
        [660, 1110],
      ],
      64.510799,
    ],
    [
      'almost straight',
      [
        [0, 0],
        [1000, 0],
        [2000, 0.001],
      ],
      179.999942704,
    ],
  ])('is right: %s', (_name, points, expected) => {
    expect(valueOf('angle', points)).toBeCloseTo(expected, 5);
  });

  it('is taken from pixels, not from fractions of a frame that is not square', () => {
    const points: FramePoint[] = [
      [0.3, 0.45],
      [0.22, 0.62],
      [0.38, 0.7],
    ];
    expect(valueOf('angle', points, PORTRAIT)).toBeCloseTo(116.807059, 6);
    expect(valueOf('angle', points, { width: 1000, height: 1000 })).toBeCloseTo(91.363928, 6);
  });

  it('does not change when the figure is moved, turned, scaled, mirrored or read from the other end', () => {
    const unit = fc.double({ min: 0, max: 1, noNaN: true });
    const point = fc.tuple(unit, unit);
    fc.assert(
      fc.property(point, point, point, unit, unit, (a, b, c, turn, shift) => {
        const size = { width: 1000, height: 1000 };
        const before = measure('angle', [a, b, c], size);
        fc.pre(
          before.ok &&
            Math.hypot(a[0] - b[0], a[1] - b[1]) > 0.01 &&
            Math.hypot(c[0] - b[0], c[1] - b[1]) > 0.01,
        );
        const angle = turn * 2 * Math.PI;
        const moved = ([x, y]: FramePoint): FramePoint => [
          0.5 * (x * Math.cos(angle) - y * Math.sin(angle)) + shift,
          0.5 * (x * Math.sin(angle) + y * Math.cos(angle)) - shift,
        ];
        const value = before.ok ? before.value : NaN;
        expect(valueOf('angle', [a, b, c].map(moved), size)).toBeCloseTo(value, 6);
        expect(valueOf('angle', [c, b, a], size)).toBeCloseTo(value, 9);
        expect(
          valueOf(
            'angle',
            [a, b, c].map(([x, y]): FramePoint => [1 - x, y]),
            size,
          ),
        ).toBeCloseTo(value, 6);
      }),
      { numRuns: 200 },
    );
  });
});

describe('lean', () => {
  it('is 0 upright, positive toward the right of the frame, and 180 upside down', () => {
    expect(
      valueOf('lean', [
        [0, 100],
        [0, 0],
      ]),
    ).toBe(0);
    expect(
      valueOf('lean', [
        [0, 100],
        [100, 0],
      ]),
    ).toBeCloseTo(45, 9);
    expect(
      valueOf('lean', [
        [100, 100],
        [0, 0],
      ]),
    ).toBeCloseTo(-45, 9);
    expect(
      valueOf('lean', [
        [0, 0],
        [0, 100],
      ]),
    ).toBe(180);
    expect(
      valueOf('lean', [
        [5, 0],
        [5, 100],
      ]),
    ).toBe(180);
  });

  it('is that of the trunk and the shank of the constructed frame', () => {
    expect(
      valueOf('lean', [
        [420, 1130],
        [560, 760],
      ]),
    ).toBeCloseTo(20.725559, 6);
    expect(
      valueOf('lean', [
        [600, 1480],
        [660, 1110],
      ]),
    ).toBeCloseTo(9.211027, 6);
  });
});

describe('depth', () => {
  it('is positive when the hip is lower than the knee, whichever way the lifter faces', () => {
    // Same constructed frame: the hip crease stands 20 px lower than the knee, which is below parallel.
    expect(
      valueOf('depth', [
        [420, 1130],
        [660, 1110],
      ]),
    ).toBeCloseTo(4.763642, 6);
    expect(
      valueOf('depth', [
        [660, 1130],
        [420, 1110],
      ]),
    ).toBeCloseTo(4.763642, 6);
  });

  it('is not below when level (IPF Technical Rules: lower than the top of the knees)', () => {
    expect(
      valueOf('depth', [
        [0, 50],
        [100, 50],
      ]),
    ).toBe(0);
    expect(
      valueOf('depth', [
        [0, 0],
        [0, 100],
      ]),
    ).toBe(-90);
  });
});

describe('the ± of a measure', () => {
  // Constructed, first order: a right angle with arms of L pixels has SD (σ/L)·√4 rad; 1.96 SD make 95 % limits.
  it.each([
    [100, 2, 2.292],
    [200, 2, 1.146],
    [400, 2, 0.573],
    [200, 5, 2.865],
  ])('follows from arms of %i px and a placing error of %i px', (length, sigma, sd) => {
    const points: FramePoint[] = [
      [0, length],
      [0, 0],
      [length, 0],
    ];
    expect(plusMinusOf('angle', points, sigma) / 1.959963984540054).toBeCloseTo(sd, 3);
  });

  it.each<[MeasureKind, FramePoint[]]>([
    [
      'angle',
      [
        [420, 1130],
        [660, 1110],
        [600, 1480],
      ],
    ],
    [
      'angle',
      [
        [100, 100],
        [400, 120],
        [700, 260],
      ],
    ],
    [
      'lean',
      [
        [420, 1130],
        [560, 760],
      ],
    ],
    [
      'depth',
      [
        [420, 1130],
        [660, 1110],
      ],
    ],
  ])('of %s agrees with placing the points many times over', (kind, points) => {
    const sigma = 2;
    const normal = normals(20_261_201);
    const values = Array.from({ length: 20_000 }, () =>
      valueOf(
        kind,
        points.map(([x, y]): FramePoint => [x + sigma * normal(), y + sigma * normal()]),
      ),
    );
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const sd = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
    // The spread of 20 000 draws is itself known to 1 in 200; 3 % leaves room for the second order.
    expect(plusMinusOf(kind, points, sigma) / 1.959963984540054 / sd).toBeGreaterThan(0.97);
    expect(plusMinusOf(kind, points, sigma) / 1.959963984540054 / sd).toBeLessThan(1.03);
  });

  it('is never wider than the circle', () => {
    expect(
      plusMinusOf(
        'angle',
        [
          [1, 0],
          [0, 0],
          [0, 1],
        ],
        50,
      ),
    ).toBe(180);
  });
});

describe('what has no number', () => {
  it('is refused with a reason', () => {
    expect(
      measure(
        'angle',
        [
          [0, 0],
          [0, 0],
          [1, 1],
        ],
        PORTRAIT,
      ),
    ).toEqual({ ok: false, reason: 'points-coincide' });
    expect(
      measure(
        'angle',
        [
          [1, 1],
          [0, 0],
          [0, 0],
        ],
        PORTRAIT,
      ),
    ).toEqual({ ok: false, reason: 'points-coincide' });
    expect(
      measure(
        'lean',
        [
          [0.5, 0.5],
          [0.5, 0.5],
        ],
        PORTRAIT,
      ),
    ).toEqual({ ok: false, reason: 'points-coincide' });
    expect(
      measure(
        'depth',
        [
          [0.5, 0.5],
          [0.5, 0.5],
        ],
        PORTRAIT,
      ),
    ).toEqual({ ok: false, reason: 'points-coincide' });
    expect(
      measure(
        'angle',
        [
          [0, 0],
          [1, 1],
        ],
        PORTRAIT,
      ),
    ).toEqual({ ok: false, reason: 'wrong-number-of-points' });
    expect(
      measure(
        'lean',
        [
          [0, 0],
          [1, 1],
          [0, 1],
        ],
        PORTRAIT,
      ),
    ).toEqual({
      ok: false,
      reason: 'wrong-number-of-points',
    });
    expect(
      measure(
        'lean',
        [
          [0, 0],
          [1, 1],
        ],
        { width: 0, height: 0 },
      ),
    ).toEqual({ ok: false, reason: 'no-size' });
  });
});

/** Standard normal draws (Box–Muller) from a small seeded generator (mulberry32), so that the test repeats exactly. */
function normals(seed: number): () => number {
  let state = seed;
  const uniform = () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
}
