import { type Camera, STILL, type Shake } from '../camera';
import type { LiftId } from '../lift-ids';
import type { Scene } from '../options';
import { seeded } from '../random';
import { type V3, add, along, scale } from '../vec';
import { drawBox, drawChair, drawStandingBell } from './gear';
import { Blockers, type Light, lightMesh, openness } from './light';
import { Mesh, material } from './mesh';
import { PART } from './parts';
import { Raster } from './raster';

/** A place where a line of sight ends. */
export interface Hit {
  at: V3;
  normal: V3;
  surface: 'floor' | 'wall';
  /** Along the wall, metres. */
  s: number;
}

/** Walls by their distance from the figure along each axis, metres. */
const WALLS = [
  { axis: 0, at: -2.15, inward: 1 },
  { axis: 0, at: 2.35, inward: -1 },
  { axis: 2, at: -1.95, inward: 1 },
] as const;

interface Paint {
  wall: string;
  band: string;
  /** Height of the painted band, metres. */
  bandTop: number;
  floor: string;
  skirting: string;
  tape: string;
  brick: boolean;
  planks: boolean;
}

const PAINT: Record<Scene, Paint> = {
  slipway: { wall: '#d9d3c4', band: '#a9b3a8', bandTop: 1.12, floor: '#565c5c', skirting: '#7f877f', tape: '#d98a2e', brick: false, planks: false },
  garage: { wall: '#c9cac6', band: '#c9cac6', bandTop: 0, floor: '#77756f', skirting: '#8d8c86', tape: '#d3b13f', brick: true, planks: false },
  loft: { wall: '#dcd5c8', band: '#bb9a70', bandTop: 1.05, floor: '#4c5356', skirting: '#8e7350', tape: '#d9622e', brick: false, planks: true },
}; // prettier-ignore

/** Where the line of sight through a pixel ends, given the hand's shake; the far distance when it leaves the room. */
export function hitAt(camera: Camera, x: number, y: number, shake: Shake = STILL): Hit {
  const c = Math.cos(-shake.roll);
  const s = Math.sin(-shake.roll);
  const px = x - shake.dx - camera.width / 2;
  const py = y - shake.dy - camera.height / 2;
  const ux = camera.width / 2 + px * c - py * s;
  const uy = camera.height / 2 + px * s + py * c;
  const ray = add(
    camera.ahead,
    add(
      scale(camera.right, (ux - camera.centreX) / camera.focalPx),
      scale(camera.up, (camera.centreY - uy) / camera.focalPx),
    ),
  );
  let best = ray[1] < 0 ? -camera.eye[1] / ray[1] : 50;
  let wall: (typeof WALLS)[number] | undefined;
  for (const candidate of WALLS) {
    const speed = ray[candidate.axis];
    if (speed * candidate.inward >= 0) continue;
    const t = (candidate.at - camera.eye[candidate.axis]) / speed;
    if (t > 0 && t < best) {
      best = t;
      wall = candidate;
    }
  }
  const at = along(camera.eye, ray, best);
  if (!wall) return { at, normal: [0, 1, 0], surface: 'floor', s: 0 };
  const normal: V3 = wall.axis === 0 ? [wall.inward, 0, 0] : [0, 0, wall.inward];
  return { at, normal, surface: 'wall', s: wall.axis === 0 ? at[2] * -wall.inward : at[0] * wall.inward };
}

const smooth = (x: number): number => {
  const c = Math.max(0, Math.min(1, x));
  return c * c * (3 - 2 * c);
};
/** 1 between a and b, 0 outside, soft over `edge`. */
const between = (x: number, a: number, b: number, edge: number): number =>
  smooth((x - a) / edge + 0.5) * smooth((b - x) / edge + 0.5);

function lattice(seed: number): (x: number, y: number) => number {
  const next = seeded(seed);
  const table = Float32Array.from({ length: 4096 }, () => next());
  const cell = (i: number, k: number): number => table[(i * 57 + k * 131 + ((i * k) & 7)) & 4095] as number;
  return (x, y) => {
    const i = Math.floor(x);
    const k = Math.floor(y);
    const fx = smooth(x - i);
    const fy = smooth(y - k);
    const a = cell(i, k) * (1 - fx) + cell(i + 1, k) * fx;
    const b = cell(i, k + 1) * (1 - fx) + cell(i + 1, k + 1) * fx;
    return a * (1 - fy) + b * fy;
  };
}

