import { type Implement, bellDrop, bellRadius, plateRadius } from '../implements';
import { UP, type V3, add, along, cross, scale, squareTo, unit } from '../vec';
import { type Material, type Mesh, type Ring, material } from './mesh';
import { PART } from './parts';

const IRON = material('#3a3f42', 0.22);
const STEEL = material('#a7adb0', 0.7);
const RUBBER = material('#2b2f31', 0.12);
const BAND = ['#d9480f', '#0e5a4a', '#c9a23a', '#50606a'].map((hex) => material(hex, 0.1));
const WOOD = material('#c79d68', 0.06);
const WOOD_DARK = material('#8a6640');

const bandOf = (kg: number): Material => BAND[Math.floor(kg / 4) % BAND.length] ?? IRON;

/** A turned shape: pairs of (distance along the axis, radius), metres. */
function lathe(
  mesh: Mesh,
  at: V3,
  axis: V3,
  profile: readonly (readonly [number, number, Material?])[],
  m: Material,
  around = 18,
): void {
  const u = squareTo(Math.abs(axis[1]) > 0.9 ? [1, 0, 0] : UP, axis);
  const v = cross(axis, u);
  mesh.tube(
    profile.map(([d, r, own]): Ring => ({
      at: along(at, axis, d),
      u,
      v,
      front: r,
      back: r,
      side: r,
      material: own ?? m,
    })),
    PART.implement,
    around,
  );
}

function drawKettlebell(mesh: Mesh, item: Implement, kg: number): void {
  const r = bellRadius(kg);
  const rings: [number, number, Material?][] = [];
  for (let i = 0; i <= 14; i++) {
    const a = (Math.PI * i) / 14;
    // A flat foot so that it can stand.
    const d = Math.min(-Math.cos(a) * r, r * 0.9);
    const band = Math.abs(a - 1.2) < 0.16 ? bandOf(kg) : undefined;
    rings.push([d, Math.max(0.001, Math.sin(a) * r), band]);
  }
  rings.push([r * 0.9, 0.001]);
  lathe(mesh, item.at, item.hang, rings, IRON, 22);
  const up = scale(item.hang, -1);
  const across = squareTo(item.axis, up, [0, 0, 1]);
  const top = bellDrop(kg);
  const half = 0.052 + 0.1 * (r - 0.06);
  const path: V3[] = [
    [-half * 1.18, r * 0.62, 0], [-half * 1.26, r * 1.05, 0], [-half * 1.12, top - 0.012, 0], [-half * 0.85, top + 0.006, 0], [-half * 0.4, top + 0.011, 0],
    [half * 0.4, top + 0.011, 0], [half * 0.85, top + 0.006, 0], [half * 1.12, top - 0.012, 0], [half * 1.26, r * 1.05, 0], [half * 1.18, r * 0.62, 0],
  ]; // prettier-ignore
  const points = path.map(([x, y]) => along(along(item.at, across, x), up, y));
  const side = cross(across, up);
  mesh.tube(
    points.map((p, i): Ring => {
      const before = points[Math.max(0, i - 1)] ?? p;
      const after = points[Math.min(points.length - 1, i + 1)] ?? p;
      const way = unit([after[0] - before[0], after[1] - before[1], after[2] - before[2]]);
      return {
        at: p,
        u: cross(side, way),
        v: side,
        front: 0.0165,
        back: 0.0165,
        side: 0.0165,
        material: IRON,
      };
    }),
    PART.implement,
    10,
  );
}

function drawDumbbell(mesh: Mesh, item: Implement, kg: number): void {
  const r = 0.03 + 0.0095 * Math.sqrt(Math.max(2, kg));
  const long = 0.045 + 0.0014 * kg;
  const gap = 0.066;
  lathe(mesh, item.at, item.axis, [[-gap, 0.014], [-gap * 0.5, 0.0155], [0, 0.0165], [gap * 0.5, 0.0155], [gap, 0.014]], STEEL, 12); // prettier-ignore
  for (const way of [-1, 1]) {
    const axis = scale(item.axis, way);
    lathe(
      mesh,
      along(item.at, axis, gap),
      axis,
      [[0, 0.001], [0, r * 0.8], [0, r * 0.8], [0.01, r], [0.01, r], [long - 0.01, r], [long - 0.01, r], [long, r * 0.8], [long, r * 0.8], [long, r * 0.45], [long, r * 0.45, bandOf(kg)], [long + 0.001, 0.001, bandOf(kg)]],
      RUBBER,
      18,
    ); // prettier-ignore
  }
}

