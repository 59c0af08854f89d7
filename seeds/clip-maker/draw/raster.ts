import { type Camera, type Shake, STILL, project } from '../camera';
import type { Mesh } from './mesh';

/** Samples a pixel on each side: 2 × 2 to the pixel. */
const FINE = 2;

/** Pixels a drawing has touched: x0 and y0 included, x1 and y1 not. */
export interface Box {
  x0: number;
  y0: number;
  x1: number;
  y1: number;
}

/** Draws lit triangles with a depth buffer at twice the picture's resolution and lays them over a picture. */
export class Raster {
  private readonly depth: Float32Array;
  private readonly colour: Uint32Array;
  private readonly fineWidth: number;
  private screen = new Float32Array(0);

  constructor(
    private readonly width: number,
    private readonly height: number,
  ) {
    this.fineWidth = width * FINE;
    this.depth = new Float32Array(width * height * FINE * FINE);
    this.colour = new Uint32Array(width * height * FINE * FINE);
  }

  /** Draws the mesh with its lit colours (three bytes' worth a vertex) over the RGBA picture. */
  draw(
    mesh: Mesh,
    lit: Float32Array,
    camera: Camera,
    picture: Uint8ClampedArray,
    shake: Shake = STILL,
  ): void {
    const n = mesh.vertices;
    if (this.screen.length < n * 3) this.screen = new Float32Array(n * 3);
    const screen = this.screen;
    const p = mesh.position;
    let x0 = Infinity;
    let y0 = Infinity;
    let x1 = -Infinity;
    let y1 = -Infinity;
    for (let i = 0; i < n; i++) {
      const seen = project(
        camera,
        [p[i * 3] as number, p[i * 3 + 1] as number, p[i * 3 + 2] as number],
        shake,
      );
      screen[i * 3] = seen.x * FINE;
      screen[i * 3 + 1] = seen.y * FINE;
      screen[i * 3 + 2] = 1 / seen.depthM;
      if (seen.x < x0) x0 = seen.x;
      if (seen.x > x1) x1 = seen.x;
      if (seen.y < y0) y0 = seen.y;
      if (seen.y > y1) y1 = seen.y;
    }
    const box: Box = {
      x0: Math.max(0, Math.floor(x0)),
      y0: Math.max(0, Math.floor(y0)),
      x1: Math.min(this.width, Math.ceil(x1) + 1),
      y1: Math.min(this.height, Math.ceil(y1) + 1),
    };
    if (box.x1 <= box.x0 || box.y1 <= box.y0) return;
    for (let y = box.y0 * FINE; y < box.y1 * FINE; y++) {
      const row = y * this.fineWidth;
      this.depth.fill(0, row + box.x0 * FINE, row + box.x1 * FINE);
      this.colour.fill(0, row + box.x0 * FINE, row + box.x1 * FINE);
    }
    this.fill(mesh, lit, camera, box);
    this.lay(picture, box);
  }

