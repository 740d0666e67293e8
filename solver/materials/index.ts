/** Doors of materials: what a material does with heat. */
export { thermalCurves, type SlopeRange, type ThermalCurves } from './curves';
export { argumentAt, heatTables, temperatureIn, type Constituent, type HeatTables } from './heatTables';
export { H0, REF, rowOf, T0, T1, THETA0 } from './thermalTable';
export {
  betweenWalls,
  blackFlux,
  blackSlope,
  CORRELATION_ENTRIES,
  CorrelationFilm,
  coursesOf,
  filmLaw,
  FLUIDS,
  instantOf,
  isStraight,
  largestConductance,
  NO_EXPOSURE,
  STEFAN_BOLTZMANN,
  tableAt,
  tableSlopeAt,
  temperaturesOf,
  timesOf,
  ZERO_CELSIUS,
  type CorrelationEntry,
  type FilmLaw,
  type Fluid,
  type Instant,
  type OutOfRange,
} from './films';
export { curveAt } from './curveAt';
