/**
 * The whole field over one step as four courses: the coldest point, the hottest point, the largest difference in the part and
 * the largest within one material.
 *
 * Each is smooth while its extreme stays beside the same points, and then the quartic through the quarters of the step tells
 * it. Where an extreme moves on, or leaps from one face to the other, the step is halved until the quartics agree with the
 * dense output at the eighths between, within `tolerance`, or the piece is 1/1024 of the step.
 */
import type { Part } from '../model';
import type { FieldPoints } from '../stepping';
import { Course, type Piece } from './course';
import { differenceIn, differenceInPiece, ExtremesReader, newExtremes, type Extremes } from './extremes';
import type { Quarters } from './quarters';
import { quarticThrough, valueOf } from './quartic';

/** What the courses of a field are of: in the order of `fieldQuantities`. */
export type FieldQuantity = 'coldest' | 'hottest' | 'part' | 'material';

/** One number of a field's extremes, °C for the points and K for the differences. */
export const fieldQuantities: Record<FieldQuantity, (extremes: Extremes) => number> = {
  coldest: (extremes) => extremes.coldest.value,
  hottest: (extremes) => extremes.hottest.value,
  part: differenceIn,
  material: differenceInPiece,
};
const QUANTITIES = Object.keys(fieldQuantities) as FieldQuantity[];

const DEEPEST = 10;
const EIGHTHS = [1 / 8, 3 / 8, 5 / 8, 7 / 8];

export class FieldOverStep {
  private readonly reader: ExtremesReader;
  private readonly tolerance: number;
  private readonly profile: Float64Array;
  private readonly atQuarters: Extremes[] = [0, 1, 2, 3, 4].map(newExtremes);
  private readonly scratch = newExtremes();
  private quarters!: Quarters;
  private courses!: Record<FieldQuantity, Course>;

  /** `tolerance`: how far a course may lie from the dense output where an extreme moves on, K. */
  constructor(points: FieldPoints, part: Pick<Part, 'layers'>, tolerance: number) {
    this.reader = new ExtremesReader(points, part);
    this.tolerance = tolerance;
    this.profile = new Float64Array(points.position.length);
  }

  read(quarters: Quarters): void {
    this.quarters = quarters;
    quarters.rows.forEach((row, i) => this.reader.read(row, this.atQuarters[i]));
    const pieces: Record<FieldQuantity, Piece[]> = { coldest: [], hottest: [], part: [], material: [] };
    this.divide(0, 1, this.atQuarters, pieces, 0);
    this.courses = {
      coldest: new Course(pieces.coldest),
      hottest: new Course(pieces.hottest),
      part: new Course(pieces.part),
      material: new Course(pieces.material),
    };
  }

  course(quantity: FieldQuantity): Course {
    return this.courses[quantity];
  }

  /** Extremes of the field at a fraction of the step; valid until the next call. */
  extremesAt(fraction: number): Extremes {
    const quarter = fraction * 4;
    if (Number.isInteger(quarter)) return this.atQuarters[quarter];
    return this.readAt(fraction, this.scratch);
  }

  /** Extremes of any profile at the points of the part. */
  extremesOf(profile: Float64Array): Extremes {
    const extremes = newExtremes();
    this.reader.read(profile, extremes);
    return extremes;
  }

  private readAt(fraction: number, out: Extremes): Extremes {
    this.quarters.step.at(fraction, this.profile);
    this.reader.read(this.profile, out);
    return out;
  }

  /** Adds pieces from `from` to `to`, whose extremes at the five quarters between are known. */
  private divide(from: number, to: number, known: Extremes[], pieces: Record<FieldQuantity, Piece[]>, depth: number): void {
    const shapes = QUANTITIES.map((quantity) => {
      const [v0, v1, v2, v3, v4] = known.map(fieldQuantities[quantity]);
      return quarticThrough(v0, v1, v2, v3, v4);
    });
    if (depth < DEEPEST && !stayBesideTheSamePoints(known)) {
      const between = EIGHTHS.map((part) => this.readAt(from + part * (to - from), newExtremes()));
      const misfit = QUANTITIES.some((quantity, q) =>
        between.some(
          (extremes, i) => Math.abs(fieldQuantities[quantity](extremes) - valueOf(shapes[q], EIGHTHS[i])) > this.tolerance,
        ),
      );
      if (misfit) {
        const middle = from + 0.5 * (to - from);
        this.divide(from, middle, [known[0], between[0], known[1], between[1], known[2]], pieces, depth + 1);
        this.divide(middle, to, [known[2], between[2], known[3], between[3], known[4]], pieces, depth + 1);
        return;
      }
    }
    QUANTITIES.forEach((quantity, q) => pieces[quantity].push({ from, to, shape: shapes[q] }));
  }
}

const stayBesideTheSamePoints = ([first, ...rest]: Extremes[]): boolean =>
  rest.every(({ beside }) => beside.every((point, i) => point === first.beside[i]));
