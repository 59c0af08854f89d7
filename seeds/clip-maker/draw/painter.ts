import { type Canvas, createCanvas } from '@napi-rs/canvas';
import { type Camera, type Shake, project } from '../camera';
import { seeded } from '../random';
import { type ClipPlan, type Instant, cameraOf, instantAt, shakeAt, timeOfFrame } from '../set';
import { JOINT_NAMES } from '../skeleton';
import { type V3, add } from '../vec';
import { drawFigure } from './figure';
import { drawHeld } from './gear';
import { Blockers, type Light, blockersOf, lightFor, lightMesh, openness } from './light';
import { drawNumber } from './digits';
import { Mesh } from './mesh';
import { Raster } from './raster';
import { hitAt, paintRoom } from './room';
import { type Wardrobe, wardrobeOf } from './wardrobe';

/** Colours of the joint dots drawn for tests: red and blue by turns down the list of joint names. */
export const DOT_RGB = [
  [255, 0, 60],
  [0, 60, 255],
] as const;
export const DOT_RADIUS_PX = 3;
const NOISE_SIZE = 256;

/** Draws the frames of one clip, each into the same RGBA buffer. */
export class Painter {
  readonly picture: Uint8ClampedArray;
  readonly camera: Camera;
  private readonly light: Light;
  private readonly wear: Wardrobe;
  private readonly mesh = new Mesh();
  private readonly lit = new Float32Array(24_000 * 3);
  private readonly blockers = new Blockers();
  private readonly raster: Raster;
  private readonly room: { rgba: Uint8ClampedArray; width: number; height: number };
  private readonly margin: number;
  private readonly noise: Int8Array;
  private readonly shaken: { canvas: Canvas; still: Canvas } | undefined;

  constructor(private readonly plan: ClipPlan) {
    const { width, height } = plan;
    this.picture = new Uint8ClampedArray(width * height * 4);
    this.camera = cameraOf(plan);
    this.light = lightFor(this.camera);
    this.wear = wardrobeOf(plan.look);
    this.raster = new Raster(width, height);
    this.margin = plan.sway > 0 ? Math.ceil(0.05 * Math.max(width, height) * plan.sway) + 4 : 0;
    this.room = paintRoom(this.camera, this.light, plan.scene, plan.lift.id, plan.seed, this.margin);
    const next = seeded(plan.seed * 17 + 29);
    this.noise = Int8Array.from({ length: NOISE_SIZE * NOISE_SIZE }, () =>
      Math.round((next() + next() + next() - 1.5) * 7 * plan.noise),
    );
    if (plan.sway > 0) {
      const still = createCanvas(this.room.width, this.room.height);
      const context = still.getContext('2d');
      const data = context.createImageData(this.room.width, this.room.height);
      data.data.set(this.room.rgba);
      context.putImageData(data, 0, 0);
      this.shaken = { still, canvas: createCanvas(width, height) };
    }
  }

  /** Draws a frame and returns the picture, RGBA, valid until the next call. */
  frame(index: number): Uint8ClampedArray {
    const tMs = timeOfFrame(this.plan, index);
    const shake = shakeAt(this.plan, tMs);
    const instant = instantAt(this.plan, tMs);
    this.background(shake);
    this.figure(instant, shake);
    this.grain(index);
    if (this.plan.options.jointDots) this.dots(instant, shake);
    if (this.plan.options.frameCounter) drawNumber(this.picture, this.plan.width, index);
    return this.picture;
  }

  private background(shake: Shake): void {
    if (!this.shaken) {
      this.picture.set(this.room.rgba);
      return;
    }
    const { canvas, still } = this.shaken;
    const { width, height } = this.plan;
    const context = canvas.getContext('2d');
    context.setTransform(1, 0, 0, 1, width / 2 + shake.dx, height / 2 + shake.dy);
    context.rotate(shake.roll);
    context.drawImage(still, -width / 2 - this.margin, -height / 2 - this.margin);
    this.picture.set(context.getImageData(0, 0, width, height).data);
  }

  private figure({ skeleton, held }: Instant, shake: Shake): void {
    const { mesh, plan } = this;
    mesh.clear();
    const grips = (side: 'left' | 'right'): boolean =>
      held.length > 0 && !(plan.lift.id === 'floor-press' && side === 'left');
    drawFigure(mesh, plan.body, skeleton, plan.look, this.wear, {
      left: grips('left'),
      right: grips('right'),
    });
    drawHeld(mesh, held, plan.loadKg);
    this.blockers.clear();
    blockersOf(this.blockers, plan.body, skeleton, held, plan.loadKg);
    this.shadow(shake);
    lightMesh(mesh, this.light, this.blockers, this.camera, this.lit);
    this.raster.draw(mesh, this.lit, this.camera, this.picture, shake);
  }

