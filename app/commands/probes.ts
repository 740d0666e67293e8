import { partThickness, type Layer, type Place, type Probe, type Project } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { changeById, enterAt, indexOfId, insertAfter, moveItem, writeAt } from './edit';
import { freeName, newId } from './ids';

/** Depth of a place, m from the start face. */
export function depthOf(place: Place, layers: readonly Layer[]): number {
  const total = partThickness({ layers: [...layers] });
  if ('depth' in place) return place.depth;
  if ('face' in place) return place.face === 'start' ? 0 : total;
  const id = 'interface' in place ? place.interface : place.layer;
  if (id === undefined) return 'fraction' in place ? place.fraction * total : 0;
  let front = 0;
  for (const layer of layers) {
    if (layer.id === id) return front + ('fraction' in place ? place.fraction : 1) * layer.thickness;
    front += layer.thickness;
  }
  return Number.NaN;
}

/** After layers were removed or moved: probes whose place is gone keep the depth they had, inside the part. */
export function keepProbePlaces(before: Project, after: Project): Project {
  const { layers } = after.part;
  const known = new Set(layers.map((layer) => layer.id));
  const last = layers[layers.length - 1].id;
  const gone = (place: Place): boolean =>
    ('interface' in place && (!known.has(place.interface) || place.interface === last)) ||
    ('fraction' in place && place.layer !== undefined && !known.has(place.layer));
  const total = partThickness(after.part);
  const probes = after.probes.map((probe) =>
    gone(probe.at) ? { ...probe, at: { depth: Math.min(depthOf(probe.at, before.part.layers), total) } } : probe,
  );
  return probes.every((probe, index) => probe === after.probes[index]) ? after : { ...after, probes };
}

export const nextProbe = (project: Project, at: Place = { fraction: 0.5 }): Probe => ({
  id: newId('probe'),
  name: freeName(project.probes, `Probe ${project.probes.length + 1}`),
  at,
});

export const addProbe = (probe: Probe, after = Number.MAX_SAFE_INTEGER): Command => ({
  name: `Add probe ${called(probe, 'probe')}`,
  apply: (project) => ({ ...project, probes: insertAfter(project.probes, after, probe) }),
});

export const duplicateProbe = (project: Project, probe: Probe): Command => ({
  ...addProbe({ ...probe, id: newId('probe'), name: freeName(project.probes, probe.name) }, indexOfId(project.probes, probe.id)),
  name: `Duplicate probe ${called(probe, 'probe')}`,
});

/** Removes a probe, and with it the requirements that speak of it; the name says so. */
export function removeProbe(project: Project, probe: Probe): Command {
  const speaksOf = (requirement: Project['requirements'][number]): boolean =>
    'probe' in requirement.of && requirement.of.probe === probe.id;
  const lost = project.requirements.filter(speaksOf).length;
  const along = lost === 0 ? '' : ` and ${lost} ${lost === 1 ? 'requirement' : 'requirements'} on it`;
  return {
    name: `Remove probe ${called(probe, 'probe')}${along}`,
    apply: (now) => ({
      ...now,
      probes: now.probes.filter((item) => item.id !== probe.id),
      requirements: now.requirements.filter((item) => !speaksOf(item)),
    }),
  };
}

export const moveProbe = (probe: Probe, by: number): Command => ({
  name: `Move probe ${called(probe, 'probe')}`,
  apply: (project) => writeAt(project, ['probes'], moveItem(project.probes, indexOfId(project.probes, probe.id), by)),
});

export const renameProbe = (probe: Probe, name: string): Command => ({
  name: `Name of ${called(probe, 'probe')} to ${name}`,
  apply: (project) =>
    writeAt(
      project,
      ['probes'],
      changeById(project.probes, probe.id, (item) => ({ ...item, name })),
    ),
});

/** Puts a probe somewhere else; `text` says where for the undo list. */
export const setProbePlace = (probe: Probe, at: Place, text: string): Command => ({
  name: `Place of ${called(probe, 'probe')} to ${text}`,
  apply: (project) =>
    writeAt(
      project,
      ['probes'],
      changeById(project.probes, probe.id, (item) => ({ ...item, at })),
    ),
});

/** The depth or the fraction of a probe that is placed by one. */
export const setProbeNumber = (probe: Probe, key: 'depth' | 'fraction', entered: Entered): Command => ({
  name: `Place of ${called(probe, 'probe')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.probes, probe.id);
    if (index < 0 || !(key in project.probes[index].at)) return project;
    return enterAt(project, ['probes', index, 'at', key], entered);
  },
});
