/** Doors of grid: where the unknowns of a part sit, where its field is reported, and how to read it at any depth. */
export { gridOf } from './gridOf';
export { fieldPoints, type FieldPoints } from './points';
export { layerAt, stencilAt, type Stencil } from './stencil';
export { temperatureRange, type TemperatureRange } from './temperatureRange';
export { areaAt, FLAT, hasCentre, resistanceFrom, volumeFrom, type Shape } from './shape';
export { equalGrid, type PlainRows, type WallGrid } from './wallGrid';
export { startAt, wallLayers, type Profile, type WallLayer } from './wallLayers';
