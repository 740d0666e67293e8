/**
 * Answers of a plan by an independent way, extrapolated, each with how far it can be trusted.
 *
 * Three levels, each with twice the cells and a tolerance four times finer; Richardson's extrapolation for second order from
 * the two finest. The doubt is a part of the distance to the extrapolation from the two coarsest.
 */
import { courseAt, FACES, layCycle, positionOf, type LaidCycle, type LaidExposure, type Project } from '../../../solver/model';
import { Body } from './body';
import { chainOf, type Chain } from './chain';
import { March, type MarchedStep } from './march';
import { readingOf } from './subjects';
import { Substance, tableAt } from './substance';
import { Watch, type ReferenceAnswer } from './watch';

export interface Extrapolated extends ReferenceAnswer {
  /** Doubt of value and margin (in their own units) and of the time, s; null where there is no number, or levels disagree. */
  valueDoubt: number | null;
  marginDoubt: number | null;
  timeDoubt: number | null;
}

/** Local error allowed in a step at level 0, K. */
const TOLERANCE = 1e-4;
const LEVELS = 3;
const MOST_STEPS = 30_000;
/** Plans that leave these temperatures, °C, are none of any trade. */
const SENSIBLE = [-120, 1900];
/** The distance of two extrapolations, the coarser one 8 to 16 times worse, as a bound of the finer one's error. */
const DOUBT = 1 / 4;

export function reference(project: Project, levels: number = LEVELS): { answers: Extrapolated[]; steps: number[] } {
  const runs = Array.from({ length: levels }, (_, level) => runAt(project, level, TOLERANCE * 4 ** -level));
  const answers = project.requirements.map((_, i) => extrapolate(runs.map((run) => run.answers[i])));
  return { answers, steps: runs.map((run) => run.steps) };
}

/** Answers at one level, not extrapolated. */
export function runAt(project: Project, level: number, tolerance: number): { answers: ReferenceAnswer[]; steps: number } {
  const cycle = layCycle(project);
  const range = rangeOf(project, cycle);
  const substances = project.part.layers.map(({ material }) => {
    const found = project.materials.find(({ id }) => id === material);
    if (found === undefined) throw new RangeError(`no material "${material}"`);
    return new Substance(found, range);
  });
  const probes = project.probes.map(({ id, at }) => {
    const { position_m, layer } = positionOf(project.part, at);
    return { id, depth: position_m, layer };
  });
  const chain = chainOf(project.part, substances, probes, cycle.end, level);
  const body = new Body(chain);
  const march = new March(body, startOf(project, chain, range, tolerance), tolerance, range);
  const nodeOf = (id: string): number | 'centre' => {
    const probe = probes.find((candidate) => candidate.id === id);
    if (probe === undefined) throw new RangeError(`no probe "${id}"`);
    return nodeAt(chain, probe);
  };
  const watches = project.requirements.map(
    (requirement) => new Watch(requirement, readingOf(requirement.of, project, chain, nodeOf), cycle),
  );
  const first = march.temperature();
  jumpHeld(first, cycle, chain);
  watches.forEach((watch) => watch.observeStart(first));
  march.through(cycle, (step: MarchedStep) => {
    if (march.steps > MOST_STEPS) throw new Error(`more than ${MOST_STEPS} steps`);
    for (const temperature of step.after) {
      if (!(temperature > SENSIBLE[0] && temperature < SENSIBLE[1])) throw new Error(`${temperature} °C is out of any trade`);
    }
    watches.forEach((watch) => watch.observe(step));
  });
  return { answers: watches.map((watch) => watch.answer()), steps: march.steps };
}

/** A face that is held leaps at once; all else begins where it was. */
function jumpHeld(field: Float64Array, { stages }: LaidCycle, chain: Chain): void {
  const { start, end } = stages[0].exposures;
  if (start.kind === 'temperature' && !chain.solid) field[0] = courseAt(start.temperature, 0);
  if (end.kind === 'temperature') field[field.length - 1] = courseAt(end.temperature, 0);
}

