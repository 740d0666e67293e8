/** A place of the plan as a person knows it: "Thickness of Shell" rather than "part.layers[2].thickness". */
import { placeOf, valueAt, type Path, type Project } from '../../solver/model';

const FIELDS: Record<string, string> = {
  name: 'Name',
  material: 'Material',
  thickness: 'Thickness',
  contact: 'Contact',
  conductivity: 'Conductivity',
  density: 'Density',
  heatCapacity: 'Heat capacity',
  source: 'Source',
  depth: 'Depth',
  fraction: 'Fraction',
  interface: 'Interface',
  layer: 'Layer',
  end: 'End',
  after: 'Length',
  start: 'Start',
  to: 'Target',
  rate: 'Rate',
  duration: 'Duration',
  hold: 'Hold',
  limit: 'Limit',
  probe: 'Probe',
  stage: 'Stage',
  from: 'Stage counted from',
  time: 'Time',
  temperature: 'Temperature',
  surroundings: 'Surroundings',
  coefficient: 'Film coefficient',
  flux: 'Heat flux',
  radiation: 'Radiation',
  emissivity: 'Emissivity',
  enclosure: 'Enclosure',
  velocity: 'Velocity',
  length: 'Length of the correlation',
  innerRadius: 'Inner radius',
  gap: 'Gap',
  emissivities: 'Emissivities of the gap',
  latent: 'Latent heat',
  reaction: 'Reaction',
  sources: 'Heat source',
  power: 'Heat source',
  profile: 'Profile at the start',
  steady: 'Steady state at the start',
  step: 'Step of the solver',
  accuracy: 'Accuracy of the solver',
  grid: 'Grid of the solver',
  nodes: 'Nodes of the grid',
  cells: 'Cells of the grid',
  dampedSteps: 'Damped steps',
  layers: 'Layers',
  title: 'Title',
};

export function fieldWords(path: Path, project: Project): string {
  const keys = path.filter((key): key is string => typeof key === 'string');
  const field = [...keys].reverse().find((key) => key in FIELDS);
  const owner = ownerOf(path, project);
  if (field === undefined) return owner ?? placeOf(path);
  return owner === null ? FIELDS[field] : `${FIELDS[field]} of ${owner}`;
}

/** The named item that a place lies in. */
function ownerOf(path: Path, project: Project): string | null {
  for (let length = path.length; length > 0; length--) {
    const item = valueAt(project, path.slice(0, length));
    if (typeof item !== 'object' || item === null || !('name' in item) || typeof item.name !== 'string') continue;
    if (path.length > length || item.name === '') return item.name === '' ? placeOf(path.slice(0, length)) : item.name;
  }
  return null;
}
