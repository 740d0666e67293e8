/**
 * The whole field over one step as four courses: the coldest point, the hottest point, the largest difference in the part and
 * the largest within one material.
 *
 * Each is smooth while its extreme stays beside the same points, and then the quartic through the quarters of the step tells
 * it. Where an extreme moves on, or leaps from one face to the other, the step is halved until the quartic agrees with the
 * dense output at the eighths between, within `tolerance`, or the piece is 1/1024 of the step. The eighths are spared where
 * all points move along straight lines: what is lowest of straight lines at both ends is so all the way.
 */
import type { Part } from '../model';
import type { FieldPoints } from '../stepping';
import { Course, type Piece } from './course';
import { differenceInPiece, ExtremesReader, newExtremes, type Extremes } from './extremes';
import type { Quarters } from './quarters';
import { quarticThrough, valueOf, type Polynomial } from './quartic';

/** What the courses of a field are of. */
export type FieldQuantity = 'coldest' | 'hottest' | 'part' | 'material';

/** One number of a field's extremes, °C for the points and K for the differences. */
const figureOf: Record<FieldQuantity, (extremes: Extremes) => number> = {
  coldest: (extremes) => extremes.coldest.value,
  hottest: (extremes) => extremes.hottest.value,
  part: (extremes) => extremes.hottest.value - extremes.coldest.value,
  material: differenceInPiece,
};
/** The entries of `beside` that a figure depends on. */
const PLACES: Record<FieldQuantity, readonly number[]> = { coldest: [0], hottest: [1], part: [0, 1], material: [2, 3] };

const DEEPEST = 10;
const EIGHTHS = [1 / 8, 3 / 8, 5 / 8, 7 / 8];

export class FieldOverStep {
  private readonly reader: ExtremesReader;
  private readonly tolerance: number;
  private readonly profile: Float64Array;
  private readonly atQuarters: Extremes[] = [0, 1, 2, 3, 4].map(newExtremes);
  /** Extremes between the quarters, as far as they were asked for, by fraction. */
  private readonly between = new Map<number, Extremes>();
  private readonly courses = new Map<FieldQuantity, Course>();
  private readonly roughs = new Map<FieldQuantity, Course>();
  private quarters!: Quarters;

  /** `tolerance`: how far a course may lie from the dense output where an extreme moves on, K. */
  constructor(points: FieldPoints, part: Pick<Part, 'layers'>, tolerance: number) {
    this.reader = new ExtremesReader(points, part);
    this.tolerance = tolerance;
    this.profile = new Float64Array(points.position.length);
  }

  read(quarters: Quarters): void {
    this.quarters = quarters;
    this.between.clear();
    this.courses.clear();
    this.roughs.clear();
    for (let i = 0; i < 5; i++) this.reader.read(quarters.rows[i], this.atQuarters[i]);
  }

  course(quantity: FieldQuantity): Course {
    let course = this.courses.get(quantity);
    if (course === undefined) {
      course = new Course(this.pieces(quantity, 0, 1, this.atQuarters, 0));
      this.courses.set(quantity, course);
    }
    return course;
  }

  /** A course without a search for kinks: through the quarters, and the eighths unless all points move along straight lines. */
  rough(quantity: FieldQuantity): Course {
    let rough = this.roughs.get(quantity);
    if (rough === undefined) {
      rough = new Course(this.roughPieces(quantity));
      this.roughs.set(quantity, rough);
    }
    return rough;
  }

  private roughPieces(quantity: FieldQuantity): Piece[] {
    const [k0, k1, k2, k3, k4] = this.atQuarters;
    if (this.quarters.straight) return [{ from: 0, to: 1, shape: shapeOf(quantity, this.atQuarters) }];
    const [e1, e3, e5, e7] = EIGHTHS.map((fraction) => this.extremesAt(fraction));
    return [
      { from: 0, to: 0.5, shape: shapeOf(quantity, [k0, e1, k1, e3, k2]) },
      { from: 0.5, to: 1, shape: shapeOf(quantity, [k2, e5, k3, e7, k4]) },
    ];
  }

  /** Extremes of the field at a fraction of the step; not to be changed. */
  extremesAt(fraction: number): Extremes {
    const quarter = fraction * 4;
    if (Number.isInteger(quarter)) return this.atQuarters[quarter];
    let extremes = this.between.get(fraction);
    if (extremes === undefined) {
      this.quarters.step.at(fraction, this.profile);
      extremes = this.extremesOf(this.profile);
      this.between.set(fraction, extremes);
    }
    return extremes;
  }

  /** Extremes of any profile at the points of the part. */
  extremesOf(profile: Float64Array): Extremes {
    const extremes = newExtremes();
    this.reader.read(profile, extremes);
    return extremes;
  }

  /** The pieces from `from` to `to`, whose extremes at the five quarters between are known. */
  private pieces(quantity: FieldQuantity, from: number, to: number, known: readonly Extremes[], depth: number): Piece[] {
    const figure = figureOf[quantity];
    const [k0, k1, k2, k3, k4] = known;
    const shape = shapeOf(quantity, known);
    if (depth === DEEPEST || (this.quarters.straight && stayBeside(known, PLACES[quantity]))) return [{ from, to, shape }];
    const between = EIGHTHS.map((part) => this.extremesAt(from + part * (to - from)));
    const fits = between.every((extremes, i) => Math.abs(figure(extremes) - valueOf(shape, EIGHTHS[i])) <= this.tolerance);
    if (fits) return [{ from, to, shape }];
    const middle = from + 0.5 * (to - from);
    return [
      ...this.pieces(quantity, from, middle, [k0, between[0], k1, between[1], k2], depth + 1),
      ...this.pieces(quantity, middle, to, [k2, between[2], k3, between[3], k4], depth + 1),
    ];
  }
}

function shapeOf(quantity: FieldQuantity, [k0, k1, k2, k3, k4]: readonly Extremes[]): Polynomial {
  const figure = figureOf[quantity];
  return quarticThrough(figure(k0), figure(k1), figure(k2), figure(k3), figure(k4));
}

function stayBeside(known: readonly Extremes[], places: readonly number[]): boolean {
  for (const place of places) {
    for (let i = 1; i < known.length; i++) if (known[i].beside[place] !== known[0].beside[place]) return false;
  }
  return true;
}
