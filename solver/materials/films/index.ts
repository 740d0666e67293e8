/** Doors of films: fluids beside a face, film correlations, and radiation. */
export { CORRELATION_ENTRIES, CorrelationFilm, type CorrelationEntry, type OutOfRange, type Range } from './correlations';
export { filmLaw, tableAt, tableSlopeAt, type FilmLaw } from './filmLaw';
export { FLUIDS, type Fluid, type FluidState } from './fluids';
export {
  coursesOf,
  instantOf,
  isStraight,
  largestConductance,
  NO_EXPOSURE,
  temperaturesOf,
  timesOf,
  type Instant,
} from './instant';
export { betweenWalls, blackFlux, blackSlope, STEFAN_BOLTZMANN, ZERO_CELSIUS } from './radiation';