  private fill(mesh: Mesh, lit: Float32Array, camera: Camera, box: Box): void {
    const { triangle, normal, position } = mesh;
    const screen = this.screen;
    const depth = this.depth;
    const colour = this.colour;
    const fineWidth = this.fineWidth;
    const [ex, ey, ez] = camera.eye;
    const minX = box.x0 * FINE;
    const maxX = box.x1 * FINE - 1;
    const minY = box.y0 * FINE;
    const maxY = box.y1 * FINE - 1;
    const away = (i: number): boolean =>
      (normal[i * 3] as number) * ((position[i * 3] as number) - ex) +
        (normal[i * 3 + 1] as number) * ((position[i * 3 + 1] as number) - ey) +
        (normal[i * 3 + 2] as number) * ((position[i * 3 + 2] as number) - ez) >
      0;
    for (let t = 0; t < mesh.triangles; t++) {
      const a = triangle[t * 3] as number;
      const b = triangle[t * 3 + 1] as number;
      const c = triangle[t * 3 + 2] as number;
      if (away(a) && away(b) && away(c)) continue;
      const ax = screen[a * 3] as number;
      const ay = screen[a * 3 + 1] as number;
      const bx = screen[b * 3] as number;
      const by = screen[b * 3 + 1] as number;
      const cx = screen[c * 3] as number;
      const cy = screen[c * 3 + 1] as number;
      const area = (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);
      if (area > -1e-6 && area < 1e-6) continue;
      const left = Math.max(minX, Math.ceil(Math.min(ax, bx, cx) - 0.5));
      const right = Math.min(maxX, Math.floor(Math.max(ax, bx, cx) - 0.5));
      const top = Math.max(minY, Math.ceil(Math.min(ay, by, cy) - 0.5));
      const bottom = Math.min(maxY, Math.floor(Math.max(ay, by, cy) - 0.5));
      if (left > right || top > bottom) continue;
      const k = 1 / area;
      const az = screen[a * 3 + 2] as number;
      const bz = (screen[b * 3 + 2] as number) - az;
      const cz = (screen[c * 3 + 2] as number) - az;
      const ar = lit[a * 3] as number;
      const ag = lit[a * 3 + 1] as number;
      const ab = lit[a * 3 + 2] as number;
      const br = (lit[b * 3] as number) - ar;
      const bg = (lit[b * 3 + 1] as number) - ag;
      const bb = (lit[b * 3 + 2] as number) - ab;
      const cr = (lit[c * 3] as number) - ar;
      const cg = (lit[c * 3 + 1] as number) - ag;
      const cb = (lit[c * 3 + 2] as number) - ab;
      const stepB = (cy - ay) * k;
      const stepC = (ay - by) * k;
      for (let y = top; y <= bottom; y++) {
        const py = y + 0.5 - ay;
        const px = left + 0.5 - ax;
        let wb = (px * (cy - ay) - py * (cx - ax)) * k;
        let wc = (py * (bx - ax) - px * (by - ay)) * k;
        let at = y * fineWidth + left;
        for (let x = left; x <= right; x++, at++, wb += stepB, wc += stepC) {
          if (wb < -1e-5 || wc < -1e-5 || wb + wc > 1.00001) continue;
          const z = az + bz * wb + cz * wc;
          if (z <= (depth[at] as number)) continue;
          depth[at] = z;
          colour[at] =
            0xff000000 |
            ((ab + bb * wb + cb * wc) << 16) |
            ((ag + bg * wb + cg * wc) << 8) |
            (ar + br * wb + cr * wc);
        }
      }
    }
  }

  private lay(picture: Uint8ClampedArray, box: Box): void {
    const { colour, fineWidth, width } = this;
    for (let y = box.y0; y < box.y1; y++) {
      const upper = y * FINE * fineWidth;
      for (let x = box.x0; x < box.x1; x++) {
        const i = upper + x * FINE;
        const a = colour[i] as number;
        const b = colour[i + 1] as number;
        const c = colour[i + fineWidth] as number;
        const d = colour[i + fineWidth + 1] as number;
        const covered = (a >>> 31) + (b >>> 31) + (c >>> 31) + (d >>> 31);
        if (covered === 0) continue;
        const o = (y * width + x) * 4;
        const rest = 4 - covered;
        picture[o] = ((a & 255) + (b & 255) + (c & 255) + (d & 255) + rest * (picture[o] as number)) / 4;
        picture[o + 1] =
          (((a >> 8) & 255) +
            ((b >> 8) & 255) +
            ((c >> 8) & 255) +
            ((d >> 8) & 255) +
            rest * (picture[o + 1] as number)) /
          4;
        picture[o + 2] =
          (((a >> 16) & 255) +
            ((b >> 16) & 255) +
            ((c >> 16) & 255) +
            ((d >> 16) & 255) +
            rest * (picture[o + 2] as number)) /
          4;
      }
    }
  }
}
