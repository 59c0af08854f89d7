/** A seeded generator of numbers in [0, 1): mulberry32, public domain, by Tommy Ettinger (from memory). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** A slow wandering signal in about −1..1 with three incommensurate periods drawn from the seed. */
export function wander(seed: number, periodS: number): (tS: number) => number {
  const next = seeded(seed);
  const parts = [1, 0.53, 0.29].map((share) => ({
    w: (2 * Math.PI) / (periodS * share * (0.85 + 0.3 * next())),
    p: 2 * Math.PI * next(),
    a: share,
  }));
  return (tS) => parts.reduce((sum, { w, p, a }) => sum + a * Math.sin(w * tS + p), 0) / 1.4;
}
