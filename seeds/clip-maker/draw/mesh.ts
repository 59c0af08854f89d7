import { type V3, add, along, cross, dot, sub, unit } from '../vec';

/** Colour of a surface in linear light, 0 to 1 each, and how it takes light. */
export interface Material {
  rgb: V3;
  /** Strength of the highlight, 0 to 1. */
  gloss: number;
  /** How far light bleeds past the edge of shadow, as in skin, 0 to 1. */
  soft: number;
}

/** From a CSS hex colour. */
export function material(hex: string, gloss = 0, soft = 0): Material {
  const n = Number.parseInt(hex.slice(1), 16);
  const linear = (byte: number): number => ((byte & 255) / 255) ** 2;
  return { rgb: [linear(n >> 16), linear(n >> 8), linear(n)], gloss, soft };
}

export const tinted = (m: Material, by: number): Material => ({
  ...m,
  rgb: [m.rgb[0] * by, m.rgb[1] * by, m.rgb[2] * by],
});

/** A cross-section: from its middle `front` and `back` along u, `side` along v. */
export interface Ring {
  at: V3;
  u: V3;
  v: V3;
  front: number;
  back: number;
  side: number;
  material: Material;
  /** 2 is an ellipse; more is boxier. */
  square?: number;
}

const MAX_VERTICES = 24_000;

/** Triangles with a normal, a material and a body part at every vertex; emptied and filled again for each frame. */
export class Mesh {
  readonly position = new Float32Array(MAX_VERTICES * 3);
  readonly normal = new Float32Array(MAX_VERTICES * 3);
  readonly surface = new Float32Array(MAX_VERTICES * 5);
  readonly part = new Uint8Array(MAX_VERTICES);
  readonly triangle = new Uint32Array(MAX_VERTICES * 6);
  vertices = 0;
  triangles = 0;

  clear(): void {
    this.vertices = 0;
    this.triangles = 0;
  }

  private vertex(p: V3, n: V3, m: Material, part: number): number {
    const i = this.vertices++;
    if (i >= MAX_VERTICES) throw new RangeError('The figure has more vertices than the mesh holds');
    this.position.set(p, i * 3);
    this.normal.set(n, i * 3);
    this.surface[i * 5] = m.rgb[0];
    this.surface[i * 5 + 1] = m.rgb[1];
    this.surface[i * 5 + 2] = m.rgb[2];
    this.surface[i * 5 + 3] = m.gloss;
    this.surface[i * 5 + 4] = m.soft;
    this.part[i] = part;
    return i;
  }

  private face(a: number, b: number, c: number): void {
    const t = this.triangles++ * 3;
    this.triangle[t] = a;
    this.triangle[t + 1] = b;
    this.triangle[t + 2] = c;
  }

