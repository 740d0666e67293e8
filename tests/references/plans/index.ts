/**
 * Random one-dimensional plans from all the trades, a seed each: the problems by which the solver's word on its own error is
 * judged. The same seed gives the same plan for ever; a change here asks for `npm run references`.
 */
import {
  checkProject,
  FORMAT,
  isSolid,
  layCycle,
  type Exposure,
  type Initial,
  type Layer,
  type Material,
  type Part,
  type Project,
  type Stage,
} from '../../../solver/model';
import { Dice, round } from './dice';
import { randomExposure, randomStage, type PartScale, type StagePhysics } from './exposures';
import { randomProbes, randomRequirements, type Span } from './requirements';
import { randomMaterial, TRADES, type MaterialPhysics, type Trade } from './trades';

/** The format that the plans are written in. */
const PLAN_VERSION = 2;

/** Which kinds of physics the plans may have. */
export interface Physics extends MaterialPhysics, StagePhysics {
  round: boolean;
  gaps: boolean;
  profiles: boolean;
  steady: boolean;
}

export const ALL_PHYSICS: Physics = {
  round: true,
  curves: true,
  latent: true,
  plateau: true,
  reaction: true,
  radiation: true,
  quenchTables: true,
  expressions: true,
  sources: true,
  gaps: true,
  profiles: true,
  steady: true,
};

/** Words for the kinds of physics in a plan, for tables of what was covered. */
export function physicsOf({ part, materials, initial, cycle }: Project): string[] {
  const text = JSON.stringify(cycle);
  const has = (what: string, is: boolean): string[] => (is ? [what] : []);
  return [
    part.kind === 'wall' ? 'wall' : `${isSolid(part) ? 'solid' : 'hollow'} ${part.kind}`,
    ...has(
      'curves',
      materials.some(({ conductivity, heatCapacity }) => [conductivity, heatCapacity].some((c) => typeof c !== 'number')),
    ),
    ...has(
      'latent',
      materials.some(({ latent }) => latent?.some(({ from, to }) => to > from) ?? false),
    ),
    ...has(
      'plateau',
      materials.some(({ latent }) => latent?.some(({ from, to }) => to === from) ?? false),
    ),
    ...has(
      'reaction',
      materials.some(({ reaction }) => reaction !== undefined),
    ),
    ...has('radiation', text.includes('emissivity')),
    ...has('quench table', text.includes('"table"')),
    ...has('expression', text.includes('"expression"')),
    ...has('source', text.includes('"sources"')),
    ...has(
      'gap',
      part.layers.some(({ contact }) => typeof contact === 'object'),
    ),
    ...has(
      'contact',
      part.layers.some(({ contact }) => typeof contact === 'number' && contact > 0),
    ),
    ...has('layered start', 'layers' in initial),
    ...has('profile', 'profile' in initial),
    ...has('steady start', 'steady' in initial),
  ];
}

/** The plan of a seed. Throws where the checks of the product refuse it: a fault of the generator. */
export function randomPlan(seed: number, physics: Physics = ALL_PHYSICS): Project {
  const read = checkProject(randomDocument(seed, physics));
  if (read.kind !== 'project') throw new Error(`plan ${seed}: ${JSON.stringify(read)}`);
  return read.project;
}

/** The document of a seed, before the product's checks and defaults. */
export function randomDocument(seed: number, physics: Physics = ALL_PHYSICS): object {
  const dice = new Dice(seed);
  const trade = dice.pick(TRADES);
  // What is hard is spread over the plans, a few kinds in each, so that none hides behind another.
  const some = (kind: keyof Physics, part: number): boolean => dice.chance(part) && physics[kind];
  const own: Physics = {
    round: some('round', 0.5),
    curves: some('curves', 0.5),
    latent: some('latent', 0.5),
    plateau: some('plateau', 0.3),
    reaction: some('reaction', 0.7),
    radiation: some('radiation', 0.6),
    quenchTables: some('quenchTables', 0.8),
    expressions: some('expressions', 0.3),
    sources: some('sources', 0.3),
    gaps: some('gaps', 0.2),
    profiles: some('profiles', 0.1),
    steady: some('steady', 0.12),
  };
  const materials = Array.from({ length: dice.whole(1, 2) }, (_, i) =>
    randomMaterial(dice, trade, `m${i + 1}`, i === 0 ? own : { ...own, latent: false, reaction: false }),
  );
  const part = randomPart(dice, trade, materials, own);
  const start = dice.between(...trade.starts);
  const scale = scaleOf(part, materials, start);
  const stages = Array.from({ length: dice.whole(1, 3) }, (_, i) =>
    randomStage(
      dice,
      trade,
      i,
      scale,
      part.layers.map(({ id }) => id),
      own,
    ),
  );
  if (isSolid(part)) for (const stage of stages) stage.exposures.start = { kind: 'insulated' };
  awake(dice, trade, stages[0], scale, own);
  const cycle = { setPoint: { name: 'Set-point', start: round(dice.between(...trade.surroundings)) }, stages };
  const probes = randomProbes(dice, part);
  const lengths = stages.map(({ id, end }) => ({ id, length: 'after' in end ? end.after : 0 }));
  return {
    format: FORMAT,
    version: PLAN_VERSION,
    title: `Random plan ${seed}: ${trade.name}`,
    notes: '',
    materials,
    part,
    initial: randomInitial(dice, trade, part, start, own),
    cycle,
    probes,
    requirements: randomRequirements(dice, probes, lengths, spanOf(part, cycle, start)),
    settings: { scheme: 'automatic', accuracy: dice.pick([0.05, 0.1, 0.1, 0.2, 0.5, 1]), dampedSteps: 4, grid: 'automatic' },
    output: {},
  };
}

