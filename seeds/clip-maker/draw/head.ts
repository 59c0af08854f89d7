import type { Body } from '../anthropometry';
import type { HairStyle, Look } from '../options';
import { SIDES, type Skeleton, sign } from '../skeleton';
import { type V3, add, along, cross, scale, unit } from '../vec';
import { type Material, type Mesh, type Ring, material } from './mesh';
import { PART } from './parts';
import type { Wardrobe } from './wardrobe';

/** Height over the head's middle, half width, depth to the front and to the back; fractions of height. */
const SKULL: (readonly [number, number, number, number])[] = [
  [-0.0665, 0.008, 0.034, -0.012], [-0.0625, 0.0185, 0.0425, 0.001], [-0.055, 0.0265, 0.0465, 0.011], [-0.044, 0.0315, 0.0485, 0.023],
  [-0.031, 0.0355, 0.0495, 0.034], [-0.018, 0.0385, 0.0505, 0.0435], [-0.005, 0.0405, 0.0505, 0.0515], [0.008, 0.0418, 0.0492, 0.0565],
  [0.021, 0.0428, 0.0505, 0.0585], [0.034, 0.0422, 0.0482, 0.0575], [0.045, 0.0388, 0.0425, 0.0525], [0.054, 0.0325, 0.034, 0.044],
  [0.061, 0.0235, 0.0235, 0.032], [0.065, 0.013, 0.012, 0.018], [0.0665, 0.002, 0.002, 0.003],
]; // prettier-ignore

/** How far hair stands off the skull, fractions of height. */
const HAIR: Record<HairStyle, { top: number; side: number }> = {
  short: { top: 0.0115, side: 0.0055 },
  crop: { top: 0.007, side: 0.0035 },
  bun: { top: 0.007, side: 0.006 },
  tail: { top: 0.0075, side: 0.006 },
  shaved: { top: 0.0012, side: 0.001 },
  curls: { top: 0.017, side: 0.0125 },
};

/** Along the tail, and its thickness in fractions of height. */
const TAIL = [
  [0, 0.007],
  [0.12, 0.015],
  [0.35, 0.017],
  [0.6, 0.0155],
  [0.85, 0.01],
  [1, 0.002],
] as const;

const smooth = (x: number): number => {
  const c = Math.max(0, Math.min(1, x));
  return c * c * (3 - 2 * c);
};

/** Height of the hairline around the head: high in front, low behind. `angle` 0 is the front. */
function hairline(angle: number): number {
  const a = Math.abs(Math.atan2(Math.sin(angle), Math.cos(angle)));
  if (a < 0.75) return 0.0395 - 0.004 * (a / 0.75);
  if (a < 1.25) return 0.0355 - 0.033 * smooth((a - 0.75) / 0.5);
  if (a < 1.75) return 0.0025 + 0.006 * Math.sin(Math.PI * ((a - 1.25) / 0.5));
  return 0.0025 - 0.044 * smooth((a - 1.75) / 0.8);
}

