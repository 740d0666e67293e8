/** Plans for tests, in the words of the trade: `wall({ layers, initial, stages, settings })`. */
import type { Contact, Curve, Exposure, Latent, Part, Project, Reaction, Segment, Settings, Source } from '../../solver/model';
import { newProject } from '../../solver/model';

/** A layer of one material; `contact` is what lies between it and the next. */
export interface LayerSpec {
  thickness: number;
  conductivity: Curve;
  density: Curve;
  heatCapacity: Curve;
  latent?: Latent[];
  reaction?: Reaction;
  contact?: Contact;
}

export interface StageSpec {
  /** Length of the stage, s. */
  lasts: number;
  /** What the faces meet; insulated if not given. */
  start?: Exposure;
  end?: Exposure;
  sources?: Source[];
}

export interface WallSpec {
  /** A wall if not given. */
  kind?: Part['kind'];
  innerRadius?: number;
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

/** A wall, cylinder or sphere under its stages, ready to be solved. */
export function wall({ kind, innerRadius, layers, initial, stages, settings }: WallSpec): Project {
  const plan = newProject();
  return {
    ...plan,
    materials: layers.map(({ conductivity, density, heatCapacity, latent, reaction }, i) => ({
      id: `m${i}`,
      name: `Material ${i}`,
      conductivity,
      density,
      heatCapacity,
      ...(latent === undefined ? {} : { latent }),
      ...(reaction === undefined ? {} : { reaction }),
    })),
    part: {
      ...plan.part,
      kind: kind ?? 'wall',
      innerRadius: innerRadius ?? 0,
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
      stages: stages.map(({ lasts, start, end, sources }, i) => ({
        id: `s${i}`,
        name: `Stage ${i}`,
        end: { after: lasts },
        exposures: { start: start ?? insulated, end: end ?? insulated },
        ...(sources === undefined ? {} : { sources }),
      })),
    },
    probes: [],
    requirements: [],
    settings: { ...plan.settings, ...settings },
  };
}