  /**
   * A closed tube through the rings. Two equal rings in a row make a sharp edge. `shape` may move a point outward and
   * change its material: it gets ring, angle (0 at u, turning to v) and returns metres and a material.
   */
  tube(
    rings: readonly Ring[],
    part: number,
    around = 16,
    shape?: (ring: number, angle: number) => { out: number; material?: Material },
  ): void {
    const rows = rings.length;
    const points: V3[] = [];
    const materials: Material[] = [];
    rings.forEach((ring, r) => {
      const power = 2 / (ring.square ?? 2);
      for (let k = 0; k < around; k++) {
        const angle = (2 * Math.PI * k) / around;
        const c = Math.cos(angle);
        const s = Math.sin(angle);
        const cu = power === 1 ? c : Math.sign(c) * Math.abs(c) ** power;
        const sv = power === 1 ? s : Math.sign(s) * Math.abs(s) ** power;
        const shaped = shape?.(r, angle);
        const out = shaped?.out ?? 0;
        const along1 = along(ring.at, ring.u, cu * ((c > 0 ? ring.front : ring.back) + out));
        points.push(along(along1, ring.v, sv * (ring.side + out)));
        materials.push(shaped?.material ?? ring.material);
      }
    });
    const at = (r: number, k: number): V3 => points[r * around + ((k + around) % around)] as V3;
    const first = this.vertices;
    const raw: V3[] = [];
    // All faces of a tube turn the same way; the sum says whether that is outward.
    let outwardness = 0;
    for (let r = 0; r < rows; r++) {
      const ring = rings[r] as Ring;
      for (let k = 0; k < around; k++) {
        const turning = sub(at(r, k + 1), at(r, k - 1));
        const rising = sub(at(Math.min(rows - 1, r + 1), k), at(Math.max(0, r - 1), k));
        const n = cross(turning, rising);
        outwardness += dot(n, sub(at(r, k), ring.at));
        raw.push(n);
      }
    }
    const way = outwardness < 0 ? -1 : 1;
    for (let r = 0; r < rows; r++) {
      const ring = rings[r] as Ring;
      const before = rings[Math.max(0, r - 1)] as Ring;
      const after = rings[Math.min(rows - 1, r + 1)] as Ring;
      const axis = unit(sub(after.at, before.at), cross(ring.u, ring.v));
      const near = r === 0 ? after : before;
      const pointed =
        (r === 0 || r === rows - 1) &&
        Math.max(ring.front, ring.side) < 0.3 * Math.max(near.front, near.side);
      for (let k = 0; k < around; k++) {
        const n = raw[r * around + k] as V3;
        const end: V3 = r < rows / 2 ? [-axis[0], -axis[1], -axis[2]] : axis;
        const normal = pointed ? end : unit([n[0] * way, n[1] * way, n[2] * way], end);
        this.vertex(at(r, k), normal, materials[r * around + k] ?? ring.material, part);
      }
    }
    for (let r = 0; r + 1 < rows; r++) {
      for (let k = 0; k < around; k++) {
        const a = first + r * around + k;
        const b = first + r * around + ((k + 1) % around);
        this.face(a, b, a + around);
        this.face(b, b + around, a + around);
      }
    }
  }

  /** An ellipsoid with its own axes; radii in metres. */
  ellipsoid(
    at: V3,
    axes: readonly [V3, V3, V3],
    radii: V3,
    m: Material,
    part: number,
    rows = 8,
    around = 12,
  ): void {
    const rings: Ring[] = [];
    for (let r = 0; r <= rows; r++) {
      const a = (Math.PI * r) / rows - Math.PI / 2;
      const w = Math.max(0.02, Math.cos(a));
      rings.push({
        at: along(at, axes[1], Math.sin(a) * radii[1]),
        u: axes[0],
        v: axes[2],
        front: radii[0] * w,
        back: radii[0] * w,
        side: radii[2] * w,
        material: m,
      });
    }
    this.tube(rings, part, around);
  }

  /** A flat-sided block: middle, three axes, half sizes. */
  block(at: V3, axes: readonly [V3, V3, V3], half: V3, m: Material, part: number): void {
    for (let axis = 0; axis < 3; axis++) {
      const n = axes[axis] as V3;
      const u = axes[(axis + 1) % 3] as V3;
      const v = axes[(axis + 2) % 3] as V3;
      const hn = half[axis] as number;
      const hu = half[(axis + 1) % 3] as number;
      const hv = half[(axis + 2) % 3] as number;
      for (const way of [-1, 1]) {
        const middle = along(at, n, hn * way);
        const facing: V3 = [n[0] * way, n[1] * way, n[2] * way];
        const steps = 6;
        const first = this.vertices;
        for (let i = 0; i <= steps; i++) {
          for (let k = 0; k <= steps; k++) {
            const p = add(
              middle,
              along(
                [
                  u[0] * hu * ((2 * i) / steps - 1),
                  u[1] * hu * ((2 * i) / steps - 1),
                  u[2] * hu * ((2 * i) / steps - 1),
                ],
                v,
                hv * ((2 * k) / steps - 1),
              ),
            );
            this.vertex(p, facing, m, part);
          }
        }
        for (let i = 0; i < steps; i++) {
          for (let k = 0; k < steps; k++) {
            const a = first + i * (steps + 1) + k;
            this.face(a, a + 1, a + steps + 1);
            this.face(a + 1, a + steps + 2, a + steps + 1);
          }
        }
      }
    }
  }
}
