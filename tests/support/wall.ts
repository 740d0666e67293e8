/** Plans for tests, in the words of the trade: `wall({ layers, initial, stages, settings })`. */
import type { Exposure, Project, Segment, Settings } from '../../solver/model';
import { newProject } from '../../solver/model';

/** A layer of one material; `contact` is the resistance to the next layer, m²·K/W. */
export interface LayerSpec {
  thickness: number;
  conductivity: number;
  density: number;
  heatCapacity: number;
  contact?: number;
}

export interface StageSpec {
  /** Length of the stage, s. */
  lasts: number;
  /** What the faces meet; insulated if not given. */
  start?: Exposure;
  end?: Exposure;
}

export interface WallSpec {
  layers: LayerSpec[];
  /** °C: of the whole wall, or one a layer. */
  initial: number | number[];
  stages: StageSpec[];
  settings?: Partial<Settings>;
}

export const insulated: Exposure = { kind: 'insulated' };
export const held = (temperature: number): Exposure => ({ kind: 'temperature', temperature });
export const flux = (flux: number): Exposure => ({ kind: 'flux', flux });
export const film = (coefficient: number, surroundings: number): Exposure => ({ kind: 'film', coefficient, surroundings });

/** A course through straight pieces, from `start` at the beginning of the stage. */
export const course = (start: number, segments: Segment[]) => ({ start, segments });

/** A wall under its stages, ready to be solved. */
export function wall({ layers, initial, stages, settings }: WallSpec): Project {
  const plan = newProject();
  return {
    ...plan,
    materials: layers.map(({ conductivity, density, heatCapacity }, i) => ({
      id: `m${i}`,
      name: `Material ${i}`,
      conductivity,
      density,
      heatCapacity,
    })),
    part: {
      ...plan.part,
      layers: layers.map(({ thickness, contact }, i) => ({
        id: `l${i}`,
        name: `Layer ${i}`,
        material: `m${i}`,
        thickness,
        contact: contact ?? 0,
      })),
    },
    initial:
      typeof initial === 'number'
        ? { temperature: initial }
        : { layers: initial.map((temperature, i) => ({ layer: `l${i}`, temperature })) },
    cycle: {
      setPoint: { name: 'Set-point', start: 20 },
      stages: stages.map(({ lasts, start, end }, i) => ({
        id: `s${i}`,
        name: `Stage ${i}`,
        end: { after: lasts },
        exposures: { start: start ?? insulated, end: end ?? insulated },
      })),
    },
    probes: [],
    requirements: [],
    settings: { ...plan.settings, ...settings },
  };
}
