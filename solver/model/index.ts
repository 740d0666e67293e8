/** Doors of the model: the project document, the way in, the cycle on the time axis, and what a run gives back. */
export { FORMAT, VERSION, projectSchema, type Project } from './project';
export { materialSchema, type Material } from './material';
export { type Latent, type Reaction } from './material';
export { type Curve, type Table } from './curve';
export { MAX_LAYERS, FACES, facesOf, isSolid, type Contact, type FaceId, type Layer, type Part } from './part';
export { type Initial } from './initial';
export { MAX_STAGES, SOURCE_VARIABLES, type Cycle, type Source, type Stage, type StageEnd } from './cycle';
export {
  CORRELATIONS,
  FILM_VARIABLES,
  type Coefficient,
  type Correlation,
  type CorrelationName,
  type Exposure,
  type ExposureKind,
} from './exposure';
export {
  TIME_VARIABLES,
  type Expression,
  type PlainSchedule,
  type Ramp,
  type Segment,
  type TemperatureSchedule,
} from './schedule';
export { FUNCTIONS, evaluatorOf, readExpression, type Compiled, type ReadExpression } from './expressions';
export { type Place, type Probe } from './probe';
export { type Counts, type Requirement, type Rule, type Subject } from './requirement';
export { type GridSetting, type SchemeName, type Settings } from './settings';
export { checkProject, readProject, writeProject, type ReadResult } from './read';
export { placeOf, problemsOf, valueAt, wordProblem, type Path, type Problem } from './problems';
export { crossCheck, partThickness } from './check';
export {
  courseAt,
  courseCorners,
  layCycle,
  layState,
  lineAt,
  rampDuration,
  segmentDuration,
  schedulesOf,
  type Course,
  type LaidCoefficient,
  type LaidCycle,
  type LaidSource,
  type TimeExpression,
  type LaidExposure,
  type LaidStage,
  type Line,
} from './timing';
export { positionOf, type Position } from './place';
export { equalTimes, rowTimes } from './rows';
export { buildReport, reportSchema, REPORT_FORMAT, REPORT_VERSION, CAUTION, type Report } from './report';
export { formatDuration, formatNumber } from './quantities/write';
export { newProject } from './defaults';
export * from './results';
