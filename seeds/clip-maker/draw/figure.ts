import type { Body } from '../anthropometry';
import type { Look } from '../options';
import { SIDES, type Side, type Skeleton, sign } from '../skeleton';
import { type V3, add, along, cross, distance, mix, scale, squareTo, sub, unit } from '../vec';
import { drawHead } from './head';
import type { Material, Mesh, Ring } from './mesh';
import { PART } from './parts';
import type { Wardrobe } from './wardrobe';

/** A point of the trunk: s 0 at mid-hip, 1 at the shoulders; beyond both ends the line runs on. */
function trunkAt(skeleton: Skeleton, trunkLength: number, s: number): { at: V3; up: V3; front: V3 } {
  const spine = skeleton.spine;
  const last = spine.length - 1;
  const x = s * last;
  const i = Math.max(0, Math.min(last - 1, Math.floor(x)));
  const a = spine[i] as Skeleton['spine'][number];
  const b = spine[i + 1] as Skeleton['spine'][number];
  if (x < 0) return { ...a, at: along(a.at, a.up, s * trunkLength) };
  if (x > last) return { ...b, at: along(b.at, b.up, (s - 1) * trunkLength) };
  return {
    at: mix(a.at, b.at, x - i),
    up: unit(mix(a.up, b.up, x - i)),
    front: unit(mix(a.front, b.front, x - i)),
  };
}

/** s, half width, depth to the front and to the back, fractions of height. */
type Slice = readonly [number, number, number, number];

const HIPS: Slice[] = [
  [-0.24, 0.02, 0.02, 0.02],
  [-0.2, 0.052, 0.04, 0.046],
  [-0.12, 0.085, 0.053, 0.068],
  [-0.02, 0.097, 0.059, 0.07],
  [0.05, 0.095, 0.058, 0.064],
  [0.1, 0.086, 0.05, 0.052],
  [0.2, 0.07, 0.042, 0.04],
  [0.26, 0.05, 0.03, 0.03],
];

const SHIRT: Slice[] = [
  [-0.05, 0.092, 0.054, 0.064],
  [-0.045, 0.1055, 0.0675, 0.0775],
  [0.05, 0.1035, 0.0675, 0.073],
  [0.14, 0.099, 0.066, 0.066],
  [0.24, 0.0935, 0.063, 0.0585],
  [0.36, 0.0885, 0.061, 0.053],
  [0.48, 0.0905, 0.063, 0.055],
  [0.6, 0.0965, 0.067, 0.06],
  [0.72, 0.102, 0.07, 0.064],
  [0.82, 0.1065, 0.067, 0.066],
  [0.9, 0.106, 0.058, 0.063],
  [0.96, 0.094, 0.049, 0.057],
  [1.01, 0.072, 0.041, 0.05],
  [1.05, 0.052, 0.037, 0.044],
  [1.075, 0.042, 0.036, 0.0395],
];