function randomPart(dice: Dice, trade: Trade, materials: readonly Material[], physics: Physics): Part {
  const count = dice.pick([1, 1, 2, 2, 3]);
  const layers = Array.from({ length: count }, (_, i): Layer => ({
    id: `l${i + 1}`,
    name: `Layer ${i + 1}`,
    material: dice.pick(materials).id,
    thickness: round(dice.log(...trade.size) * (count > 1 ? 0.6 : 1)),
    contact: i === count - 1 || dice.chance(0.55) ? 0 : randomContact(dice, physics),
  }));
  // The first material is the one that may change phase or react: let it take part.
  layers[dice.whole(0, count - 1)].material = materials[0].id;
  const kind = physics.round ? dice.pick(['cylinder', 'sphere'] as const) : 'wall';
  const thickness = layers.reduce((sum, layer) => sum + layer.thickness, 0);
  const innerRadius = kind === 'wall' || dice.chance(0.55) ? 0 : round(thickness * dice.log(0.2, 5));
  return { kind, innerRadius, layers, faces: { start: { name: 'Start' }, end: { name: 'End' } } };
}

const randomContact = (dice: Dice, physics: Physics): Layer['contact'] =>
  physics.gaps && dice.chance(0.5)
    ? { gap: dice.log(1e-4, 3e-3), emissivities: [dice.between(0.2, 0.95), dice.between(0.2, 0.95)] }
    : dice.log(2e-5, 5e-3);

function scaleOf({ layers }: Part, materials: readonly Material[], start: number): PartScale {
  const typical = (curve: Material['density']): number =>
    typeof curve === 'number' ? curve : 'table' in curve ? curve.table[0][1] : parseFloat(curve.expression);
  let resistance = 0;
  let heat = 0;
  for (const { material, thickness } of layers) {
    const { conductivity, density, heatCapacity } = materials.find(({ id }) => id === material) ?? materials[0];
    resistance += thickness / typical(conductivity);
    heat += thickness * typical(density) * typical(heatCapacity);
  }
  return { time: 0.5 * resistance * heat, conductance: 1 / resistance, start };
}

/** Something has to happen in the first stage. */
function awake(dice: Dice, trade: Trade, stage: Stage, scale: PartScale, physics: Physics): void {
  const length = 'after' in stage.end ? stage.end.after : scale.time;
  while (stage.exposures.end.kind === 'insulated') stage.exposures.end = randomExposure(dice, trade, length, scale, physics);
}

function randomInitial(dice: Dice, trade: Trade, part: Part, start: number, physics: Physics): Initial {
  const near = (): number => round(start + 0.15 * dice.between(-1, 1) * (trade.starts[1] - trade.starts[0]));
  if (physics.profiles) {
    const thickness = part.layers.reduce((sum, layer) => sum + layer.thickness, 0);
    const count = dice.whole(2, 4);
    return {
      profile: Array.from({ length: count }, (_, i): [number, number] => [round((0.99 * thickness * i) / (count - 1)), near()]),
    };
  }
  if (physics.steady) {
    const held = (): Exposure => ({ kind: 'film', coefficient: dice.log(...trade.film), surroundings: near() });
    return { steady: { start: isSolid(part) ? { kind: 'insulated' } : held(), end: held() } };
  }
  if (part.layers.length > 1 && dice.chance(0.25)) {
    return { layers: part.layers.map(({ id }) => ({ layer: id, temperature: near() })) };
  }
  return { temperature: start };
}

function spanOf(part: Part, cycle: Pick<Project['cycle'], 'setPoint' | 'stages'>, start: number): Span {
  const met = [start];
  for (const { exposures } of layCycle({ part, cycle }).stages) {
    for (const exposure of [exposures.start, exposures.end]) {
      if (exposure.kind !== 'temperature' && exposure.kind !== 'film') continue;
      const course = exposure.kind === 'temperature' ? exposure.temperature : exposure.surroundings;
      if (!('expression' in course)) met.push(...course.value);
    }
  }
  const [lowest, highest] = [Math.min(...met), Math.max(...met)];
  return highest - lowest > 5 ? { lowest, highest, start } : { lowest: start - 20, highest: start + 20, start };
}
