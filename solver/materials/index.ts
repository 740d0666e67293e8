/** Doors of materials: what a material does with heat. */
export { constantCurves, type ThermalCurves } from './curves';
