/** Rows of the probes table: a name, the kind of place, and the place itself. */
import {
  addProbe,
  depthOf,
  duplicateProbe,
  faceKind,
  moveProbe,
  nextProbe,
  removeProbe,
  renameProbe,
  setProbeNumber,
  setProbePlace,
  typedAt,
} from '../commands';
import { depthInWords, orKind, placeInWords, type Cell, type Column, type Row } from '../ui';
import { partThickness, type Place, type Probe, type Project } from '../../solver/model';
import type { UnitSystem } from '../../solver/model/quantities';

export const PROBE_COLUMNS: readonly Column[] = [
  { head: '' },
  { head: 'Placed', width: '19%' },
  { head: 'Where', width: '36%' },
  { head: 'Place', width: '14%', align: 'right' },
];

type PlaceKind = 'depth' | 'part' | 'layer' | 'face' | 'interface';
const PLACE_KINDS: readonly { value: PlaceKind; label: string }[] = [
  { value: 'face', label: 'at a face' },
  { value: 'depth', label: 'at a depth' },
  { value: 'part', label: 'in the part' },
  { value: 'layer', label: 'in a layer' },
  { value: 'interface', label: 'at an interface' },
];

export function placeKind(at: Place): PlaceKind {
  if ('depth' in at) return 'depth';
  if ('face' in at) return 'face';
  if ('interface' in at) return 'interface';
  return at.layer === undefined ? 'part' : 'layer';
}

/** The same spot, or the nearest one, said in another way. */
export function placeOfKind(kind: PlaceKind, at: Place, project: Project): Place | null {
  const { layers } = project.part;
  const total = partThickness(project.part);
  const depth = Math.min(depthOf(at, layers) || 0, total);
  const tidy = (number: number): number => Number(number.toPrecision(6));
  if (kind === 'depth') return { depth: tidy(depth) };
  if (kind === 'part') return { fraction: tidy(depth / total) };
  if (kind === 'face') return { face: depth < total / 2 ? 'start' : 'end' };
  const edges = layers.map((layer) => depthOf({ layer: layer.id, fraction: 1 }, layers));
  if (kind === 'layer') {
    const index = Math.max(
      0,
      edges.findIndex((edge) => depth <= edge * (1 + 1e-9)),
    );
    const front = index === 0 ? 0 : edges[index - 1];
    return { layer: layers[index].id, fraction: tidy(Math.min(1, (depth - front) / layers[index].thickness)) };
  }
  if (layers.length < 2) return null;
  const inner = edges.slice(0, -1);
  const near = inner.reduce((best, edge, index) => (Math.abs(edge - depth) < Math.abs(inner[best] - depth) ? index : best), 0);
  return { interface: layers[near].id, side: 'before' };
}

export const probeRows = (project: Project, system: UnitSystem): Row[] =>
  project.probes.map((probe, index) => ({
    id: probe.id,
    label: probe.name || `probe ${index + 1}`,
    cells: probeCells(project, probe, index, system),
    insert: () => addProbe(nextProbe(project), index),
    duplicate: () => duplicateProbe(project, probe),
    move: (by) => moveProbe(probe, by),
    remove: () => removeProbe(project, probe),
  }));

function probeCells(project: Project, probe: Probe, index: number, system: UnitSystem): Cell[] {
  const place = (at: Place) => setProbePlace(probe, at, placeInWords(at, project, system));
  return [
    {
      kind: 'text',
      text: probe.name,
      placeholder: `Probe ${index + 1}`,
      path: ['probes', index, 'name'],
      edit: (name) => renameProbe(probe, name),
    },
    {
      kind: 'choice',
      value: placeKind(probe.at),
      options: PLACE_KINDS.filter(({ value }) => value !== 'interface' || project.part.layers.length > 1),
      edit: (kind) => {
        const at = placeOfKind(kind as PlaceKind, probe.at, project);
        return at === null ? null : place(at);
      },
    },
    whereCell(project, probe, index, place),
    numberCell(project, probe, index, system),
  ];
}

/** Which face, layer or side of an interface; nothing to choose for a depth. */
function whereCell(project: Project, probe: Probe, index: number, place: (at: Place) => ReturnType<typeof setProbePlace>): Cell {
  const { at } = probe;
  const { layers, faces } = project.part;
  const path = ['probes', index, 'at'];
  if ('face' in at) {
    const options = [
      { value: 'start', label: orKind(faces.start.name, faceKind(project.part, 'start')) },
      { value: 'end', label: orKind(faces.end.name, faceKind(project.part, 'end')) },
    ];
    return {
      kind: 'choice',
      value: at.face,
      options,
      path: [...path, 'face'],
      edit: (face) => place({ face: face as 'start' | 'end' }),
    };
  }
  if ('interface' in at) {
    const options = layers.slice(0, -1).flatMap((layer, i) => {
      const [before, after] = [orKind(layer.name, `layer ${i + 1}`), orKind(layers[i + 1].name, `layer ${i + 2}`)];
      return [
        { value: `before ${layer.id}`, label: `in ${before}, at ${after}` },
        { value: `after ${layer.id}`, label: `in ${after}, at ${before}` },
      ];
    });
    return {
      kind: 'choice',
      value: `${at.side} ${at.interface}`,
      options,
      path: [...path, 'interface'],
      edit: (value) => {
        const [side, ...id] = value.split(' ');
        return place({ interface: id.join(' '), side: side as 'before' | 'after' });
      },
    };
  }
  if ('fraction' in at && at.layer !== undefined) {
    const options = layers.map((layer, i) => ({ value: layer.id, label: orKind(layer.name, `layer ${i + 1}`) }));
    return {
      kind: 'choice',
      value: at.layer,
      options,
      path: [...path, 'layer'],
      edit: (layer) => place({ layer, fraction: at.fraction }),
    };
  }
  return { kind: 'shown', text: `from ${orKind(faces.start.name, `the ${faceKind(project.part, 'start')}`)}`, muted: true };
}

function numberCell(project: Project, probe: Probe, index: number, system: UnitSystem): Cell {
  const { at } = probe;
  const path = ['probes', index, 'at'];
  if ('depth' in at) {
    return {
      kind: 'quantity',
      spec: { name: 'Depth', quantity: 'length', bounds: { atLeast: 0, atMost: partThickness(project.part) * (1 + 1e-9) } },
      value: at.depth,
      typed: typedAt(project, [...path, 'depth']),
      path: [...path, 'depth'],
      edit: (entered) => setProbeNumber(probe, 'depth', entered),
    };
  }
  if ('fraction' in at) {
    return {
      kind: 'quantity',
      spec: { name: 'Part of the way', quantity: 'fraction', bounds: { atLeast: 0, atMost: 1 } },
      value: at.fraction,
      typed: typedAt(project, [...path, 'fraction']),
      path: [...path, 'fraction'],
      edit: (entered) => setProbeNumber(probe, 'fraction', entered),
    };
  }
  return { kind: 'shown', text: depthInWords(depthOf(at, project.part.layers), system), muted: true };
}