function drawTrunk(mesh: Mesh, body: Body, skeleton: Skeleton, wear: Wardrobe): void {
  const h = body.heightM;
  const ring = ([s, side, front, back]: Slice, m: Material, hips: boolean): Ring => {
    const { at, front: u } = trunkAt(skeleton, body.trunk, s);
    const chest = Math.max(0, Math.min(1, (s - 0.45) / 0.25));
    const girth = hips
      ? Math.min(body.hips, (body.hips + body.waist) / 2)
      : body.waist + (body.chest - body.waist) * chest;
    const low = Math.max(0, Math.min(1, (0.3 - s) / 0.25));
    const wide = hips
      ? body.hips
      : (s > 0.8 ? (body.shoulders + body.chest) / 2 : girth) * (1 - low) + body.hips * low;
    const neck = Math.max(0, Math.min(1, (s - 0.95) / 0.1));
    const deep = girth * (1 - low) + ((girth + body.hips) / 2) * low;
    const bust = hips ? 0 : body.bust * 0.014 * Math.exp(-(((s - 0.69) / 0.11) ** 2));
    const belly = hips ? 0 : Math.max(0, body.waist - 1) * 0.07 * Math.exp(-(((s - 0.3) / 0.17) ** 2));
    const k = 1 - neck;
    return {
      at,
      u,
      v: skeleton.right,
      front: h * (front * (deep * k + neck) + bust + belly),
      back: h * back * (deep * k + neck),
      side: h * side * (wide * k + neck),
      material: m,
      square: 2.3,
    };
  };
  mesh.tube(
    HIPS.map((slice) => ring(slice, wear.legs, true)),
    PART.pelvis,
    24,
  );
  mesh.tube(
    SHIRT.map((slice, i) => ring(slice, i === 0 ? wear.shirtDark : wear.shirt, false)),
    PART.torso,
    28,
    (r, angle) => {
      const s = (SHIRT[r] ?? SHIRT[0] ?? [0])[0];
      // Cloth gathers above the waist and hangs free at the hem.
      const fold = Math.exp(-(((s - 0.22) / 0.16) ** 2));
      const valley =
        s > 0.55 && s < 0.85
          ? -0.0035 * Math.exp(-(((angle > Math.PI ? 2 * Math.PI - angle : angle) / 0.3) ** 2))
          : 0;
      return { out: h * (0.0022 * fold * Math.sin(angle * 5 + s * 21) + valley * (1 - body.bust * 0.5)) };
    },
  );
  // Neck, from inside the collar to the skull.
  const base = trunkAt(skeleton, body.trunk, 1);
  const skull = skeleton.joints.neck;
  const neckFront = unit(add(base.front, skeleton.head.front));
  const stout = 0.5 + 0.5 * body.chest;
  mesh.tube(
    [0, 0.35, 0.7, 1, 1.3].map((s): Ring => ({
      at: along(mix(base.at, skull, s), neckFront, 0.004 * h * s),
      u: neckFront,
      v: skeleton.right,
      front: h * (0.034 - 0.004 * s) * stout,
      back: h * (0.037 - 0.003 * s) * stout,
      side: h * (0.037 - 0.0055 * Math.min(1, s)) * stout,
      material: wear.skin,
    })),
    PART.head,
    18,
  );
}

/** One stretch of a limb's outline: where along both bones (0–1 first, 1–2 second), radius, shift to the front. */
type Girth = readonly [number, number, number];

const LEG: Girth[] = [
  [0, 0.05, 0.002], [0.1, 0.0535, 0.003], [0.25, 0.0525, 0.005], [0.4, 0.049, 0.006], [0.55, 0.0445, 0.006], [0.7, 0.0395, 0.005],
  [0.82, 0.036, 0.004], [0.92, 0.0335, 0.003], [1, 0.0325, 0.003], [1.07, 0.0315, 0.0015], [1.15, 0.0315, -0.003], [1.25, 0.0335, -0.007],
  [1.35, 0.034, -0.008], [1.47, 0.0315, -0.007], [1.6, 0.0265, -0.004], [1.74, 0.0218, -0.001], [1.88, 0.019, 0], [2, 0.0195, -0.001],
]; // prettier-ignore

const ARM: Girth[] = [
  [-0.06, 0.024, 0], [0, 0.0315, 0], [0.1, 0.0345, 0.001], [0.22, 0.0335, 0.001], [0.36, 0.0295, 0.002], [0.5, 0.0285, 0.003], [0.65, 0.0272, 0.003],
  [0.8, 0.0245, 0.001], [0.92, 0.023, 0], [1, 0.0228, 0], [1.08, 0.0236, 0], [1.2, 0.0252, 0.001], [1.35, 0.0248, 0.001],
  [1.5, 0.0222, 0], [1.68, 0.0188, 0], [1.85, 0.0162, 0], [2, 0.0155, 0],
]; // prettier-ignore

interface Limb {
  a: V3;
  b: V3;
  c: V3;
  /** The side the middle joint bends towards, square to the whole. */
  pole: V3;
}

/** Rings along two bones whose meeting is rounded, as flesh does. */
function limbRings(
  limb: Limb,
  girths: readonly Girth[],
  size: number,
  paint: (s: number) => Material,
  flat: number,
): Ring[] {
  const first = unit(sub(limb.b, limb.a));
  const second = unit(sub(limb.c, limb.b));
  const across = unit(cross(first, squareTo(limb.pole, first)));
  const round = 0.16;
  return girths.map(([s, radius, shift]): Ring => {
    const t = s - 1;
    let at = t < 0 ? mix(limb.a, limb.b, s) : mix(limb.b, limb.c, t);
    let w = t < 0 ? 0 : 1;
    if (Math.abs(t) < round) {
      const k = (t + round) / (2 * round);
      const from = mix(limb.b, limb.a, round);
      const to = mix(limb.b, limb.c, round);
      const mid = mix(limb.b, mix(from, to, 0.5), 0.25);
      at = mix(mix(from, mid, k), mix(mid, to, k), k);
      w = k;
    }
    const direction = unit(mix(first, second, w), first);
    const front = unit(cross(across, direction));
    const r = radius * size;
    return {
      at: along(at, front, shift * size),
      u: front,
      v: cross(direction, front),
      front: r,
      back: r,
      side: r * flat,
      material: paint(s),
    };
  });
}

