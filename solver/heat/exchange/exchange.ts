/**
 * The law of a surface during one interval, by the surface's own temperature.
 *
 *   q(Ts, t) = imposed(t) + h(Ts, Ta, t) (Ta(t) − Ts) + ε σ (Te(t)⁴ − Ts⁴)      q [W/m²] positive into the part
 *
 * Ts, Ta, Te temperatures of the surface, of the surroundings and of the enclosure (absolute in the last term), h film
 * coefficient, ε emissivity. A held surface follows its temperature; its law gives no flux.
 */
import { blackFlux, blackSlope, isStraight, type OutOfRange } from '../../materials';
import type { LaidExposure } from '../../model';
import type { Interval } from '../system';
import { coefficientInside, type CoefficientInside } from './coefficient';
import { courseInside, NO_COURSE, type CourseInside } from './courseInside';

/** Film and radiation of an exposure. */
interface FilmInside {
  readonly coefficient: CoefficientInside;
  readonly surroundings: CourseInside;
  /** 0: none. */
  readonly emissivity: number;
  readonly enclosure: CourseInside;
}

export class Exchange {
  /** After `at`: q. After `linearise`: also ∂q/∂Ts and ∂q/∂t. */
  flux = 0;
  fluxPerKelvin = 0;
  fluxSlope = 0;
  private imposed = NO_COURSE;
  private held: CourseInside | null = null;
  private film: FilmInside | null = null;
  private isStraight = true;

  enter(exposure: LaidExposure, interval: Interval): void {
    this.imposed = exposure.kind === 'flux' ? courseInside(exposure.flux, interval) : NO_COURSE;
    this.held = exposure.kind === 'temperature' ? courseInside(exposure.temperature, interval) : null;
    this.film = exposure.kind === 'film' ? filmInside(exposure, interval) : null;
    this.isStraight = isStraight(exposure);
  }

  /** Temperature course of a held surface, or null. */
  get heldCourse(): CourseInside | null {
    return this.held;
  }

  /** Whether q is straight in Ts. */
  get straight(): boolean {
    return this.isStraight;
  }

  at(surface: number, time: number): void {
    let flux = this.imposed.at(time);
    const { film } = this;
    if (film !== null) {
      const surroundings = film.surroundings.at(time);
      flux += film.coefficient.at(surface, surroundings, time) * (surroundings - surface);
      if (film.emissivity > 0) flux += film.emissivity * blackFlux(film.enclosure.at(time), surface);
    }
    this.flux = flux;
  }

  linearise(surface: number, time: number): void {
    const { film } = this;
    this.flux = this.imposed.at(time);
    this.fluxPerKelvin = 0;
    this.fluxSlope = this.imposed.slopeAt(time);
    if (film === null) return;
    const { coefficient } = film;
    const surroundings = film.surroundings.at(time);
    const rate = film.surroundings.slopeAt(time);
    const h = coefficient.at(surface, surroundings, time);
    const difference = surroundings - surface;
    this.flux += h * difference;
    this.fluxPerKelvin += coefficient.perSurface(surface, surroundings, time) * difference - h;
    const bySurroundings = rate === 0 ? 0 : coefficient.perSurroundings(surface, surroundings, time) * rate;
    this.fluxSlope += (coefficient.perSecond(surface, surroundings, time) + bySurroundings) * difference + h * rate;
    if (film.emissivity > 0) {
      const enclosure = film.enclosure.at(time);
      this.flux += film.emissivity * blackFlux(enclosure, surface);
      this.fluxPerKelvin -= film.emissivity * blackSlope(surface);
      this.fluxSlope += film.emissivity * blackSlope(enclosure) * film.enclosure.slopeAt(time);
    }
  }

  /** What drives the surface furthest: the lowest and the highest of its temperatures outside, °C; none with a flux alone. */
  outside(time: number): { lowest: number; highest: number } {
    const { film } = this;
    if (film === null) return { lowest: Infinity, highest: -Infinity };
    const surroundings = film.surroundings.at(time);
    const enclosure = film.emissivity > 0 ? film.enclosure.at(time) : surroundings;
    return { lowest: Math.min(surroundings, enclosure), highest: Math.max(surroundings, enclosure) };
  }

  /** What a correlation is used outside of, with the surface at a temperature. */
  outOfRange(surface: number, time: number): OutOfRange[] {
    const { film } = this;
    return film === null ? [] : film.coefficient.outOfRange(surface, film.surroundings.at(time));
  }
}

function filmInside(exposure: Extract<LaidExposure, { kind: 'film' }>, interval: Interval): FilmInside {
  const { radiation } = exposure;
  return {
    coefficient: coefficientInside(exposure.coefficient, interval),
    surroundings: courseInside(exposure.surroundings, interval),
    emissivity: radiation?.emissivity ?? 0,
    enclosure: radiation === null ? NO_COURSE : courseInside(radiation.enclosure, interval),
  };
}
