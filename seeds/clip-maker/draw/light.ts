import { SIDES, type Skeleton } from '../skeleton';
import { type Body } from '../anthropometry';
import type { Camera } from '../camera';
import { type Implement, bellRadius, plateRadius } from '../implements';
import { type V3, along, mix, unit } from '../vec';
import type { Mesh } from './mesh';
import { NEIGHBOURS, PART } from './parts';

/** Light of the room: the window's direction and colour, and what comes from everywhere. Linear light. */
export interface Light {
  towards: V3;
  key: V3;
  sky: V3;
  bounce: V3;
}

/** The window stands behind the camera's left shoulder, whichever way the camera looks, so that the figure is modelled. */
export function lightFor(camera: Camera): Light {
  const { right, ahead } = camera;
  return {
    towards: unit([-0.62 * right[0] - 0.5 * ahead[0], 0.78, -0.62 * right[2] - 0.5 * ahead[2]]),
    key: [0.92, 0.87, 0.78],
    sky: [0.4, 0.43, 0.47],
    bounce: [0.2, 0.18, 0.165],
  };
}

/** Balls that stand in for the body where it throws shade. */
export class Blockers {
  readonly data = new Float32Array(128 * 4);
  readonly part = new Uint8Array(128);
  count = 0;

  clear(): void {
    this.count = 0;
  }

  add(at: V3, radius: number, part: number): void {
    const i = this.count++;
    if (i >= 128) throw new RangeError('Too many blockers');
    this.data.set([at[0], at[1], at[2], radius], i * 4);
    this.part[i] = part;
  }

  row(from: V3, to: V3, shares: readonly number[], radii: readonly number[], part: number): void {
    shares.forEach((share, i) => {
      this.add(mix(from, to, share), radii[i] ?? radii[0] ?? 0.05, part);
    });
  }
}

/** Fills the blockers from a figure and what it holds. */
export function blockersOf(
  blockers: Blockers,
  body: Body,
  skeleton: Skeleton,
  held: readonly Implement[],
  loadKg: number,
): void {
  const h = body.heightM;
  const j = skeleton.joints;
  const g = body.limbs;
  const spine = (i: number): V3 => (skeleton.spine[i] ?? { at: j.midHip }).at;
  blockers.add(j.head, 0.055 * h, PART.head);
  blockers.add(j.neck, 0.032 * h, PART.head);
  for (const i of [10, 8, 6, 4]) {
    for (const way of [-1, 1]) {
      const wide = (i > 7 ? 0.05 : 0.034) * h * body.chest;
      blockers.add(along(spine(i), skeleton.right, wide * way), 0.056 * h * body.waist, PART.torso);
    }
  }
  for (const way of [-1, 1])
    blockers.add(along(spine(0), skeleton.right, 0.045 * h * way), 0.062 * h * body.hips, PART.pelvis);
  for (const side of SIDES) {
    const n = side === 'left' ? 'Left' : 'Right';
    const row = (from: V3, to: V3, shares: number[], radii: number[], part: number): void => {
      blockers.row(
        from,
        to,
        shares,
        radii.map((r) => r * h * g),
        part,
      );
    };
    row(j[`shoulder${n}`], j[`elbow${n}`], [0.35, 0.65, 0.95], [0.03, 0.027, 0.023], PART[`upperArm${n}`]);
    row(j[`elbow${n}`], j[`wrist${n}`], [0.25, 0.6, 0.95], [0.024, 0.021, 0.017], PART[`forearm${n}`]);
    blockers.add(j[`hand${n}`], 0.024 * h, PART[`forearm${n}`]);
    row(j[`hip${n}`], j[`knee${n}`], [0.3, 0.5, 0.72, 0.95], [0.05, 0.046, 0.04, 0.034], PART[`thigh${n}`]);
    row(
      j[`knee${n}`],
      j[`ankle${n}`],
      [0.2, 0.42, 0.68, 0.95],
      [0.032, 0.031, 0.024, 0.02],
      PART[`shank${n}`],
    );
    row(
      j[`heel${n}`],
      j[`toe${n}`],
      [0.12, 0.4, 0.68, 0.9],
      [0.026 / g, 0.026 / g, 0.024 / g, 0.018 / g],
      PART[`foot${n}`],
    );
  }
  for (const item of held) {
    if (item.kind === 'kettlebell') blockers.add(item.at, bellRadius(loadKg), PART.implement);
    else if (item.kind === 'dumbbell') {
      for (const way of [-1, 1]) blockers.add(along(item.at, item.axis, 0.1 * way), 0.06, PART.implement);
    } else {
      for (const way of [-1, 1])
        blockers.add(along(item.at, item.axis, 0.585 * way), plateRadius(loadKg) * 0.8, PART.implement);
    }
  }
}

