/** Rows of the materials table: properties, constant or over temperature, and where they come from. */
import {
  addMaterial,
  blankMaterial,
  duplicateMaterial,
  isMaterialUsed,
  removeMaterial,
  renameMaterial,
  setMaterialCurve,
  setMaterialProperty,
  setMaterialSource,
  typedAt,
  type MaterialProperty,
} from '../commands';
import { curveInWords, expressionRefusal, tintOf, type Cell, type Column, type QuantitySpec, type Row } from '../ui';
import type { Material, Path, Project } from '../../solver/model';
import type { UnitSystem } from '../../solver/model/quantities';

export const materialColumns = (system: UnitSystem): readonly Column[] => [
  { head: '' },
  { head: 'Conductivity', width: system === 'SI' ? '92px' : '132px', align: 'right' },
  { head: 'Density', width: '90px', align: 'right' },
  { head: 'Heat capacity', width: system === 'SI' ? '94px' : '116px', align: 'right' },
  { head: 'Source', width: '19%' },
];

export const PROPERTIES: readonly (QuantitySpec & { quantity: MaterialProperty })[] = [
  { name: 'Conductivity', quantity: 'conductivity', bounds: { above: 0 } },
  { name: 'Density', quantity: 'density', bounds: { above: 0 } },
  { name: 'Heat capacity', quantity: 'heatCapacity', bounds: { above: 0 } },
];

export const materialRows = (project: Project, system: UnitSystem): Row[] =>
  project.materials.map((material, index) => ({
    id: material.id,
    label: material.name || `material ${index + 1}`,
    cells: materialCells(project, material, index, system),
    insert: () => addMaterial(blankMaterial(project)),
    duplicate: () => duplicateMaterial(project, material),
    remove: isMaterialUsed(project, material.id) ? null : () => removeMaterial(material),
    removeRefusal: 'A layer is made of it',
  }));

function materialCells(project: Project, material: Material, index: number, system: UnitSystem): Cell[] {
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
    ...PROPERTIES.map((spec) => propertyCell(project, material, [...path, spec.quantity], spec, system)),
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

/** A number or an expression of T is edited in its cell; a table is shown in words and edited below. */
function propertyCell(
  project: Project,
  material: Material,
  path: Path,
  spec: (typeof PROPERTIES)[number],
  system: UnitSystem,
): Cell {
  const curve = material[spec.quantity];
  if (typeof curve === 'number') {
    return {
      kind: 'quantity',
      spec,
      value: curve,
      typed: typedAt(project, path),
      path,
      edit: (entered) => setMaterialProperty(material, spec.quantity, entered),
    };
  }
  if ('table' in curve) return { kind: 'shown', text: curveInWords(curve, system), path };
  return {
    kind: 'text',
    text: curve.expression,
    path,
    refuse: (text) => expressionRefusal(text, ['T']),
    edit: (expression) => setMaterialCurve(material, spec.quantity, { expression }, expression),
  };
}