/** Still things in the room, and the balls that stand in for them where they throw shade. */
function props(mesh: Mesh, blockers: Blockers, lift: LiftId): void {
  const block = (at: V3, r: number): void => {
    blockers.add(at, r, PART.prop);
  };
  if (lift === 'split-squat-hold') {
    const at: V3 = [-0.18, 0, -0.86];
    drawChair(mesh, at, [0.96, 0, 0.28]);
    for (const y of [0.05, 0.42, 0.5]) block(add(at, [0, y, 0]), 0.15);
  } else if (lift !== 'hollow-hold' && lift !== 'floor-press') {
    const at: V3 = [-0.78, 0, -1.5];
    drawBox(mesh, at, [0.5, 0.6, 0.4], 0.98, 0.2);
    for (const y of [0.1, 0.3, 0.5]) for (const x of [-0.14, 0.14]) block(add(at, [x, y, 0]), 0.19);
  }
  const stand = (at: V3, kg: number): void => {
    drawStandingBell(mesh, at, kg);
    block(add(at, [0, 0.09, 0]), 0.1);
  };
  stand([-1.78, 0, 0.82], 24);
  stand([-1.84, 0, 0.56], 12);
  stand([0.92, 0, -1.66], 20);
  stand([1.9, 0, 0.78], 16);
}

/** Where the light of the window falls on each wall: the middle along it, metres. */
const PATCH = { middle: 0.62, low: 1.28, high: 2.42, half: 0.44, lean: 0.2 };

function windowLight(s: number, y: number): number {
  const x = s - PATCH.middle - (y - 1.85) * PATCH.lean;
  const whole = between(x, -PATCH.half, PATCH.half, 0.05) * between(y, PATCH.low, PATCH.high, 0.05);
  if (whole <= 0) return 0;
  const bars = 1 - 0.8 * between(x, -0.022, 0.022, 0.035);
  const sash = 1 - 0.8 * between(y, 1.86, 1.905, 0.035);
  return whole * bars * sash;
}

