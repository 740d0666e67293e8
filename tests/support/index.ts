/** Doors of the tests' helpers: plans in the words of the trade, what a run says of them, and exact solutions. */
export { course, film, flux, held, insulated, wall, type LayerSpec, type StageSpec, type WallSpec } from './wall';
export { depthWhere, solved, temperaturesAt, toTheEnd, type Depth, type Profile, type Solved } from './history';
export { automatic, crankNicolson, everyScheme, explicit, implicit, type Battery, type SchemeRow } from './schemes';
export { expectWithin, largestChange } from './closeness';
export { wallCoefficient, wallMeanTheta, wallRoot, wallTheta } from './wallSeries';
export { filmTheta, fluxRise, heldFaceFlux, heldFaceTheta, type Solid } from './halfSpace';
export { DecayingMode, steadyWithSource, systemOf, wholeStage } from './systems';
export { expectOrder, observedOrders } from './order';
