/** Rows of the part table: a layer each. */
import {
  addLayer,
  addMaterial,
  blankMaterial,
  duplicateLayer,
  moveLayer,
  nextLayer,
  removeLayer,
  renameLayer,
  setContact,
  setLayerMaterial,
  setStartTemperature,
  setThickness,
  startTemperature,
  startTemperaturePath,
  together,
  typedAt,
  type Command,
} from '../commands';
import { tintOf, type Cell, type Column, type Row } from '../ui';
import type { Layer, Project } from '../../solver/model';
import type { UnitSystem } from '../../solver/model/quantities';

export const layerColumns = (system: UnitSystem): readonly Column[] => [
  { head: '', width: '23%' },
  { head: 'Material' },
  { head: 'Thickness', width: '76px', align: 'right' },
  { head: 'Contact to next', width: system === 'SI' ? '112px' : '138px', align: 'right' },
  { head: 'Start', width: '62px', align: 'right' },
];

/** The choice that makes a material instead of taking one. */
const NEW_MATERIAL = 'new material';

export function layerRows(project: Project, editMaterial: (id: string) => void): Row[] {
  const { layers } = project.part;
  return layers.map((layer, index) => ({
    id: layer.id,
    label: layer.name || `layer ${index + 1}`,
    cells: layerCells(project, layer, index),
    insert: () => addLayer(nextLayer(project, index), index),
    duplicate: () => duplicateLayer(project, layer),
    move: (by) => moveLayer(layer, by),
    remove: layers.length === 1 ? null : () => removeLayer(layer),
    removeRefusal: 'A part keeps at least one layer',
    more: [{ label: 'Edit its material…', act: () => editMaterial(layer.material) }],
  }));
}

function layerCells(project: Project, layer: Layer, index: number): Cell[] {
  const path = ['part', 'layers', index];
  const startPath = startTemperaturePath(project.initial, layer.id);
  const isLast = index === project.part.layers.length - 1;
  return [
    {
      kind: 'text',
      text: layer.name,
      placeholder: `Layer ${index + 1}`,
      swatch: tintOf(project, layer.material),
      path: [...path, 'name'],
      edit: (name) => renameLayer(layer, name),
    },
    {
      kind: 'choice',
      value: layer.material,
      path: [...path, 'material'],
      options: [
        ...project.materials.map((material) => ({ value: material.id, label: material.name || 'unnamed material' })),
        { value: NEW_MATERIAL, label: 'New material…' },
      ],
      edit: (id) => chooseMaterial(project, layer, id),
    },
    {
      kind: 'quantity',
      spec: { name: 'Thickness', quantity: 'length', bounds: { above: 0 } },
      value: layer.thickness,
      typed: typedAt(project, [...path, 'thickness']),
      path: [...path, 'thickness'],
      edit: (entered) => setThickness(layer, entered),
    },
    isLast
      ? { kind: 'shown', text: '' }
      : {
          kind: 'quantity',
          spec: { name: 'Contact resistance', quantity: 'contactResistance', bounds: { atLeast: 0 }, zero: 'bonded' },
          value: layer.contact,
          typed: typedAt(project, [...path, 'contact']),
          path: [...path, 'contact'],
          edit: (entered) => setContact(layer, entered),
        },
    {
      kind: 'quantity',
      spec: { name: 'Start temperature', quantity: 'temperature' },
      value: startTemperature(project.initial, layer.id),
      typed: typedAt(project, startPath),
      path: startPath,
      edit: (entered) => setStartTemperature(layer, entered),
    },
  ];
}

function chooseMaterial(project: Project, layer: Layer, id: string): Command | null {
  if (id === NEW_MATERIAL) {
    const material = blankMaterial(project);
    return together(`New material for ${layer.name || 'layer'}`, [addMaterial(material), setLayerMaterial(layer, material)]);
  }
  const material = project.materials.find((item) => item.id === id);
  return material === undefined ? null : setLayerMaterial(layer, material);
}
