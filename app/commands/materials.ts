import type { Curve, Latent, Material, Project, Reaction } from '../../solver/model';
import { valueAt } from '../../solver/model';
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

/** A property as a number, a table over temperature, or an expression of T. `text` says which for the undo list. */
export const setMaterialCurve = (material: Material, property: MaterialProperty, curve: Curve, text: string): Command => ({
  name: `${PROPERTY_NAMES[property]} of ${called(material, 'material')}: ${text}`,
  apply: (project) => {
    const index = indexOfId(project.materials, material.id);
    return index < 0 ? project : writeAt(project, ['materials', index, property], curve);
  },
});

/** The latent heats of a material; none drops them. */
export const setLatent = (material: Material, latent: Latent[]): Command => ({
  name: `Latent heat of ${called(material, 'material')}: ${latent.length === 0 ? 'none' : `${latent.length}`}`,
  apply: (project) => {
    const index = indexOfId(project.materials, material.id);
    return index < 0 ? project : writeAt(project, ['materials', index, 'latent'], latent.length === 0 ? undefined : latent);
  },
});

const LATENT_NAMES = { heat: 'Latent heat', from: 'Start of the change', to: 'End of the change' } as const;

/** One number of a latent heat: J/kg, or the temperature where the change begins or is complete. */
export const setLatentNumber = (material: Material, at: number, key: keyof Latent, entered: Entered): Command => ({
  name: `${LATENT_NAMES[key]} of ${called(material, 'material')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.materials, material.id);
    const there = project.materials[index]?.latent?.[at] !== undefined;
    return there ? enterAt(project, ['materials', index, 'latent', at, key], entered) : project;
  },
});

/** The reaction in a material; null: none. */
export const setReaction = (material: Material, reaction: Reaction | null): Command => ({
  name: `Reaction in ${called(material, 'material')}: ${reaction === null ? 'none' : reaction.kind}`,
  apply: (project) => {
    const index = indexOfId(project.materials, material.id);
    return index < 0 ? project : writeAt(project, ['materials', index, 'reaction'], reaction ?? undefined);
  },
});

/** One number of the reaction in a material, at a path inside it. */
export const setReactionNumber = (material: Material, path: readonly string[], name: string, entered: Entered): Command => ({
  name: `${name} of ${called(material, 'material')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.materials, material.id);
    const there = typeof valueAt(project, ['materials', index, 'reaction', ...path]) === 'number';
    return there ? enterAt(project, ['materials', index, 'reaction', ...path], entered) : project;
  },
});
