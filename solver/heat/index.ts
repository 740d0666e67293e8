/** Doors of heat: the balances of a part, as schemes see them. */
export type { HeatSystem, Interval } from './system';
export { wallVolumes, type Volumes } from './volumes';
export type { StorageKind } from './elements';
export { WallSystem } from './layeredPart';