/** The node of a probe: every probe has one of no volume, except at the centre of a solid part. */
function nodeAt(chain: Chain, { depth, layer }: { depth: number; layer: number }): number | 'centre' {
  if (chain.solid && depth === 0) return 'centre';
  let nearest = -1;
  for (let i = 0; i < chain.depth.length; i++) {
    if (chain.volume[i] > 0 || Math.abs(chain.depth[i] - depth) > 1e-9 * (depth + 1e-3)) continue;
    // Across a contact two nodes share a depth: the probe's layer tells which. A shared node stands for both layers.
    if (nearest < 0 || chain.layer[i] === layer) nearest = i;
  }
  if (nearest < 0) throw new RangeError(`no node at ${depth} m`);
  return nearest;
}

function startOf(project: Project, chain: Chain, range: readonly [number, number], tolerance: number): Float64Array {
  const { initial } = project;
  const field = (at: (node: number) => number): Float64Array => Float64Array.from(chain.depth, (_, node) => at(node));
  if ('temperature' in initial) return field(() => initial.temperature);
  if ('profile' in initial) return field((node) => tableAt(initial.profile, chain.depth[node]));
  if ('layers' in initial) {
    const own = project.part.layers.map(({ id }) => initial.layers.find(({ layer }) => layer === id)?.temperature ?? NaN);
    return field((node) => own[chain.layer[node]]);
  }
  const [first] = project.cycle.stages;
  const stage = { ...first, setPoint: undefined, exposures: initial.steady, sources: [], end: { after: 1 } };
  const cycle = layCycle({ part: project.part, cycle: { ...project.cycle, stages: [stage] } });
  const inert = chain.substances.map(({ material }) => new Substance({ ...material, reaction: undefined }, range));
  const links = chain.links.map((link) =>
    'substance' in link ? { ...link, substance: inert[chain.substances.indexOf(link.substance)] } : link,
  );
  const body = new Body({ ...chain, substances: inert, links });
  const march = new March(
    body,
    field(() => 0.5 * (temperatures(cycle)[0] + temperatures(cycle)[1])),
    1e-3 * tolerance,
    range,
  );
  march.toSteady(cycle.stages[0]);
  return march.temperature();
}

/** Lowest and highest of all temperatures that a cycle names. */
function temperatures({ stages }: LaidCycle): [number, number] {
  const met: number[] = [];
  const add = (exposure: LaidExposure): void => {
    const courses =
      exposure.kind === 'temperature'
        ? [exposure.temperature]
        : exposure.kind === 'film'
          ? [exposure.surroundings, ...(exposure.radiation === null ? [] : [exposure.radiation.enclosure])]
          : [];
    for (const course of courses) if (!('expression' in course)) met.push(...course.value);
  };
  for (const { exposures } of stages) for (const face of FACES) add(exposures[face]);
  return met.length === 0 ? [20, 20] : [Math.min(...met), Math.max(...met)];
}

/** A range that temperatures of the plan stay in, as far as expressions of properties are concerned, °C. */
function rangeOf({ initial }: Project, cycle: LaidCycle): [number, number] {
  const [low, high] = temperatures(cycle);
  const own =
    'temperature' in initial
      ? [initial.temperature]
      : 'layers' in initial
        ? initial.layers.map(({ temperature }) => temperature)
        : 'profile' in initial
          ? initial.profile.map(([, temperature]) => temperature)
          : [];
  return [Math.max(-270, Math.min(low, ...own) - 100), Math.max(high, ...own) + 600];
}

function extrapolate(levels: readonly ReferenceAnswer[]): Extrapolated {
  const finest = levels[levels.length - 1];
  const agree = levels.every(({ verdict }) => verdict === finest.verdict);
  const [value, valueDoubt] = limitOf(levels.map((answer) => answer.value));
  const [margin, marginDoubt] = limitOf(levels.map((answer) => answer.margin));
  const [time, timeDoubt] = limitOf(levels.map((answer) => answer.time));
  if (!agree) return { ...finest, valueDoubt: null, marginDoubt: null, timeDoubt: null };
  return { verdict: finest.verdict, value, margin, time, slope: finest.slope, valueDoubt, marginDoubt, timeDoubt };
}

function limitOf(values: readonly (number | null)[]): [limit: number | null, doubt: number | null] {
  const known = values.filter((value): value is number => value !== null && Number.isFinite(value));
  if (known.length < values.length) return [values[values.length - 1], null];
  if (known.length < 3) return [known[known.length - 1], null];
  const [a, b, c] = known.slice(-3);
  const [coarse, fine] = [b + (b - a) / 3, c + (c - b) / 3];
  return [fine, DOUBT * Math.abs(fine - coarse)];
}
