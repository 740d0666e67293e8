/** An exposure looked at from outside: at single instants and temperatures, for estimates made before a run. */
import { courseAt, courseCorners, type Course, type LaidExposure } from '../../model';
import { filmLaw } from './filmLaw';
import { blackFlux } from './radiation';

/** What a face meets at one instant. */
export interface Instant {
  /** The temperature that the face is held at, °C; null: it is free. */
  readonly held: number | null;
  /** Temperatures of what it meets, °C. */
  readonly outside: readonly number[];
  /** Flux into a face at a temperature (°C), W/m²; 0 where it is held. */
  flux(surface: number): number;
}

const nothing = (): number => 0;
export const NO_EXPOSURE: Instant = { held: null, outside: [], flux: nothing };

/** An exposure at a time; at a jump `side` chooses. */
export function instantOf(exposure: LaidExposure, time: number, side: 'before' | 'after'): Instant {
  switch (exposure.kind) {
    case 'insulated':
      return NO_EXPOSURE;
    case 'temperature': {
      const held = courseAt(exposure.temperature, time, side);
      return { held, outside: [held], flux: nothing };
    }
    case 'flux': {
      const flux = courseAt(exposure.flux, time, side);
      return { held: null, outside: [], flux: () => flux };
    }
    case 'film': {
      const { coefficient, radiation } = exposure;
      const surroundings = courseAt(exposure.surroundings, time, side);
      const fixed = coefficient.kind === 'course' ? courseAt(coefficient.course, time, side) : null;
      const law = coefficient.kind === 'course' ? null : filmLaw(coefficient);
      const h = (surface: number): number => fixed ?? law?.(surface, surroundings, time) ?? 0;
      const film = (surface: number): number => h(surface) * (surroundings - surface);
      if (radiation === null) return { held: null, outside: [surroundings], flux: film };
      const enclosure = courseAt(radiation.enclosure, time, side);
      const flux = (surface: number): number => film(surface) + radiation.emissivity * blackFlux(enclosure, surface);
      return { held: null, outside: [surroundings, enclosure], flux };
    }
  }
}

/** Whether the flux of an exposure is straight in the temperature of the face. */
export const isStraight = (exposure: LaidExposure): boolean =>
  exposure.kind !== 'film' || (exposure.coefficient.kind === 'course' && exposure.radiation === null);

/** Parts of a stage in which an expression of time is looked at. */
const TIME_PARTS = 32;
/** Parts of a range of temperatures in which a law over temperature is looked at. */
const TEMPERATURE_PARTS = 24;

/** Times at which to look at an exposure between `from` and `to`: the ends, every corner, and equal parts where there is an expression. */
export function timesOf(exposure: LaidExposure, from: number, to: number): number[] {
  const courses = coursesOf(exposure);
  const times = [from, to, ...courses.flatMap((course) => courseCorners(course))];
  const byExpression =
    courses.some((course) => 'expression' in course) || (exposure.kind === 'film' && exposure.coefficient.kind === 'expression');
  if (byExpression) for (let i = 1; i < TIME_PARTS; i++) times.push(from + (i / TIME_PARTS) * (to - from));
  return [...new Set(times)].filter((time) => time >= from && time <= to).sort((a, b) => a - b);
}

/** The courses over time of an exposure. */
export function coursesOf(exposure: LaidExposure): Course[] {
  switch (exposure.kind) {
    case 'insulated':
      return [];
    case 'temperature':
      return [exposure.temperature];
    case 'flux':
      return [exposure.flux];
    case 'film': {
      const { coefficient, surroundings, radiation } = exposure;
      const courses = coefficient.kind === 'course' ? [coefficient.course, surroundings] : [surroundings];
      return radiation === null ? courses : [...courses, radiation.enclosure];
    }
  }
}

/** Temperatures of the face at which to look at an exposure: the ends of a range where its flux is straight, else also in between. */
export function temperaturesOf(exposure: LaidExposure, lowest: number, highest: number): number[] {
  if (isStraight(exposure)) return [lowest, highest];
  const list: number[] = [];
  for (let i = 0; i <= TEMPERATURE_PARTS; i++) list.push(lowest + (i / TEMPERATURE_PARTS) * (highest - lowest));
  if (exposure.kind !== 'film' || exposure.coefficient.kind !== 'table') return list;
  const points = exposure.coefficient.table.map(([temperature]) => temperature);
  return [...list, ...points.filter((temperature) => temperature > lowest && temperature < highest)];
}

/** Half the width of a difference in temperature where the law is not straight, K. */
const HALF_WIDTH = 1e-3;

/** Largest conductance −∂q/∂T of a face between two times while it lies between two temperatures, W/(m²·K); a held one has none. */
export function largestConductance(
  exposure: LaidExposure,
  { start, end }: { start: number; end: number },
  { lowest, highest }: { lowest: number; highest: number },
): number {
  const half = isStraight(exposure) ? 0.5 : HALF_WIDTH;
  let largest = 0;
  for (const time of timesOf(exposure, start, end)) {
    for (const side of ['before', 'after'] as const) {
      if (time === (side === 'before' ? start : end)) continue;
      const { flux } = instantOf(exposure, time, side);
      for (const surface of temperaturesOf(exposure, lowest, highest)) {
        largest = Math.max(largest, (flux(surface - half) - flux(surface + half)) / (2 * half));
      }
    }
  }
  return largest;
}