  /** Darkens floor and wall where the figure stands between them and the light, on a coarse grid. */
  private shadow(shake: Shake): void {
    const { blockers, light, camera, picture } = this;
    const { width, height } = this.plan;
    let x0 = Infinity;
    let y0 = Infinity;
    let x1 = -Infinity;
    let y1 = -Infinity;
    const put = (p: V3): void => {
      const seen = project(camera, p, shake);
      x0 = Math.min(x0, seen.x);
      x1 = Math.max(x1, seen.x);
      y0 = Math.min(y0, seen.y);
      y1 = Math.max(y1, seen.y);
    };
    const [lx, ly, lz] = light.towards;
    for (let i = 0; i < blockers.count; i++) {
      const x = blockers.data[i * 4] as number;
      const y = blockers.data[i * 4 + 1] as number;
      const z = blockers.data[i * 4 + 2] as number;
      const r = (blockers.data[i * 4 + 3] as number) * 3.2 + 0.05;
      const away = Math.max(0, y) / ly;
      for (const ground of [[x, 0, z] as V3, [x - lx * away, 0, z - lz * away] as V3]) {
        put(add(ground, [r, 0, r]));
        put(add(ground, [-r, 0, -r]));
        put(add(ground, [r, 0, -r]));
        put(add(ground, [-r, 0, r]));
      }
    }
    const step = Math.max(2, Math.round(Math.min(width, height) / 120));
    x0 = Math.max(0, Math.floor(x0));
    y0 = Math.max(0, Math.floor(y0));
    x1 = Math.min(width, Math.ceil(x1));
    y1 = Math.min(height, Math.ceil(y1));
    if (x1 <= x0 || y1 <= y0) return;
    const columns = Math.ceil((x1 - x0) / step) + 2;
    const rows = Math.ceil((y1 - y0) / step) + 2;
    const grid = new Float32Array(columns * rows);
    const open = new Float32Array(2);
    for (let r = 0; r < rows; r++) {
      for (let c = 0; c < columns; c++) {
        const hit = hitAt(camera, x0 + c * step, y0 + r * step, shake);
        const [nx, ny, nz] = hit.normal;
        openness(blockers, light, hit.at[0], hit.at[1], hit.at[2], nx, ny, nz, 0, open);
        const sun = hit.surface === 'wall' ? 0.25 * (open[1] as number) + 0.75 : (open[1] as number);
        grid[r * columns + c] = Math.sqrt((open[0] as number) * (0.5 + 0.5 * sun));
      }
    }
    for (let y = y0; y < y1; y++) {
      const gy = (y - y0) / step;
      const r = Math.floor(gy);
      const fy = gy - r;
      for (let x = x0; x < x1; x++) {
        const gx = (x - x0) / step;
        const c = Math.floor(gx);
        const fx = gx - c;
        const i = r * columns + c;
        const upper = (grid[i] as number) * (1 - fx) + (grid[i + 1] as number) * fx;
        const lower = (grid[i + columns] as number) * (1 - fx) + (grid[i + columns + 1] as number) * fx;
        const k = upper + (lower - upper) * fy;
        if (k > 0.996) continue;
        const o = (y * width + x) * 4;
        picture[o] = (picture[o] as number) * k;
        picture[o + 1] = (picture[o + 1] as number) * k;
        picture[o + 2] = (picture[o + 2] as number) * k;
      }
    }
  }

  private grain(index: number): void {
    if (this.plan.noise === 0) return;
    const next = seeded(this.plan.seed * 31 + index);
    const ox = Math.floor(next() * NOISE_SIZE);
    const oy = Math.floor(next() * NOISE_SIZE);
    const { width, height } = this.plan;
    const { picture, noise } = this;
    for (let y = 0; y < height; y++) {
      const row = ((y + oy) & (NOISE_SIZE - 1)) * NOISE_SIZE;
      let o = y * width * 4;
      for (let x = 0; x < width; x++, o += 4) {
        const n = noise[row + ((x + ox) & (NOISE_SIZE - 1))] as number;
        picture[o] = (picture[o] as number) + n;
        picture[o + 1] = (picture[o + 1] as number) + n;
        picture[o + 2] = (picture[o + 2] as number) + n;
      }
    }
  }

  private dots({ skeleton }: Instant, shake: Shake): void {
    const { width, height } = this.plan;
    JOINT_NAMES.forEach((name, i) => {
      const seen = project(this.camera, skeleton.joints[name], shake);
      const [r, g, b] = DOT_RGB[i % 2] ?? DOT_RGB[0];
      const reach = DOT_RADIUS_PX + 1;
      for (let y = Math.floor(seen.y - reach); y <= seen.y + reach; y++) {
        for (let x = Math.floor(seen.x - reach); x <= seen.x + reach; x++) {
          if (x < 0 || y < 0 || x >= width || y >= height) continue;
          if (Math.hypot(x + 0.5 - seen.x, y + 0.5 - seen.y) > DOT_RADIUS_PX) continue;
          this.picture.set([r, g, b, 255], (y * width + x) * 4);
        }
      }
    });
  }
}

/** One frame of a clip as a PNG file's bytes. */
export function stillOf(plan: ClipPlan, frame: number): Buffer {
  const painter = new Painter(plan);
  const canvas = createCanvas(plan.width, plan.height);
  const context = canvas.getContext('2d');
  const data = context.createImageData(plan.width, plan.height);
  data.data.set(painter.frame(frame));
  context.putImageData(data, 0, 0);
  return canvas.toBuffer('image/png');
}
