/** Doors of grid: where the unknowns of a part sit, where its field is reported, and how to read it at any depth. */
export { gridOf } from './gridOf';
export { fieldPoints, type FieldPoints } from './points';
export { temperatureRange, type TemperatureRange } from './sharpness';
export { layerAt, stencilAt, type Stencil } from './stencil';
export { equalGrid, type PlainRows, type WallGrid } from './wallGrid';
export { wallLayers, type WallLayer } from './wallLayers';
