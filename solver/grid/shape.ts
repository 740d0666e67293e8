/**
 * Areas and volumes of a layered part, by depth from its start face: per m² of a wall, per m of a cylinder's length, of a whole
 * sphere. On a solid cylinder or sphere depth is the radius.
 */
import type { Part } from '../model';

export interface Shape {
  readonly kind: Part['kind'];
  /** m; 0 on a wall and on a solid part. */
  readonly innerRadius: number;
}

export const FLAT: Shape = { kind: 'wall', innerRadius: 0 };

/** A solid cylinder or sphere: its start is a centre, not a face. */
export const hasCentre = ({ kind, innerRadius }: Shape): boolean => kind !== 'wall' && innerRadius === 0;

/** Area at a depth: 1, 2πr [m²/m] or 4πr² [m²]. */
export function areaAt({ kind, innerRadius }: Shape, depth: number): number {
  const radius = innerRadius + depth;
  if (kind === 'cylinder') return 2 * Math.PI * radius;
  return kind === 'sphere' ? 4 * Math.PI * radius * radius : 1;
}

/** Volume of a shell `length` thick that begins at a depth, [m³] per m², per m or in all. */
export function volumeFrom(shape: Shape, depth: number, length: number): number {
  const middle = areaAt(shape, depth + length / 2) * length;
  return shape.kind === 'sphere' ? middle + (Math.PI / 3) * length * length * length : middle;
}

/**
 * ∫ dr/area over a length that begins at a depth: what conducts as one metre of a wall does per m². Infinity from a centre.
 */
export function resistanceFrom({ kind, innerRadius }: Shape, depth: number, length: number): number {
  const radius = innerRadius + depth;
  if (kind === 'cylinder') return growth(radius, length) / (2 * Math.PI);
  return kind === 'sphere' ? length / (4 * Math.PI * radius * (radius + length)) : length;
}

/**
 * ln((r + length)/r), exact for the thinnest shell too, and the same to the last digit on every machine: engines differ in their
 * logarithms. ln x = 2 atanh((x − 1)/(x + 1)), after square roots have brought x below 2.
 */
function growth(radius: number, length: number): number {
  if (radius <= 0) return Infinity;
  let doublings = 1;
  // (x − 1)/(x + 1) of x = 1 + length/r, without taking 1 from 1.
  let above = length / radius;
  while (above > 1) {
    above = above / (1 + Math.sqrt(1 + above));
    doublings *= 2;
  }
  const z = above / (2 + above);
  let sum = 0;
  for (let power = 33; power >= 1; power -= 2) sum = sum * z * z + 1 / power;
  return doublings * 2 * z * sum;
}
