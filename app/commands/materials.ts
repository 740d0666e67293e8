import type { Material, Project } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { changeById, enterAt, indexOfId, writeAt } from './edit';
import { freeName, newId } from './ids';

export type MaterialProperty = 'conductivity' | 'density' | 'heatCapacity';
const PROPERTY_NAMES: Record<MaterialProperty, string> = {
  conductivity: 'Conductivity',
  density: 'Density',
  heatCapacity: 'Heat capacity',
};

/** A material to start from: numbers to be replaced from a data sheet. */
export const blankMaterial = (project: Project): Material => ({
  id: newId('material'),
  name: freeName(project.materials, 'New material'),
  conductivity: 1,
  density: 2000,
  heatCapacity: 1000,
  source: '',
});

export const addMaterial = (material: Material): Command => ({
  name: `Add material ${called(material, 'material')}`,
  apply: (project) => ({ ...project, materials: [...project.materials, material] }),
});

export const isMaterialUsed = (project: Project, id: string): boolean =>
  project.part.layers.some((layer) => layer.material === id);

/** Removes a material that no layer is made of; one in use stays. */
export const removeMaterial = (material: Material): Command => ({
  name: `Remove material ${called(material, 'material')}`,
  apply: (project) =>
    isMaterialUsed(project, material.id)
      ? project
      : { ...project, materials: project.materials.filter((item) => item.id !== material.id) },
});

export const duplicateMaterial = (project: Project, material: Material): Command =>
  addMaterial({ ...material, id: newId('material'), name: freeName(project.materials, material.name) });

export const renameMaterial = (material: Material, name: string): Command => ({
  name: `Name of ${called(material, 'material')} to ${name}`,
  apply: (project) =>
    writeAt(
      project,
      ['materials'],
      changeById(project.materials, material.id, (item) => ({ ...item, name })),
    ),
});

export const setMaterialSource = (material: Material, source: string): Command => ({
  name: `Source of ${called(material, 'material')}`,
  apply: (project) =>
    writeAt(
      project,
      ['materials'],
      changeById(project.materials, material.id, (item) => ({ ...item, source })),
    ),
});

export const setMaterialProperty = (material: Material, property: MaterialProperty, entered: Entered): Command => ({
  name: `${PROPERTY_NAMES[property]} of ${called(material, 'material')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.materials, material.id);
    return index < 0 ? project : enterAt(project, ['materials', index, property], entered);
  },
});
