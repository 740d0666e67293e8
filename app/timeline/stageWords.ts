/** What a stage does, in a few words for its band: "25 K/h to 550 °C", "8 h". */
import { rampDuration, type LaidStage, type Segment, type Stage } from '../../solver/model';
import { formatDuration, formatQuantity, type UnitSystem } from '../../solver/model/quantities';

/** Segments told before the rest is only counted. */
const TOLD = 2;

export function stageInWords(stage: Stage, laid: LaidStage, system: UnitSystem): string {
  const length = formatDuration(laid.end - laid.start);
  const segments = stage.setPoint?.segments ?? [];
  if (segments.length === 0) return length;
  const told = segments.slice(0, TOLD).map((segment) => segmentInWords(segment, system));
  if (segments.length > TOLD) return `${told[0]}, then ${segments.length - 1} more`;
  const rest = laid.end - laid.start - rampDuration(stage.setPoint ?? { segments: [] }, laid.setPoint.value[0]);
  if (segments.length < TOLD && 'after' in stage.end && rest > 1) told.push(formatDuration(rest));
  return told.join(', then ');
}

function segmentInWords(segment: Segment, system: UnitSystem): string {
  if ('hold' in segment) return formatDuration(segment.hold);
  const to = formatQuantity(segment.to, 'temperature', system, { significant: 4 }).text;
  if ('rate' in segment) return `${formatQuantity(segment.rate, 'temperatureRate', system, { significant: 3 }).text} to ${to}`;
  return segment.duration === 0 ? `at once to ${to}` : `to ${to} in ${formatDuration(segment.duration)}`;
}
