/** Doors of drawing: arrays to arrays, no framework, no canvas. */
export { courseLine } from './courseLine';
export { piecesBeyond } from './beyond';
export { cividis, colourOf, difference, gradientOf, paintRow, type ColourMap } from './colours';
export { decimate, type Points } from './decimate';
export { placeLetters, type LetterPlace } from './curveLetters';
export { tabSeparated, type DataTable } from './dataTable';
export { crossings, extent, historyAt, indexAt, indexOfLargest, type History } from './history';
export { placeLabels, spread, type Anchor, type Box, type Placed } from './labels';
export { layLayers, type LayerRow } from './layers';
export { boxOf, placeLineLabel, placePeakLabel, textWidth, type DrawnCurves, type TextPlace } from './textPlaces';
export { areaPath, linePath } from './paths';
export { envelopeAt, faceFluxAt, fluxProfile, profileAt, runningEnvelope, type Envelope, type FluxProfile } from './profile';
export { clamp, linearScale, type Scale } from './scale';
export { seriesStyle, type SeriesStyle } from './series';
export { roundRange, roundStep, roundTo, valueTicks, type ValueTicks } from './ticks';
export { timeStep, timeTicks, type TimeTick, type TimeTicks, type TimeUnit } from './timeTicks';
export { timeInWords } from './timeWords';
export { valueAxis, type ValueAxis, type ValueTick } from './valueAxis';