function shellOf(
  rings: readonly Ring[],
  girths: readonly Girth[],
  to: number,
  gap: (s: number) => number,
  m: Material,
  dark: Material,
): Ring[] {
  const kept = rings.filter((_, i) => (girths[i]?.[0] ?? 9) < to);
  const next = rings[kept.length];
  const lastKept = kept[kept.length - 1];
  if (!next || !lastKept) return [];
  const s0 = girths[kept.length - 1]?.[0] ?? 0;
  const s1 = girths[kept.length]?.[0] ?? 1;
  const k = (to - s0) / (s1 - s0);
  const end: Ring = {
    ...lastKept,
    at: mix(lastKept.at, next.at, k),
    front: lastKept.front + (next.front - lastKept.front) * k,
    back: lastKept.back + (next.back - lastKept.back) * k,
    side: lastKept.side + (next.side - lastKept.side) * k,
  };
  const grown = [...kept, end].map((ring, i): Ring => {
    const g = gap(i < kept.length ? (girths[i]?.[0] ?? 0) : to);
    return { ...ring, front: ring.front + g, back: ring.back + g, side: ring.side + g, material: m };
  });
  const hem = grown[grown.length - 1] as Ring;
  const inner = gap(to) * 0.9;
  return [
    ...grown,
    hem,
    {
      ...hem,
      front: hem.front - inner,
      back: hem.back - inner,
      side: hem.side - inner,
      at: mix(hem.at, lastKept.at, 0.1),
      material: dark,
    },
  ];
}

function drawLeg(mesh: Mesh, body: Body, skeleton: Skeleton, side: Side, look: Look, wear: Wardrobe): void {
  const n = side === 'left' ? 'Left' : 'Right';
  const j = skeleton.joints;
  const h = body.heightM;
  const size = h * body.limbs;
  const limb: Limb = { a: j[`hip${n}`], b: j[`knee${n}`], c: j[`ankle${n}`], pole: skeleton.kneePole[side] };
  const leggings = look.legwear === 'leggings';
  const rings = limbRings(
    limb,
    LEG,
    size,
    (s) => (leggings && s < 1.85 ? wear.legs : s > 1.8 ? wear.sock : wear.skin),
    0.94,
  );
  mesh.tube(rings, PART[`thigh${n}`], 20);
  const hip = j[`hip${n}`];
  const { pelvisFront, pelvisUp } = skeleton.torso;
  // The seat fills the back of the hip whatever the thigh does.
  const seat = along(
    along(along(hip, pelvisFront, -0.017 * h), pelvisUp, -0.02 * h),
    skeleton.right,
    -0.006 * h * sign(side),
  );
  const fat = h * (0.5 * body.hips + 0.5 * body.limbs);
  mesh.ellipsoid(
    seat,
    [pelvisFront, pelvisUp, skeleton.right],
    [0.053 * fat, 0.06 * fat, 0.049 * fat],
    wear.legs,
    PART.pelvis,
    8,
    14,
  );
  if (leggings) return;
  const shell = shellOf(
    rings,
    LEG,
    0.66,
    (s) => (0.004 + 0.009 * Math.max(0, s)) * h,
    wear.legs,
    wear.legsDark,
  );
  mesh.tube(shell, PART[`thigh${n}`], 22, (r, angle) => {
    const outward = side === 'right' ? angle : 2 * Math.PI - angle;
    const seam = Math.abs(outward - Math.PI / 2) < 0.3 && r < shell.length - 1;
    const loose = Math.min(1, r / shell.length);
    return {
      out: h * 0.0022 * loose * Math.sin(angle * 4 + (side === 'right' ? 1 : 3)),
      material: seam ? wear.stripe : undefined,
    };
  });
}