function drawBarbell(mesh: Mesh, item: Implement, kg: number): void {
  const r = plateRadius(kg);
  const half = 0.72;
  lathe(mesh, item.at, item.axis, [[-half, 0.001], [-half, 0.024], [-half, 0.024], [-0.56, 0.024], [-0.56, 0.0145], [-0.56, 0.0145], [0.56, 0.0145], [0.56, 0.0145], [0.56, 0.024], [half, 0.024], [half, 0.024], [half, 0.001]], STEEL, 10); // prettier-ignore
  for (const way of [-1, 1]) {
    const axis = scale(item.axis, way);
    const plate = (from: number, thick: number, radius: number, band: Material): void => {
      lathe(
        mesh,
        along(item.at, axis, from),
        axis,
        [[0, 0.03], [0, radius * 0.93], [0, radius * 0.93], [0.008, radius], [0.008, radius], [thick - 0.008, radius], [thick - 0.008, radius], [thick, radius * 0.93], [thick, radius * 0.93], [thick, radius * 0.82], [thick - 0.006, radius * 0.76], [thick - 0.006, radius * 0.45], [thick - 0.006, radius * 0.45, band], [thick, radius * 0.36, band], [thick, 0.026, band]],
        RUBBER,
        28,
      ); // prettier-ignore
    };
    plate(0.565, 0.045, r, bandOf(kg));
    if (kg > 25) plate(0.612, 0.03, r * 0.72, STEEL);
    lathe(mesh, along(item.at, axis, 0.648), axis, [[0, 0.026], [0, 0.036], [0, 0.036], [0.022, 0.036], [0.022, 0.036], [0.022, 0.026]], IRON, 12); // prettier-ignore
  }
}

/** Adds what the figure holds. */
export function drawHeld(mesh: Mesh, held: readonly Implement[], loadKg: number): void {
  const each = held.length > 1 ? loadKg / held.length : loadKg;
  for (const item of held) {
    if (item.kind === 'kettlebell') drawKettlebell(mesh, item, each);
    else if (item.kind === 'dumbbell') drawDumbbell(mesh, item, each);
    else drawBarbell(mesh, item, each);
  }
}

/** A plywood box that stands on the floor, its near corner turned a little. */
export function drawBox(mesh: Mesh, at: V3, size: V3, turnCos: number, turnSin: number): void {
  const u: V3 = [turnCos, 0, turnSin];
  const v: V3 = [-turnSin, 0, turnCos];
  mesh.block(
    add(at, [0, size[1] / 2, 0]),
    [u, UP, v],
    [size[0] / 2, size[1] / 2, size[2] / 2],
    WOOD,
    PART.prop,
  );
  const hole = add(at, [0, size[1] * 0.74, 0]);
  for (const way of [-1, 1]) {
    mesh.ellipsoid(
      along(hole, v, (way * size[2]) / 2),
      [u, UP, v],
      [0.055, 0.018, 0.002],
      WOOD_DARK,
      PART.prop,
    );
    mesh.ellipsoid(
      along(hole, u, (way * size[0]) / 2),
      [v, UP, u],
      [0.055, 0.018, 0.002],
      WOOD_DARK,
      PART.prop,
    );
  }
}

/** A plain chair, its seat facing along u. */
export function drawChair(mesh: Mesh, at: V3, u: V3): void {
  const v = cross(u, UP);
  const axes: [V3, V3, V3] = [u, UP, v];
  const put = (x: number, y: number, z: number): V3 => add(along(along(at, u, x), v, z), [0, y, 0]);
  mesh.block(put(0, 0.45, 0), axes, [0.21, 0.018, 0.205], WOOD, PART.prop);
  for (const x of [-0.18, 0.18]) {
    for (const z of [-0.175, 0.175])
      mesh.block(put(x, 0.22, z), axes, [0.018, 0.22, 0.018], WOOD_DARK, PART.prop);
  }
  for (const z of [-0.175, 0.175])
    mesh.block(put(-0.195, 0.67, z), axes, [0.016, 0.21, 0.018], WOOD_DARK, PART.prop);
  mesh.block(put(-0.2, 0.82, 0), axes, [0.012, 0.055, 0.19], WOOD, PART.prop);
}

/** A kettlebell that stands on the floor. */
export function drawStandingBell(mesh: Mesh, at: V3, kg: number): void {
  const r = bellRadius(kg);
  drawKettlebell(
    mesh,
    { kind: 'kettlebell', at: add(at, [0, r * 0.9, 0]), grip: at, axis: [1, 0, 0.4], hang: [0, -1, 0] },
    kg,
  );
}
