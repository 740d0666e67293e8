import { constantCurves, type ThermalCurves } from '../materials';
import type { Project } from '../model';

/** A layer of a plane wall as conduction sees it. */
export interface WallLayer {
  readonly name: string;
  /** m */
  readonly thickness: number;
  readonly curves: ThermalCurves;
  /** Temperature at the start, °C. */
  readonly initial: number;
  /** Resistance to the next layer, m²·K/W; 0 where they are bonded, and on the last layer. */
  readonly contact: number;
}

/** The layers of a checked plan. Throws RangeError where crossCheck would have found a problem. */
export function wallLayers(project: Pick<Project, 'part' | 'materials' | 'initial'>): WallLayer[] {
  const { layers } = project.part;
  return layers.map((layer, index) => {
    const material = project.materials.find((candidate) => candidate.id === layer.material);
    if (material === undefined) throw new RangeError(`layer ${layer.id} is of no material of the plan`);
    const initial = initialTemperature(project.initial, layer.id);
    return {
      name: layer.name === '' ? `Layer ${index + 1}` : layer.name,
      thickness: layer.thickness,
      curves: constantCurves(material, initial),
      initial,
      contact: index < layers.length - 1 ? layer.contact : 0,
    };
  });
}

function initialTemperature(initial: Project['initial'], layer: string): number {
  if ('temperature' in initial) return initial.temperature;
  const entry = initial.layers.find((candidate) => candidate.layer === layer);
  if (entry === undefined) throw new RangeError(`layer ${layer} has no initial temperature`);
  return entry.temperature;
}
