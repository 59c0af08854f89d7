import type { CameraPlace } from './lifts/lift';
import { UP, type V3, add, along, cross, dot, scale, sub, turn, unit } from './vec';

/** A point as the camera sees it: pixels from the top left, and its distance from the camera in metres. */
export interface Seen {
  x: number;
  y: number;
  depthM: number;
}

export interface Camera {
  eye: V3;
  /** The picture's right and up, and the way the camera looks. */
  right: V3;
  up: V3;
  ahead: V3;
  /** Pixels per metre at one metre. */
  focalPx: number;
  centreX: number;
  centreY: number;
  width: number;
  height: number;
}

/** A small turn and shift of the whole picture, as a hand makes; pixels and radians about the picture's middle. */
export interface Shake {
  dx: number;
  dy: number;
  roll: number;
}

export const STILL: Shake = { dx: 0, dy: 0, roll: 0 };
const DISTANCE_M = 4.4;

/** Projects a point with the mild perspective of a phone that stands 4.4 m away. */
export function project(camera: Camera, point: V3, shake: Shake = STILL): Seen {
  const ray = sub(point, camera.eye);
  const depthM = dot(ray, camera.ahead);
  const f = camera.focalPx / depthM;
  return shaken(
    camera,
    camera.centreX + dot(ray, camera.right) * f,
    camera.centreY - dot(ray, camera.up) * f,
    depthM,
    shake,
  );
}

function shaken(camera: Camera, x: number, y: number, depthM: number, { dx, dy, roll }: Shake): Seen {
  if (dx === 0 && dy === 0 && roll === 0) return { x, y, depthM };
  const px = x - camera.width / 2;
  const py = y - camera.height / 2;
  const c = Math.cos(roll);
  const s = Math.sin(roll);
  return { x: camera.width / 2 + px * c - py * s + dx, y: camera.height / 2 + px * s + py * c + dy, depthM };
}

/** A camera at its nominal place turned by `offAxisDeg`, with no zoom or framing yet. */
function placed(place: CameraPlace, offAxisDeg: number, width: number, height: number): Camera {
  const azimuth = place.azimuthDeg + offAxisDeg;
  // 90° is the figure's right side, so the turn about the vertical is left-handed.
  const outward = turn([1, 0, 0], UP, -azimuth);
  const eye = add(scale(outward, DISTANCE_M), [0, place.heightM, 0]);
  const level = scale(outward, -1);
  const right = unit(cross(level, UP));
  const ahead = turn(level, right, -place.tiltDeg);
  return {
    eye,
    right,
    up: cross(right, ahead),
    ahead,
    focalPx: 1000,
    centreX: width / 2,
    centreY: height / 2,
    width,
    height,
  };
}

/**
 * A camera that has the whole set in its frame. `points` is everything that must be seen, over all frames; the figure
 * is never drawn larger than `standingShare` of the picture's height would make a person of `heightM`.
 */
export function framed(
  place: CameraPlace,
  offAxisDeg: number,
  width: number,
  height: number,
  points: readonly V3[],
  heightM: number,
): Camera {
  const camera = placed(place, offAxisDeg, width, height);
  let left = Infinity;
  let rightmost = -Infinity;
  let top = Infinity;
  let bottom = -Infinity;
  for (const point of points) {
    const seen = project(camera, point);
    left = Math.min(left, seen.x);
    rightmost = Math.max(rightmost, seen.x);
    top = Math.min(top, seen.y);
    bottom = Math.max(bottom, seen.y);
  }
  const standing = (heightM * 1000) / DISTANCE_M;
  const portrait = height > width;
  const zoom = Math.min(
    (width * 0.9) / (rightmost - left),
    (height * 0.8) / (bottom - top),
    (height * (portrait ? 0.63 : 0.74)) / standing,
  );
  const focalPx = 1000 * zoom;
  const midX = (left + rightmost) / 2 - width / 2;
  // Feet, or the lowest point of a figure on the floor, stand a little above the picture's lower edge.
  const floorShare = portrait ? 0.85 : 0.89;
  const lowest = bottom - height / 2;
  const highest = top - height / 2;
  const span = (lowest - highest) * zoom;
  const feetAt = Math.min(
    height * floorShare,
    span < height * 0.45 ? height * (portrait ? 0.7 : 0.76) : height,
  );
  return { ...camera, focalPx, centreX: width / 2 - midX * zoom, centreY: feetAt - lowest * zoom };
}

/** The world point where the ray through a pixel meets the floor; undefined at or above the horizon. */
export function floorAt(camera: Camera, x: number, y: number): V3 | undefined {
  const ray = add(
    camera.ahead,
    add(
      scale(camera.right, (x - camera.centreX) / camera.focalPx),
      scale(camera.up, (camera.centreY - y) / camera.focalPx),
    ),
  );
  if (ray[1] > -1e-6) return undefined;
  return along(camera.eye, ray, -camera.eye[1] / ray[1]);
}
