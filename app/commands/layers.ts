import { MAX_LAYERS, type Contact, type FaceId, type Layer, type Project } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { changeById, enterAt, indexOfId, insertAfter, moveItem, writeAt } from './edit';
import { freeName, newId } from './ids';
import { keepProbePlaces } from './probes';
import { withoutSource } from './sources';

/** A layer like the one before it, to be changed. */
export function nextLayer(project: Project, after: number): Layer {
  const { layers } = project.part;
  const before = layers[after] ?? layers[layers.length - 1];
  return {
    id: newId('layer'),
    name: freeName(layers, `Layer ${layers.length + 1}`),
    material: before.material,
    thickness: before.thickness,
    contact: 0,
  };
}

/** Adds a layer after the one at `after` (−1: first); its start temperature is that of its neighbour. */
export const addLayer = (layer: Layer, after: number): Command => ({
  name: `Add layer ${called(layer, 'layer')}`,
  apply: (project) => (project.part.layers.length >= MAX_LAYERS ? project : insertLayer(project, layer, after)),
});

export const duplicateLayer = (project: Project, layer: Layer): Command => ({
  ...addLayer(
    { ...layer, id: newId('layer'), name: freeName(project.part.layers, layer.name) },
    indexOfId(project.part.layers, layer.id),
  ),
  name: `Duplicate layer ${called(layer, 'layer')}`,
});

function insertLayer(project: Project, layer: Layer, after: number): Project {
  const layers = insertAfter(project.part.layers, after, layer);
  const { initial } = project;
  if (!('layers' in initial)) return writeAt(project, ['part', 'layers'], layers);
  const neighbour = project.part.layers[Math.max(after, 0)];
  const temperature = initial.layers.find((entry) => entry.layer === neighbour.id)?.temperature ?? 20;
  return {
    ...project,
    part: { ...project.part, layers },
    initial: { layers: [...initial.layers, { layer: layer.id, temperature }] },
  };
}

/** Removes a layer and the heat sources in it; the last layer stays. Probes that were tied to it keep their depth. */
export const removeLayer = (layer: Layer): Command => ({
  name: `Remove layer ${called(layer, 'layer')}`,
  apply: (project) => {
    const layers = project.part.layers.filter((item) => item.id !== layer.id);
    if (layers.length === 0 || layers.length === project.part.layers.length) return project;
    const { initial } = project;
    return keepProbePlaces(project, {
      ...project,
      part: { ...project.part, layers },
      cycle: { ...project.cycle, stages: project.cycle.stages.map((stage) => withoutSource(stage, layer.id)) },
      initial: 'layers' in initial ? { layers: initial.layers.filter((entry) => entry.layer !== layer.id) } : initial,
    });
  },
});

export const moveLayer = (layer: Layer, by: number): Command => ({
  name: `Move layer ${called(layer, 'layer')}`,
  apply: (project) => {
    const layers = moveItem(project.part.layers, indexOfId(project.part.layers, layer.id), by);
    return layers === project.part.layers ? project : keepProbePlaces(project, writeAt(project, ['part', 'layers'], layers));
  },
});

export const renameLayer = (layer: Layer, name: string): Command => ({
  name: `Name of ${called(layer, 'layer')} to ${name}`,
  apply: (project) =>
    writeAt(
      project,
      ['part', 'layers'],
      changeById(project.part.layers, layer.id, (item) => ({ ...item, name })),
    ),
});

export const setLayerMaterial = (layer: Layer, material: { id: string; name: string }): Command => ({
  name: `Material of ${called(layer, 'layer')} to ${called(material, 'material')}`,
  apply: (project) =>
    writeAt(
      project,
      ['part', 'layers'],
      changeById(project.part.layers, layer.id, (item) => ({ ...item, material: material.id })),
    ),
});

export const setThickness = (layer: Layer, entered: Entered): Command => ({
  name: `Thickness of ${called(layer, 'layer')} to ${entered.text}`,
  apply: (project) => enterLayer(project, layer, 'thickness', entered),
});

/** Resistance between this layer and the next; 0 is bonded. */
export const setContact = (layer: Layer, entered: Entered): Command => ({
  name: `Contact after ${called(layer, 'layer')} to ${entered.value === 0 ? 'bonded' : entered.text}`,
  apply: (project) => enterLayer(project, layer, 'contact', entered),
});

/** Between this layer and the next: a resistance, or a gap of still air whose walls radiate. */
export const setContactKind = (layer: Layer, contact: Contact): Command => ({
  name: `Contact after ${called(layer, 'layer')}: ${typeof contact === 'number' ? 'a resistance' : 'an air gap'}`,
  apply: (project) => {
    const index = indexOfId(project.part.layers, layer.id);
    const isSame = index < 0 || typeof project.part.layers[index].contact === typeof contact;
    return isSame ? project : writeAt(project, ['part', 'layers', index, 'contact'], contact);
  },
});

/** Width of the gap after a layer, or the emissivity of one of its walls (0: of this layer, 1: of the next). */
export const setGapNumber = (layer: Layer, which: 'gap' | 0 | 1, entered: Entered): Command => ({
  name: `${which === 'gap' ? 'Gap' : 'Emissivity at the gap'} after ${called(layer, 'layer')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.part.layers, layer.id);
    if (index < 0 || typeof project.part.layers[index].contact === 'number') return project;
    const inner = which === 'gap' ? ['gap'] : ['emissivities', which];
    return enterAt(project, ['part', 'layers', index, 'contact', ...inner], entered);
  },
});

function enterLayer(project: Project, layer: Layer, key: 'thickness' | 'contact', entered: Entered): Project {
  const index = indexOfId(project.part.layers, layer.id);
  return index < 0 ? project : enterAt(project, ['part', 'layers', index, key], entered);
}

export const renameFace = (face: FaceId, before: string, name: string): Command => ({
  name: `Name of ${before.trim() || `the ${face} face`} to ${name}`,
  apply: (project) => writeAt(project, ['part', 'faces', face, 'name'], name),
});
