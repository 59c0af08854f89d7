import { describe, expect, it } from 'vitest';
import { kaplanMeier, quantile, type IntervalTransform, type Observation } from './survival';

const events = (...times: number[]): Observation[] => times.map((time) => ({ time, event: true }));
const censored = (...times: number[]): Observation[] => times.map((time) => ({ time, event: false }));

/** Freireich et al. (1963) Blood 21:699, as in R's MASS::gehan: weeks of remission. */
const SIX_MP = [
  ...events(6, 6, 6, 7, 10, 13, 16, 22, 23),
  ...censored(6, 9, 10, 11, 17, 19, 20, 25, 32, 32, 34, 35),
];
const PLACEBO = events(1, 1, 2, 2, 3, 4, 4, 5, 5, 8, 8, 8, 8, 11, 11, 12, 12, 15, 17, 22, 23);
/** Miller (1981), Survival Analysis, as in R's survival::aml: weeks. */
const MAINTAINED = [...events(9, 13, 18, 23, 31, 34, 48), ...censored(13, 28, 45, 161)];
const NOT_MAINTAINED = [...events(5, 5, 8, 8, 12, 23, 27, 30, 33, 43, 45), ...censored(16)];

type Row = [time: number, atRisk: number, events: number, share: number, se: number, ...limits: number[]];

/** Tables recomputed with R 4.2.2 survival 3.5-3: limits plain, log, log-log. */
const TABLES: [string, Observation[], Row[]][] = [
  [
    '6-MP',
    SIX_MP,
    [
      [6, 21, 3, 0.857143, 0.07636, 0.7075, 1.0, 0.7198, 1.0, 0.6197, 0.9516],
      [7, 17, 1, 0.806723, 0.086935, 0.6363, 0.9771, 0.6531, 0.9964, 0.5631, 0.9228],
      [10, 15, 1, 0.752941, 0.09635, 0.5641, 0.9418, 0.5859, 0.9676, 0.5032, 0.8894],
      [13, 12, 1, 0.690196, 0.106815, 0.4808, 0.8995, 0.5096, 0.9348, 0.4316, 0.8491],
      [16, 11, 1, 0.627451, 0.114054, 0.4039, 0.851, 0.4394, 0.896, 0.3675, 0.8049],
      [22, 7, 1, 0.537815, 0.128234, 0.2865, 0.7891, 0.337, 0.8582, 0.2678, 0.7468],
      [23, 6, 1, 0.448179, 0.134591, 0.1844, 0.712, 0.2488, 0.8074, 0.1881, 0.6801],
    ],
  ],
  [
    'placebo',
    PLACEBO,
    [
      [1, 21, 2, 0.904762, 0.064056, 0.7792, 1.0, 0.7875, 1.0, 0.67, 0.9753],
      [2, 19, 2, 0.809524, 0.085689, 0.6416, 0.9775, 0.6579, 0.9962, 0.5689, 0.9239],
      [3, 17, 1, 0.761905, 0.092943, 0.5797, 0.9441, 0.5999, 0.9677, 0.5194, 0.8933],
      [4, 16, 2, 0.666667, 0.102869, 0.465, 0.8683, 0.4927, 0.9021, 0.4254, 0.825],
      [5, 14, 2, 0.571429, 0.10799, 0.3598, 0.7831, 0.3945, 0.8276, 0.338, 0.7492],
      [8, 12, 4, 0.380952, 0.105971, 0.1733, 0.5887, 0.2208, 0.6571, 0.1831, 0.5778],
      [11, 8, 2, 0.285714, 0.098581, 0.0925, 0.4789, 0.1453, 0.5619, 0.1166, 0.4818],
      [12, 6, 2, 0.190476, 0.085689, 0.0225, 0.3584, 0.0789, 0.46, 0.0595, 0.3774],
      [15, 4, 1, 0.142857, 0.07636, 0.0, 0.2925, 0.0501, 0.4073, 0.0357, 0.3212],
      [17, 3, 1, 0.095238, 0.064056, 0.0, 0.2208, 0.0255, 0.3559, 0.0163, 0.2612],
      [22, 2, 1, 0.047619, 0.046471, 0.0, 0.1387, 0.007, 0.3225, 0.0033, 0.197],
    ],
  ],
  [
    'AML, maintained',
    MAINTAINED,
    [
      [9, 11, 1, 0.909091, 0.086678, 0.7392, 1.0, 0.7541, 1.0, 0.5081, 0.9867],
      [13, 10, 1, 0.818182, 0.116291, 0.5903, 1.0, 0.6192, 1.0, 0.4474, 0.9512],
      [18, 8, 1, 0.715909, 0.139665, 0.4422, 0.9896, 0.4884, 1.0, 0.3502, 0.899],
      [23, 7, 1, 0.613636, 0.152632, 0.3145, 0.9128, 0.3769, 0.9992, 0.2658, 0.8353],
      [31, 5, 1, 0.490909, 0.164193, 0.1691, 0.8127, 0.2549, 0.9456, 0.1673, 0.7534],
      [34, 4, 1, 0.368182, 0.162669, 0.0494, 0.687, 0.1549, 0.8753, 0.0928, 0.657],
      [48, 2, 1, 0.184091, 0.153493, 0.0, 0.4849, 0.0359, 0.9435, 0.0117, 0.525],
    ],
  ],
  [
    'AML, not maintained',
    NOT_MAINTAINED,
    [
      [5, 12, 2, 0.833333, 0.107583, 0.6225, 1.0, 0.647, 1.0, 0.4817, 0.9555],
      [8, 10, 2, 0.666667, 0.136083, 0.3999, 0.9334, 0.4468, 0.9946, 0.337, 0.8597],
      [12, 8, 1, 0.583333, 0.142319, 0.3044, 0.8623, 0.3616, 0.941, 0.2701, 0.8009],
      [23, 6, 1, 0.486111, 0.14813, 0.1958, 0.7764, 0.2675, 0.8833, 0.1919, 0.7297],
      [27, 5, 1, 0.388889, 0.146986, 0.1008, 0.677, 0.1854, 0.8157, 0.1263, 0.6498],
      [30, 4, 1, 0.291667, 0.138715, 0.0198, 0.5635, 0.1148, 0.7408, 0.0724, 0.5609],
      [33, 3, 1, 0.194444, 0.121875, 0.0, 0.4333, 0.0569, 0.6642, 0.0312, 0.4614],
      [43, 2, 1, 0.097222, 0.091866, 0.0, 0.2773, 0.0153, 0.6195, 0.0057, 0.3489],
    ],
  ],
];
const TRANSFORMS: IntervalTransform[] = ['plain', 'log', 'log-log'];