/** Adds head, hair and face. */
export function drawHead(mesh: Mesh, body: Body, skeleton: Skeleton, look: Look, wear: Wardrobe): void {
  const h = body.heightM;
  const { centre, up, front } = skeleton.head;
  const right = unit(cross(front, up));
  const part = PART.head;
  const ring = (
    [y, side, f, b]: readonly [number, number, number, number],
    m: Material,
    grow: number,
  ): Ring => ({
    at: along(centre, up, (y + (y > 0.06 ? grow : 0)) * h),
    u: front,
    v: right,
    front: (f + grow) * h,
    back: (b + grow) * h,
    side: (side + grow) * h,
    material: m,
    square: 2.25,
  });
  const place = (f: number, y: number, side = 0): V3 =>
    add(along(along(centre, front, f * h), up, y * h), scale(right, side * h));
  const axes: [V3, V3, V3] = [front, up, right];
  const dab = (at: V3, radii: V3, m: Material, rows = 6, around = 10): void => {
    mesh.ellipsoid(at, axes, [radii[0] * h, radii[1] * h, radii[2] * h], m, part, rows, around);
  };

  mesh.tube(
    SKULL.map((row) => ring(row, wear.skin, 0)),
    part,
    24,
  );

  const style = HAIR[look.hair];
  const hairMaterial = look.hair === 'shaved' ? wear.stubble : wear.hair;
  const around = 32;
  // The cap lies inside the skull below the hairline, so that the line is a clean edge.
  const fine = SKULL.flatMap((row, i) => {
    const next = SKULL[i + 1];
    return next ? [row, row.map((v, k) => (v + (next[k] ?? v)) / 2) as unknown as typeof row] : [row];
  });
  mesh.tube(
    fine.map((row) => ring(row, hairMaterial, 0)),
    part,
    around,
    (r, angle) => {
      const y = fine[r]?.[0] ?? 0;
      const over = smooth((y - hairline(angle)) / 0.008);
      const height = smooth((y - 0.015) / 0.035);
      const full = style.side + (style.top - style.side) * height;
      const bump =
        look.hair === 'curls'
          ? 0.003 * Math.sin(angle * 9 + y * 420) * Math.cos(y * 300 + angle * 4)
          : 0.0006 * Math.sin(angle * 14 + y * 60);
      return { out: h * (-0.006 + over * (0.006 + full + bump)) };
    },
  );
  const crown = style.top * 0.75;
  dab(place(-0.006, 0.056, 0), [0.028 + crown, 0.0105 + crown, 0.027 + crown * 0.6], hairMaterial, 8, 16);
  if (look.hair === 'bun') {
    dab(place(-0.062, 0.038), [0.023, 0.024, 0.025], wear.hair, 8, 14);
  }
  if (look.hair === 'tail') {
    const root = place(-0.06, 0.03);
    // Hair hangs: mostly down, a little along the head.
    const fall = unit(add(scale(up, -0.5), add([0, -0.9, 0], scale(front, -0.35))));
    const out = unit(cross(right, fall));
    mesh.tube(
      TAIL.map(([s, thick]): Ring => ({
        at: along(
          along(root, fall, 0.115 * h * s),
          front,
          -0.018 * h * Math.sin(Math.PI * Math.min(1, s * 1.4)) * 0.8,
        ),
        u: out,
        v: right,
        front: h * thick,
        back: h * thick,
        side: h * thick,
        material: wear.hair,
      })),
      part,
      12,
    );
  }

  const white = material('#e9e4da', 0.2);
  const iris = material('#2c221d', 0.5);
  for (const side of SIDES) {
    const way = sign(side);
    dab(place(-0.004, -0.004, 0.0435 * way), [0.0085, 0.0165, 0.0065], wear.skin, 8, 10);
    dab(place(-0.001, -0.003, 0.0475 * way), [0.004, 0.009, 0.0025], wear.lip, 6, 8);
    dab(place(0.0435, 0.0065, 0.0172 * way), [0.0034, 0.0042, 0.0078], white);
    dab(place(0.0455, 0.0064, 0.0168 * way), [0.0028, 0.0041, 0.0042], iris);
    // Upper lid and brow.
    dab(place(0.0437, 0.0102, 0.0174 * way), [0.0042, 0.0024, 0.0092], wear.lip);
    dab(place(0.0448, 0.0185, 0.0185 * way), [0.0034, 0.0023, 0.0112], wear.hair);
    dab(place(0.0535, -0.0165, 0.0052 * way), [0.0042, 0.0038, 0.0042], wear.skin);
  }
  dab(place(0.0505, -0.004), [0.0075, 0.018, 0.0052], wear.skin, 8, 12);
  dab(place(0.0558, -0.0145), [0.0072, 0.0062, 0.0066], wear.skin, 8, 12);
  dab(place(0.0466, -0.0345), [0.0042, 0.0022, 0.0135], wear.lip);
  dab(place(0.0462, -0.0385), [0.0042, 0.0028, 0.0105], wear.lip);
  if (look.beard) {
    mesh.tube(
      SKULL.slice(0, 9).map((row) => ring(row, wear.hair, 0)),
      part,
      around,
      (r, angle) => {
        const y = SKULL[r]?.[0] ?? 0;
        const a = Math.abs(Math.atan2(Math.sin(angle), Math.cos(angle)));
        const upper = a < 0.34 ? -0.0225 : a < 1.1 ? -0.0225 + 0.012 * smooth((a - 0.5) / 0.6) : 0.004;
        const mouth = a < 0.3 && y > -0.045 && y < -0.03;
        const on = a < 1.55 && !mouth ? smooth((upper - y) / 0.007) : 0;
        return { out: h * (-0.005 + on * 0.0095) };
      },
    );
  }
}
