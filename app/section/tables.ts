/** The section in words and figures. */
import type { Frames, Project } from '../../solver/model';
import { displayUnit, formatDuration, toDisplay, type UnitSystem } from '../../solver/model/quantities';
import { envelopeAt, faceFluxAt, profileAt, runningEnvelope, type DataTable } from '../draw';
import { orKind, temperatureInWords } from '../ui';

/** "Temperature through the part at 38 h 40 min: Hot face 420 °C, Shell 60 °C." */
export function sectionSentence(plan: Project | null, frames: Frames | null, time: number, system: UnitSystem): string {
  if (plan === null) return 'Nothing to draw yet.';
  const layers = plan.part.layers.map(({ name }, index) => orKind(name, `layer ${index + 1}`)).join(', ');
  if (frames === null) return `Section through ${layers}. No answer yet.`;
  const profile = profileAt(frames, time);
  const { start, end } = plan.part.faces;
  const face = (name: string, kind: string, value: number): string =>
    `${orKind(name, kind)} ${temperatureInWords(value, system)}`;
  const faces = [face(start.name, 'start face', profile[0]), face(end.name, 'end face', profile[profile.length - 1])];
  return `Section through ${layers}. Temperature at ${formatDuration(time)}: ${faces.join(', ')}.`;
}

/**
 * The profile at a time, with the lowest and highest so far and the fluxes through the faces: at all points, or only at the
 * edges of the layers.
 */
export function sectionTable(
  plan: Project | null,
  frames: Frames | null,
  time: number,
  system: UnitSystem,
  edgesOnly = false,
): DataTable {
  const temperature = displayUnit('temperature', system);
  const columns = [
    'Layer',
    `Depth, ${displayUnit('length', system)}`,
    `Temperature, ${temperature}`,
    `Lowest so far, ${temperature}`,
    `Highest so far, ${temperature}`,
    `Flux into the part, ${displayUnit('heatFlux', system)}`,
  ];
  const caption = `Profile at ${formatDuration(time)}`;
  if (plan === null || frames === null) return { caption, columns, rows: [] };
  const profile = profileAt(frames, time);
  const { low, high } = envelopeAt(frames, runningEnvelope(frames), time, profile);
  const flux = faceFluxAt(frames, time);
  const last = profile.length - 1;
  let layer = 0;
  const rows = Array.from(profile, (value, i) => {
    while (layer + 2 < frames.layerStart.length && i >= frames.layerStart[layer + 1]) layer++;
    const degrees = (stored: number): number => toDisplay(stored, 'temperature', system);
    const through = i === 0 ? flux[0] : i === last ? flux[1] : null;
    return [
      orKind(plan.part.layers[layer]?.name, `layer ${layer + 1}`),
      toDisplay(frames.position_m[i], 'length', system),
      degrees(value),
      degrees(low[i]),
      degrees(high[i]),
      through === null ? null : toDisplay(through, 'heatFlux', system),
    ];
  });
  const starts = new Set(frames.layerStart);
  const isEdge = (_: unknown, i: number): boolean => starts.has(i) || starts.has(i + 1);
  return { caption, columns, rows: edgesOnly ? rows.filter(isEdge) : rows };
}