function drawFoot(mesh: Mesh, body: Body, skeleton: Skeleton, side: Side, wear: Wardrobe): void {
  const foot = skeleton.feet[side];
  const part = side === 'left' ? PART.footLeft : PART.footRight;
  const h = body.heightM;
  const wide = 0.5 + 0.5 * body.limbs;
  const toeForward = unit(sub(foot.toe, foot.ball));
  const across = unit(cross(foot.forward, foot.up));
  const heelToBall = distance(foot.heel, foot.ball);
  const ballToToe = distance(foot.ball, foot.toe);
  const whole = heelToBall + ballToToe;
  /** q along the sole (0 heel, 1 toe), half width, height, then the sole's middle line to the inside. */
  const rows: (readonly [number, number, number])[] = [
    [-0.055, 0.006, 0.018], [-0.045, 0.016, 0.034], [0, 0.0225, 0.045], [0.08, 0.0245, 0.05], [0.18, 0.025, 0.053], [0.28, 0.0248, 0.052],
    [0.36, 0.0255, 0.047], [0.48, 0.0275, 0.0395], [0.6, 0.03, 0.033], [0.72, 0.031, 0.0275], [0.84, 0.029, 0.0225], [0.94, 0.0235, 0.0185],
    [1, 0.015, 0.014], [1.02, 0.006, 0.0095],
  ]; // prettier-ignore
  const at = (q: number): { p: V3; up: V3; forward: V3 } => {
    const d = q * whole;
    const bendAt = heelToBall;
    if (d <= bendAt) return { p: along(foot.heel, foot.forward, d), up: foot.up, forward: foot.forward };
    return { p: along(foot.ball, toeForward, d - bendAt), up: foot.toeUp, forward: toeForward };
  };
  const ring = (q: number, half: number, top: number, bottom: number, m: Material, square: number): Ring => {
    const { p, up } = at(q);
    const base = 0.5 * (top + bottom);
    return {
      at: along(p, up, base * h),
      u: up,
      v: across,
      front: (top - base) * h,
      back: (base - bottom) * h,
      side: half * h * wide,
      material: m,
      square,
    };
  };
  mesh.tube(
    rows.map(([q, half, top]) => ring(q, half, top, 0.004, wear.shoe, 2.5)),
    part,
    16,
  );
  mesh.tube(
    rows.map(([q, half]) => ring(q * 1.012 - 0.004, half + 0.0016, 0.0125, 0, wear.sole, 5)),
    part,
    16,
  );
}

function drawHand(
  mesh: Mesh,
  body: Body,
  skeleton: Skeleton,
  side: Side,
  gripping: boolean,
  wear: Wardrobe,
): void {
  const n = side === 'left' ? 'Left' : 'Right';
  const h = body.heightM;
  const size = h * (0.6 + 0.4 * body.limbs);
  const { direction: d, palm } = skeleton.hand[side];
  const inward = squareTo(palm, d, skeleton.right);
  const across = cross(d, inward);
  const part = PART[`forearm${n}`];
  const wrist = skeleton.joints[`wrist${n}`];
  const place = (forward: number, towardsPalm: number): V3 =>
    along(along(wrist, d, forward * size), inward, towardsPalm * size);
  const slab = (at: V3, u: V3, thick: number, wide: number): Ring => ({
    at,
    u,
    v: across,
    front: thick * size,
    back: thick * size,
    side: wide * size,
    material: wear.skin,
    square: 2.6,
  });
  const back = gripping ? -0.007 : 0;
  mesh.tube(
    [
      slab(place(-0.008, 0), inward, 0.0125, 0.0155),
      slab(place(0.006, back * 0.3), inward, 0.0125, 0.0175),
      slab(place(0.026, back), inward, 0.0135, 0.0235),
      slab(place(0.046, back), inward, 0.0128, 0.0248),
      slab(place(0.057, back), inward, 0.009, 0.021),
    ],
    part,
    14,
  );
  const thumbSide = sign(side);
  if (gripping) {
    mesh.tube(
      [
        slab(place(0.05, back), inward, 0.0105, 0.0225),
        slab(place(0.064, back + 0.006), unit(add(inward, d)), 0.0105, 0.024),
        slab(place(0.068, 0.016), d, 0.0105, 0.0242),
        slab(place(0.06, 0.026), unit(sub(d, inward)), 0.0105, 0.0235),
        slab(place(0.046, 0.026), scale(inward, -1), 0.0095, 0.0215),
        slab(place(0.04, 0.022), scale(d, -1), 0.006, 0.017),
      ],
      part,
      14,
    );
  } else {
    mesh.tube(
      [
        slab(place(0.05, 0), inward, 0.0105, 0.0235),
        slab(place(0.07, 0.003), inward, 0.009, 0.0225),
        slab(place(0.09, 0.008), inward, 0.0078, 0.019),
        slab(place(0.104, 0.012), inward, 0.0045, 0.012),
      ],
      part,
      14,
    );
  }
  const thumb = along(place(0.02, 0.004), across, -0.021 * size * thumbSide);
  const tip = along(
    place(gripping ? 0.05 : 0.055, gripping ? 0.024 : 0.012),
    across,
    -(gripping ? 0.014 : 0.031) * size * thumbSide,
  );
  const knuckle = along(mix(thumb, tip, 0.5), across, -0.006 * size * thumbSide);
  const bead = (at: V3, r: number): Ring => ({
    at,
    u: inward,
    v: across,
    front: r * size,
    back: r * size,
    side: r * size,
    material: wear.skin,
  });
  mesh.tube(
    [
      bead(thumb, 0.004),
      bead(mix(thumb, knuckle, 0.3), 0.0085),
      bead(knuckle, 0.0082),
      bead(tip, 0.007),
      bead(along(tip, d, 0.005 * size), 0.003),
    ],
    part,
    10,
  );
}

