/** Doors of heat: the balances of a part, as schemes see them. */
export type { HeatSystem, Interval } from './system';
export { wallVolumes, type Volumes } from './volumes';
export { WallSystem, type WallOptions } from './wall';
