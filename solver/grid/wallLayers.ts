import { thermalCurves, curveAt, tableAt, type ThermalCurves } from '../materials';
import type { Contact, Material, Project } from '../model';

/** Temperatures over depth: points [m, °C], straight between them, constant beyond. */
export type Profile = readonly (readonly [depth: number, temperature: number])[];

/** A layer of a plane wall as conduction sees it. */
export interface WallLayer {
  readonly name: string;
  /** m */
  readonly thickness: number;
  readonly curves: ThermalCurves;
  /** Temperature at the start, °C: its mean over the layer where it varies. */
  readonly initial: number;
  /** The start over the depth in the layer; null: `initial` throughout. */
  readonly profile: Profile | null;
  /** Whether the profile has kinks at its points; else they are samples of a smooth one. */
  readonly kinked: boolean;
  /** To the next layer; 0 where they are bonded, and on the last layer. */
  readonly contact: Contact;
  /** Heat that its reaction can still give off, J/m³; 0 where there is none. */
  readonly reactionHeat: number;
}

/** Temperature of a layer at the start at a depth within it, °C. */
export const startAt = ({ initial, profile }: Pick<WallLayer, 'initial' | 'profile'>, depth: number): number =>
  profile === null ? initial : tableAt(profile, depth);

/**
 * The layers of a checked plan. A plan that starts from a steady state needs its `start`, a profile a layer, over the depth in
 * that layer. Throws RangeError where crossCheck would have found a problem.
 */
export function wallLayers(project: Pick<Project, 'part' | 'materials' | 'initial'>, start?: readonly Profile[]): WallLayer[] {
  const { layers } = project.part;
  let edge = 0;
  return layers.map((layer, index) => {
    const material = project.materials.find((candidate) => candidate.id === layer.material);
    if (material === undefined) throw new RangeError(`layer ${layer.id} is of no material of the plan`);
    const profile = start?.[index] ?? startProfile(project.initial, layer, edge);
    edge += layer.thickness;
    const initial = meanOf(profile, layer.thickness);
    return {
      name: layer.name === '' ? `Layer ${index + 1}` : layer.name,
      thickness: layer.thickness,
      curves: thermalCurves(material, initial),
      initial,
      profile: profile.every(([, temperature]) => temperature === profile[0][1]) ? null : profile,
      kinked: start === undefined,
      contact: index < layers.length - 1 ? layer.contact : 0,
      reactionHeat: reactionHeat(material, initial),
    };
  });
}

/** The start of the layer that begins at the depth `edge`, over the depth in it. */
function startProfile(initial: Project['initial'], { id, thickness }: { id: string; thickness: number }, edge: number): Profile {
  if ('temperature' in initial) return [[0, initial.temperature]];
  if ('steady' in initial) throw new RangeError('the steady state at the start is not worked out');
  if ('layers' in initial) {
    const entry = initial.layers.find((candidate) => candidate.layer === id);
    if (entry === undefined) throw new RangeError(`layer ${id} has no initial temperature`);
    return [[0, entry.temperature]];
  }
  const inside = initial.profile
    .map(([depth, temperature]): [number, number] => [depth - edge, temperature])
    .filter(([depth]) => depth > 0 && depth < thickness);
  return [[0, tableAt(initial.profile, edge)], ...inside, [thickness, tableAt(initial.profile, edge + thickness)]];
}

function meanOf(profile: Profile, thickness: number): number {
  if (profile.length === 1) return profile[0][1];
  let sum = 0;
  for (let i = 1; i < profile.length; i++) {
    sum += ((profile[i][1] + profile[i - 1][1]) / 2) * (profile[i][0] - profile[i - 1][0]);
  }
  return sum / thickness;
}

function reactionHeat({ reaction, density }: Material, temperature: number): number {
  if (reaction === undefined) return 0;
  const left =
    reaction.kind === 'hydration'
      ? reaction.ultimate * (1 - Math.exp(-((reaction.time / reaction.age) ** reaction.slope)))
      : 1 - reaction.initial;
  // Single precision: engines differ in the last digits of powers, and grids follow from this.
  return Math.fround(curveAt(density, temperature) * reaction.heat * left);
}