/** The still picture behind the figure: RGBA, `margin` pixels wider on every side so that a hand can shake it. */
export function paintRoom(
  camera: Camera,
  light: Light,
  scene: Scene,
  lift: LiftId,
  seed: number,
  margin: number,
): { rgba: Uint8ClampedArray; width: number; height: number } {
  const paint = PAINT[scene];
  const rgb = (hex: string): V3 => material(hex).rgb;
  const wall = rgb(paint.wall);
  const band = rgb(paint.band);
  const floor = rgb(paint.floor);
  const skirting = rgb(paint.skirting);
  const tape = rgb(paint.tape);
  const noise = lattice(seed * 13 + 7);
  const blockers = new Blockers();
  const mesh = new Mesh();
  props(mesh, blockers, lift);
  const width = camera.width + 2 * margin;
  const height = camera.height + 2 * margin;
  const moved: Camera = {
    ...camera,
    width,
    height,
    centreX: camera.centreX + margin,
    centreY: camera.centreY + margin,
  };
  const rgba = new Uint8ClampedArray(width * height * 4);
  const open = new Float32Array(2);
  const sum = [0, 0, 0];

  const shade = (hit: Hit): void => {
    const [x, y, z] = hit.at;
    let base: V3;
    let lightness: number;
    let sunlit = 0;
    if (hit.surface === 'wall') {
      const inBand = paint.bandTop > 0 ? 1 - smooth((y - paint.bandTop) / 0.008 + 0.5) : 0;
      base = [
        wall[0] + (band[0] - wall[0]) * inBand,
        wall[1] + (band[1] - wall[1]) * inBand,
        wall[2] + (band[2] - wall[2]) * inBand,
      ];
      let texture =
        0.965 + 0.045 * noise(hit.s * 3.1 + 40, y * 3.1 + 9) + 0.025 * noise(hit.s * 23 + 3, y * 23);
      if (paint.brick) {
        const course = Math.floor(y / 0.085);
        const bx = hit.s / 0.25 + (course % 2) * 0.5;
        const fx = (bx - Math.floor(bx)) * 0.25;
        const fy = y - course * 0.085;
        const joint = 1 - between(fx, 0.005, 0.245, 0.009) * between(fy, 0.005, 0.08, 0.009);
        texture *= 1 - 0.085 * joint;
        texture *= 0.975 + 0.05 * noise(Math.floor(bx) * 7.3 + 11, course * 3.7 + 5);
      }
      if (paint.planks && inBand > 0.5) {
        const px = hit.s / 1.22 + 0.31;
        const seam = 1 - between((px - Math.floor(px)) * 1.22, 0.004, 1.216, 0.008);
        const grain = noise(hit.s * 2.2 + 3, y * 46) * 0.5 + noise(hit.s * 7 + 8, y * 130) * 0.5;
        texture *= (1 - 0.35 * seam) * (0.9 + 0.14 * grain);
      }
      const lip = paint.bandTop > 0 ? between(y, paint.bandTop - 0.012, paint.bandTop + 0.006, 0.006) : 0;
      texture *= 1 - (paint.planks ? -0.18 : 0.1) * lip;
      const board = between(y, -1, 0.095, 0.004);
      base = [
        base[0] + (skirting[0] - base[0]) * board,
        base[1] + (skirting[1] - base[1]) * board,
        base[2] + (skirting[2] - base[2]) * board,
      ];
      const corner = 1 - 0.2 * Math.exp(-y / 0.22) * (1 - board);
      const across = 0.5 + 0.5 * Math.tanh((hit.s - PATCH.middle) * 0.55);
      lightness =
        texture *
        corner *
        (0.84 +
          0.1 * Math.min(1, y / 2.4) -
          0.14 * across +
          0.1 * Math.exp(-((hit.s - PATCH.middle) ** 2 + (y - 1.8) ** 2) / 0.9));
      sunlit = windowLight(hit.s, y);
    } else {
      base = floor;
      let texture = 0.93 + 0.1 * noise(x * 2.1 + 20, z * 2.1 + 20);
      const speck = noise(x * 95, z * 95) + noise(x * 170 + 9, z * 170) - 1;
      texture *= 1 + (scene === 'garage' ? 0.07 : 0.15) * speck;
      if (scene !== 'garage') {
        const tx = x + 0.31;
        const tz = z + 0.17;
        const seam =
          1 -
          between(tx - Math.floor(tx), 0.003, 0.997, 0.006) *
            between(tz - Math.floor(tz), 0.003, 0.997, 0.006);
        texture *= 1 - 0.22 * seam;
      }
      const ragged = 0.004 * (noise(x * 60, z * 60) - 0.5);
      const strip = Math.max(
        between(z, 0.66, 0.71, 0.004) * between(x, -0.72 + ragged, 0.72 + ragged, 0.005),
        between(x, 0.78, 0.83, 0.004) * between(z, -0.6 + ragged, 0.6 + ragged, 0.005),
      );
      if (strip > 0) {
        const worn = 0.9 + 0.14 * noise(x * 18, z * 18 + 4);
        base = [
          base[0] + (tape[0] - base[0]) * strip,
          base[1] + (tape[1] - base[1]) * strip,
          base[2] + (tape[2] - base[2]) * strip,
        ];
        texture = texture * (1 - strip) + worn * strip;
      }
      const far = Math.min(x + 2.15, z + 1.95, 2.35 - x);
      const pool = Math.exp(-((x * x + z * z) / 3.4));
      lightness = texture * (0.74 + 0.26 * pool) * (1 - 0.3 * Math.exp(-Math.max(0, far) / 0.25));
    }
    openness(blockers, light, x, y, z, hit.normal[0], hit.normal[1], hit.normal[2], 0, open);
    const shadow = 0.5 * (open[0] as number) + 0.5 * (open[1] as number) * (open[0] as number);
    lightness *= 0.25 + 0.75 * shadow;
    sum[0] = (sum[0] as number) + base[0] * (lightness + sunlit * 0.42);
    sum[1] = (sum[1] as number) + base[1] * (lightness * 0.995 + sunlit * 0.37);
    sum[2] = (sum[2] as number) + base[2] * (lightness * 0.97 + sunlit * 0.25);
  };

  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      sum[0] = sum[1] = sum[2] = 0;
      const middle = hitAt(moved, x + 0.5, y + 0.5);
      const fine = middle.surface === 'floor' || paint.brick;
      if (fine) {
        for (const dy of [0.25, 0.75]) for (const dx of [0.25, 0.75]) shade(hitAt(moved, x + dx, y + dy));
      } else shade(middle);
      const share = fine ? 0.25 : 1;
      const vx = (x - width / 2) / width;
      const vy = (y - height / 2) / height;
      const vignette = 1 - 0.3 * (vx * vx + vy * vy);
      const o = (y * width + x) * 4;
      for (let c = 0; c < 3; c++) {
        const v = (sum[c] as number) * share * vignette;
        rgba[o + c] = 255 * Math.sqrt(v < 0.75 ? v : 0.75 + 0.25 * (1 - Math.exp(-(v - 0.75) / 0.25)));
      }
      rgba[o + 3] = 255;
    }
  }
  const lit = new Float32Array(mesh.vertices * 3);
  lightMesh(mesh, light, new Blockers(), moved, lit);
  new Raster(width, height).draw(mesh, lit, moved, rgba);
  return { rgba, width, height };
}