describe.each(TABLES)('the Kaplan–Meier table of %s', (_name, observations, rows) => {
  it.each(TRANSFORMS)('agrees with R, limits %s', (transform) => {
    const { steps } = kaplanMeier(observations, transform);
    const column = 5 + 2 * TRANSFORMS.indexOf(transform);
    rows.forEach((row, i) => {
      const step = steps[i];
      expect([step?.time, step?.atRisk, step?.events]).toEqual(row.slice(0, 3));
      expect(step?.share).toBeCloseTo(row[3], 6);
      expect(step?.standardError).toBeCloseTo(row[4], 6);
      expect(step?.low).toBeCloseTo(row[column] ?? NaN, 4);
      expect(step?.high).toBeCloseTo(row[column + 1] ?? NaN, 4);
    });
  });
});

describe('the end of a Kaplan–Meier table', () => {
  it('has neither error nor limits where nobody waits any more', () => {
    for (const observations of [PLACEBO, NOT_MAINTAINED]) {
      expect(kaplanMeier(observations).steps.at(-1)).toMatchObject({
        atRisk: 1,
        share: 0,
        standardError: null,
        low: null,
        high: null,
      });
    }
  });
});

describe('quantiles and their Brookmeyer–Crowley limits', () => {
  // R 4.2.2 survival 3.5-3; the AML medians and their log limits stand in the package's own printed tests.
  it.each<[string, Observation[], (number | null)[], (number | null)[][]]>([
    [
      '6-MP',
      SIX_MP,
      [13, 23, null],
      [
        [13, null],
        [16, null],
        [13, null],
      ],
    ],
    [
      'placebo',
      PLACEBO,
      [4, 8, 12],
      [
        [4, 11],
        [4, 12],
        [4, 11],
      ],
    ],
    [
      'AML, maintained',
      MAINTAINED,
      [18, 31, 48],
      [
        [18, 48],
        [18, null],
        [13, null],
      ],
    ],
    [
      'AML, not maintained',
      NOT_MAINTAINED,
      [8, 23, 33],
      [
        [8, 33],
        [8, null],
        [5, 33],
      ],
    ],
  ])('of %s', (_name, observations, quartiles, medianLimits) => {
    const curve = kaplanMeier(observations);
    expect([0.25, 0.5, 0.75].map((done) => quantile(curve, done).time)).toEqual(quartiles);
    TRANSFORMS.forEach((transform, i) => {
      const { low, high } = quantile(kaplanMeier(observations, transform), 0.5);
      expect([low, high]).toEqual(medianLimits[i]);
    });
  });

  it('of the first quarter of 6-MP', () => {
    const limitsOf = (transform: IntervalTransform) => {
      const { low, high } = quantile(kaplanMeier(SIX_MP, transform), 0.25);
      return [low, high];
    };
    expect(limitsOf('log')).toEqual([6, null]);
    expect(limitsOf('plain')).toEqual([6, 23]);
    expect(limitsOf('log-log')).toEqual([6, 22]);
  });

  it('are the middle of a flat stretch (tests/quantile.Rout.save of R’s survival)', () => {
    const curve = kaplanMeier([...events(9, 1, 6, 6), ...censored(1, 8, 10)]);
    const at = [13 / 14, 6 / 7, 2 / 3, 1 / 2, 9 / 35, 1 / 10].map((share) => quantile(curve, 1 - share).time);
    expect(at).toEqual([1, 3.5, 6, 9, 9.5, null]);
    const four = quantile(kaplanMeier(events(2, 4, 6, 8), 'log'), 0.5);
    expect(four).toEqual({ time: 5, low: 2, high: null });
  });

  it('are not reached while everyone waits', () => {
    const curve = kaplanMeier(censored(5, 7, 9));
    expect(curve.steps).toEqual([]);
    expect(quantile(curve, 0.5)).toEqual({ time: null, low: null, high: null });
    expect(quantile(kaplanMeier([]), 0.5).time).toBeNull();
  });

  it('count an item last seen at the instant of an event as at risk for it', () => {
    expect(kaplanMeier([...events(5), ...censored(5, 9)]).steps[0]?.share).toBeCloseTo(2 / 3, 12);
  });
});

it('does not fall for the median of what has ended already', () => {
  const ended = SIX_MP.filter((item) => item.event).map((item) => item.time);
  expect(ended[Math.floor(ended.length / 2)]).toBe(10);
  expect(quantile(kaplanMeier(SIX_MP), 0.5).time).toBe(23);
});
