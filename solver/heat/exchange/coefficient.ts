/** A film coefficient h(Ts, Ta, t) inside one interval, with its slopes. */
import { CorrelationFilm, filmLaw, tableAt, tableSlopeAt, type FilmLaw, type OutOfRange } from '../../materials';
import type { LaidCoefficient } from '../../model';
import type { Interval } from '../system';
import { courseInside, timeSlope, type CourseInside } from './courseInside';

/** h in W/(m²·K); temperatures in °C. */
export interface CoefficientInside {
  at(surface: number, surroundings: number, time: number): number;
  /** ∂h/∂Ts, ∂h/∂Ta and ∂h/∂t. */
  perSurface(surface: number, surroundings: number, time: number): number;
  perSurroundings(surface: number, surroundings: number, time: number): number;
  perSecond(surface: number, surroundings: number, time: number): number;
  /** What a correlation is used outside of at these temperatures. */
  outOfRange(surface: number, surroundings: number): OutOfRange[];
}

export function coefficientInside(coefficient: LaidCoefficient, interval: Interval): CoefficientInside {
  switch (coefficient.kind) {
    case 'course':
      return new ByCourse(courseInside(coefficient.course, interval));
    case 'table':
      return new ByTable(coefficient.table);
    case 'expression':
      return new ByExpression(filmLaw(coefficient), interval);
    case 'correlation':
      return new ByCorrelation(new CorrelationFilm(coefficient));
  }
}

class ByCourse implements CoefficientInside {
  private readonly course: CourseInside;

  constructor(course: CourseInside) {
    this.course = course;
  }
  at(_surface: number, _surroundings: number, time: number): number {
    return this.course.at(time);
  }
  perSurface(): number {
    return 0;
  }
  perSurroundings(): number {
    return 0;
  }
  perSecond(_surface: number, _surroundings: number, time: number): number {
    return this.course.slopeAt(time);
  }
  outOfRange(): OutOfRange[] {
    return [];
  }
}

/** Straight over the temperature of the face: a quench curve. */
class ByTable implements CoefficientInside {
  private readonly table: readonly (readonly [number, number])[];

  constructor(table: readonly (readonly [number, number])[]) {
    this.table = table;
  }
  at(surface: number): number {
    return tableAt(this.table, surface);
  }
  perSurface(surface: number): number {
    return tableSlopeAt(this.table, surface);
  }
  perSurroundings(): number {
    return 0;
  }
  perSecond(): number {
    return 0;
  }
  outOfRange(): OutOfRange[] {
    return [];
  }
}

/** Half the width of a difference in temperature, K. */
const HALF_WIDTH = 1e-3;

const difference = (value: (temperature: number) => number, temperature: number): number =>
  (value(temperature + HALF_WIDTH) - value(temperature - HALF_WIDTH)) / (2 * HALF_WIDTH);

class ByExpression implements CoefficientInside {
  private readonly law: FilmLaw;
  private readonly interval: Interval;

  constructor(law: FilmLaw, interval: Interval) {
    this.law = law;
    this.interval = interval;
  }
  at(surface: number, surroundings: number, time: number): number {
    return this.law(surface, surroundings, time);
  }
  perSurface(surface: number, surroundings: number, time: number): number {
    return difference((at) => this.law(at, surroundings, time), surface);
  }
  perSurroundings(): number {
    return 0;
  }
  perSecond(surface: number, surroundings: number, time: number): number {
    return timeSlope((at) => this.law(surface, surroundings, at), time, this.interval);
  }
  outOfRange(): OutOfRange[] {
    return [];
  }
}

class ByCorrelation implements CoefficientInside {
  private readonly film: CorrelationFilm;

  constructor(film: CorrelationFilm) {
    this.film = film;
  }
  at(surface: number, surroundings: number): number {
    return this.film.coefficient(surface, surroundings);
  }
  perSurface(surface: number, surroundings: number): number {
    return difference((at) => this.film.coefficient(at, surroundings), surface);
  }
  perSurroundings(surface: number, surroundings: number): number {
    return difference((at) => this.film.coefficient(surface, at), surroundings);
  }
  perSecond(): number {
    return 0;
  }
  outOfRange(surface: number, surroundings: number): OutOfRange[] {
    return this.film.outOfRange(surface, surroundings);
  }
}
