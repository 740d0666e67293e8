/** Rows of the materials table: constant properties and where they come from. */
import {
  addMaterial,
  blankMaterial,
  duplicateMaterial,
  isMaterialUsed,
  removeMaterial,
  renameMaterial,
  setMaterialProperty,
  setMaterialSource,
  typedAt,
  type MaterialProperty,
} from '../commands';
import { tintOf, type Cell, type Column, type QuantitySpec, type Row } from '../ui';
import type { Material, Project } from '../../solver/model';

export const MATERIAL_COLUMNS: readonly Column[] = [
  { head: '' },
  { head: 'Conductivity', width: '19%', align: 'right' },
  { head: 'Density', width: '16%', align: 'right' },
  { head: 'Heat capacity', width: '19%', align: 'right' },
  { head: 'Source', width: '19%' },
];

const SPECS: readonly (QuantitySpec & { quantity: MaterialProperty })[] = [
  { name: 'Conductivity', quantity: 'conductivity', bounds: { above: 0 } },
  { name: 'Density', quantity: 'density', bounds: { above: 0 } },
  { name: 'Heat capacity', quantity: 'heatCapacity', bounds: { above: 0 } },
];

export const materialRows = (project: Project): Row[] =>
  project.materials.map((material, index) => ({
    id: material.id,
    label: material.name || `material ${index + 1}`,
    cells: materialCells(project, material, index),
    insert: () => addMaterial(blankMaterial(project)),
    duplicate: () => duplicateMaterial(project, material),
    remove: isMaterialUsed(project, material.id) ? null : () => removeMaterial(material),
    removeRefusal: 'A layer is made of it',
  }));

function materialCells(project: Project, material: Material, index: number): Cell[] {
  const path = ['materials', index];
  return [
    {
      kind: 'text',
      text: material.name,
      placeholder: 'unnamed material',
      swatch: tintOf(project, material.id),
      path: [...path, 'name'],
      edit: (name) => renameMaterial(material, name),
    },
    ...SPECS.map((spec): Cell => ({
      kind: 'quantity',
      spec,
      value: material[spec.quantity],
      typed: typedAt(project, [...path, spec.quantity]),
      path: [...path, spec.quantity],
      edit: (entered) => setMaterialProperty(material, spec.quantity, entered),
    })),
    {
      kind: 'text',
      text: material.source ?? '',
      placeholder: 'no source yet',
      path: [...path, 'source'],
      refuse: (text) => (text.length > 500 ? 'A source has at most 500 characters.' : null),
      edit: (source) => setMaterialSource(material, source),
    },
  ];
}