/** How much open sky (0) and window (1) a point has left, 0 to 1 each, written into `out`. */
export function openness(
  blockers: Blockers,
  light: Light,
  x: number,
  y: number,
  z: number,
  nx: number,
  ny: number,
  nz: number,
  skip: number,
  out: Float32Array,
): void {
  const { data, part, count } = blockers;
  const [lx, ly, lz] = light.towards;
  let sky = 1;
  let sun = 1;
  for (let i = 0; i < count; i++) {
    if (skip & (1 << (part[i] as number))) continue;
    const dx = (data[i * 4] as number) - x;
    const dy = (data[i * 4 + 1] as number) - y;
    const dz = (data[i * 4 + 2] as number) - z;
    const r = data[i * 4 + 3] as number;
    const d2 = dx * dx + dy * dy + dz * dz;
    if (d2 < r * r * 90) {
      const d = Math.sqrt(d2);
      const facing = (nx * dx + ny * dy + nz * dz) / d;
      const hidden = ((facing + 0.35) / 1.35) * Math.min(1, (r * r) / d2);
      if (hidden > 0) sky *= 1 - 0.62 * hidden;
    }
    const t = dx * lx + dy * ly + dz * lz;
    if (t > 0) {
      const side = Math.sqrt(Math.max(0, d2 - t * t));
      const blur = 0.018 + 0.09 * t;
      if (side < r + blur) {
        const s = Math.max(0, Math.min(1, (side - r + blur) / (2 * blur)));
        sun *= 1 - Math.min(1, (r * 1.6) / (blur + r)) * (1 - s * s * (3 - 2 * s));
      }
    }
  }
  out[0] = sky;
  out[1] = sun;
}

/** Lights every vertex; writes three bytes' worth of colour a vertex. */
export function lightMesh(
  mesh: Mesh,
  light: Light,
  blockers: Blockers,
  camera: Camera,
  lit: Float32Array,
): void {
  const { position, normal, surface, part } = mesh;
  const open = new Float32Array(2);
  const [lx, ly, lz] = light.towards;
  const [ex, ey, ez] = camera.eye;
  for (let i = 0; i < mesh.vertices; i++) {
    const x = position[i * 3] as number;
    const y = position[i * 3 + 1] as number;
    const z = position[i * 3 + 2] as number;
    const nx = normal[i * 3] as number;
    const ny = normal[i * 3 + 1] as number;
    const nz = normal[i * 3 + 2] as number;
    let vx = ex - x;
    let vy = ey - y;
    let vz = ez - z;
    const vl = 1 / Math.hypot(vx, vy, vz);
    vx *= vl;
    vy *= vl;
    vz *= vl;
    const facing = nx * vx + ny * vy + nz * vz;
    if (facing < -0.25) continue;
    openness(blockers, light, x, y, z, nx, ny, nz, NEIGHBOURS[part[i] as number] ?? 0, open);
    const floor = 1 - 0.55 * Math.max(0, -ny + 0.25) * Math.exp(-Math.max(0, y) / 0.16);
    const sky = (open[0] as number) * floor;
    const sun = open[1] as number;
    const soft = surface[i * 5 + 4] as number;
    const nl = nx * lx + ny * ly + nz * lz;
    const wrap = 0.12;
    const kg = Math.max(0, (nl + wrap) / (1 + wrap)) * sun;
    const wrapRed = wrap + 0.24 * soft;
    const kr = Math.max(0, (nl + wrapRed) / (1 + wrapRed)) * (sun + (1 - sun) * 0.1 * soft);
    const up = 0.5 + 0.5 * ny;
    const rim = (1 - Math.max(0, facing)) ** 3 * 0.2 * sky;
    const gloss = surface[i * 5 + 3] as number;
    let hl = 0;
    if (gloss > 0) {
      const hx = lx + vx;
      const hy = ly + vy;
      const hz = lz + vz;
      const nh = Math.max(0, (nx * hx + ny * hy + nz * hz) / Math.hypot(hx, hy, hz));
      hl = gloss * sun * nh ** 22 * 0.5 + gloss * rim * 0.5;
    }
    for (let c = 0; c < 3; c++) {
      const ambient = ((light.sky[c] as number) * up + (light.bounce[c] as number) * (1 - up)) * sky;
      const key = (light.key[c] as number) * (c === 0 ? kr : kg);
      const value = (surface[i * 5 + c] as number) * (ambient + key + rim) + hl;
      // A shoulder keeps bright cloth from burning out; the square root goes back from light to bytes.
      lit[i * 3 + c] =
        255 *
        Math.sqrt(value < 0.6 ? value : Math.min(0.995, 0.6 + 0.4 * (1 - Math.exp(-(value - 0.6) / 0.4))));
    }
  }
}
