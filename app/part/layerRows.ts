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
  setContactKind,
  setGapNumber,
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
import type { Layer, Path, Project } from '../../solver/model';
import type { UnitSystem } from '../../solver/model/quantities';

export const layerColumns = (system: UnitSystem): readonly Column[] => [
  { head: '', width: '23%' },
  { head: 'Material' },
  { head: 'Thickness', width: '76px', align: 'right' },
  { head: 'Contact to next', width: system === 'SI' ? '112px' : '154px', align: 'right' },
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
    more: [
      { label: 'Edit its material…', act: () => editMaterial(layer.material) },
      ...contactActions(layer, index === layers.length - 1),
    ],
  }));
}

function layerCells(project: Project, layer: Layer, index: number): Cell[] {
  const path = ['part', 'layers', index];
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
    isLast ? { kind: 'shown', text: '' } : contactCell(project, layer, [...path, 'contact']),
    startCell(project, layer),
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

/** A resistance, or the width of an air gap; its emissivities are edited below the table. */
function contactCell(project: Project, layer: Layer, path: Path): Cell {
  const { contact } = layer;
  if (typeof contact === 'number') {
    return {
      kind: 'quantity',
      spec: { name: 'Contact resistance', quantity: 'contactResistance', bounds: { atLeast: 0 }, zero: 'bonded' },
      value: contact,
      typed: typedAt(project, path),
      path,
      edit: (entered) => setContact(layer, entered),
    };
  }
  return {
    kind: 'quantity',
    spec: { name: 'Gap', quantity: 'length', bounds: { above: 0 } },
    value: contact.gap,
    prefix: 'air gap',
    typed: typedAt(project, [...path, 'gap']),
    path: [...path, 'gap'],
    edit: (entered) => setGapNumber(layer, 'gap', entered),
  };
}

/** A gap of a millimetre between dull walls, to begin with. */
const GAP = { gap: 0.001, emissivities: [0.8, 0.8] as [number, number] };

function contactActions(layer: Layer, isLast: boolean): NonNullable<Row['more']> {
  if (isLast) return [];
  return typeof layer.contact === 'number'
    ? [{ label: 'Air gap to the next layer', command: () => setContactKind(layer, { ...GAP }) }]
    : [{ label: 'Contact resistance instead of the gap', command: () => setContactKind(layer, 0) }];
}

function startCell(project: Project, layer: Layer): Cell {
  const { initial } = project;
  const path = startTemperaturePath(initial, layer.id);
  if ('profile' in initial) return { kind: 'shown', text: 'profile', muted: true, path };
  if ('steady' in initial) return { kind: 'shown', text: 'steady', muted: true, path };
  return {
    kind: 'quantity',
    spec: { name: 'Start temperature', quantity: 'temperature' },
    value: startTemperature(initial, layer.id),
    typed: typedAt(project, path),
    path,
    edit: (entered) => setStartTemperature(layer, entered),
  };
}
