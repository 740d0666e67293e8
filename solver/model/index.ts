/** Doors of the model: the project document, the way in, the cycle on the time axis, and what a run gives back. */
export { FORMAT, VERSION, projectSchema, type Project } from './project';
export { materialSchema, type Material } from './material';
export { MAX_LAYERS, FACES, type FaceId, type Initial, type Layer, type Part } from './part';
export {
  MAX_STAGES,
  type Cycle,
  type Exposure,
  type ExposureKind,
  type PlainSchedule,
  type Ramp,
  type Segment,
  type Stage,
  type StageEnd,
  type TemperatureSchedule,
} from './cycle';
export { type Place, type Probe } from './probe';
export { type Counts, type Requirement, type Rule, type Subject } from './requirement';
export { type GridSetting, type SchemeName, type Settings } from './settings';
export { checkProject, readProject, writeProject, type ReadResult } from './read';
export { placeOf, problemsOf, valueAt, wordProblem, type Path, type Problem } from './problems';
export { crossCheck, partThickness } from './check';
export {
  layCycle,
  lineAt,
  rampDuration,
  segmentDuration,
  schedulesOf,
  type LaidCycle,
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