function drawArm(mesh: Mesh, body: Body, skeleton: Skeleton, side: Side, wear: Wardrobe): void {
  const n = side === 'left' ? 'Left' : 'Right';
  const j = skeleton.joints;
  const h = body.heightM;
  const size = h * body.limbs;
  const shoulder = j[`shoulder${n}`];
  const limb: Limb = {
    a: shoulder,
    b: j[`elbow${n}`],
    c: j[`wrist${n}`],
    pole: scale(skeleton.elbowPole[side], -1),
  };
  const rings = limbRings(limb, ARM, size, () => wear.skin, 0.97);
  mesh.tube(rings, PART[`upperArm${n}`], 18);
  const sleeve = shellOf(
    rings,
    ARM,
    0.5,
    (s) => (0.0035 + 0.008 * Math.max(0, s)) * h,
    wear.shirt,
    wear.shirtDark,
  );
  mesh.tube(sleeve, PART[`upperArm${n}`], 20);
  const { chestUp, chestFront } = skeleton.torso;
  mesh.ellipsoid(
    shoulder,
    [chestFront, chestUp, skeleton.right],
    [0.0355 * size, 0.0315 * size, 0.034 * size],
    wear.shirt,
    PART.torso,
    8,
    14,
  );
  // The slope from the neck to the shoulder.
  const neck = along(trunkAt(skeleton, body.trunk, 1.03).at, skeleton.right, sign(side) * 0.02 * h);
  const away = unit(sub(shoulder, neck));
  const up = squareTo(chestUp, away, chestUp);
  mesh.tube(
    [-0.1, 0, 0.35, 0.7, 1, 1.12].map((s): Ring => ({
      at: along(mix(neck, shoulder, s), up, -0.012 * h * Math.sin(Math.PI * Math.max(0, Math.min(1, s)))),
      u: up,
      v: cross(away, up),
      front: h * (s < 0 || s > 1.1 ? 0.02 : 0.033 - 0.002 * s),
      back: h * 0.034,
      side: h * (s < 0 || s > 1.1 ? 0.03 : 0.042 - 0.006 * s),
      material: wear.shirt,
    })),
    PART.torso,
    16,
  );
}

/** Adds the figure's triangles to the mesh. `gripping` says which hands hold something. */
export function drawFigure(
  mesh: Mesh,
  body: Body,
  skeleton: Skeleton,
  look: Look,
  wear: Wardrobe,
  gripping: Record<Side, boolean>,
): void {
  drawTrunk(mesh, body, skeleton, wear);
  for (const side of SIDES) {
    drawLeg(mesh, body, skeleton, side, look, wear);
    drawFoot(mesh, body, skeleton, side, wear);
    drawArm(mesh, body, skeleton, side, wear);
    drawHand(mesh, body, skeleton, side, gripping[side], wear);
  }
  drawHead(mesh, body, skeleton, look, wear);
}
