/** Doors of drawing: arrays to arrays, no framework, no canvas. */
export { cividis, colourOf, difference, gradientOf, paintRow, type ColourMap } from './colours';
export { decimate, type Points } from './decimate';
export { crossings, extent, historyAt, indexAt, indexOfLargest, type History } from './history';
export { placeLabels, spread, type Anchor, type Box, type Placed } from './labels';
export { layLayers, type LayerRow } from './layers';
export { areaPath, linePath } from './paths';
export { envelopeAt, faceFluxAt, fluxProfile, profileAt, runningEnvelope, type Envelope, type FluxProfile } from './profile';
export { clamp, linearScale, type Scale } from './scale';
export { seriesStyle, type SeriesStyle } from './series';
export { roundRange, roundStep, roundTo, valueTicks, type ValueTicks } from './ticks';
export { timeTicks, type TimeTick, type TimeTicks, type TimeUnit } from './timeTicks';
