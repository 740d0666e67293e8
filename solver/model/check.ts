/** Checks across records: references, unique ids, places that exist, stages that end. */
import type { Exposure } from './exposure';
import { ABSOLUTE_ZERO_C } from './fields';
import { FACES, isSolid, type Part } from './part';
import type { Project } from './project';
import type { Path, Problem } from './problems';
import type { Place } from './probe';
import { courseAt, layCycle, stageSchedules, type LaidStage } from './timing';
import type { Stage } from './cycle';

/** Everything that a single field cannot know; an empty list means that the plan can be run. */
export function crossCheck(project: Project): Problem[] {
  const problems: Problem[] = [];
  const say = (path: Path, message: string): void => void problems.push({ path, message });
  const ids = (list: readonly { id: string }[], path: Path): Set<string> => {
    const seen = new Set<string>();
    list.forEach((item, index) => {
      if (seen.has(item.id)) say([...path, index, 'id'], `must be unique in its list; "${item.id}" is there twice`);
      seen.add(item.id);
    });
    return seen;
  };
  const refer = (known: Set<string>, id: string, path: Path, what: string): void => {
    if (!known.has(id)) say(path, `must be the id of a ${what} of this plan, got "${id}"`);
  };

  const materials = ids(project.materials, ['materials']);
  const layers = ids(project.part.layers, ['part', 'layers']);
  const stages = ids(project.cycle.stages, ['cycle', 'stages']);
  const probes = ids(project.probes, ['probes']);
  ids(project.requirements, ['requirements']);

  project.part.layers.forEach((layer, index) =>
    refer(materials, layer.material, ['part', 'layers', index, 'material'], 'material'),
  );
  checkPart(project, say);
  checkInitial(project, layers, say, refer);
  checkCycle(project, layers, say, refer);
  project.probes.forEach((probe, index) => checkPlace(probe.at, project.part, layers, ['probes', index, 'at'], say, refer));
  project.requirements.forEach((requirement, index) => {
    const path = ['requirements', index];
    const { of, must, counts } = requirement;
    if ('probe' in of) refer(probes, of.probe, [...path, 'of', 'probe'], 'probe');
    if ('difference' in of && must.limit < 0)
      say([...path, 'must', 'limit'], `must be at least 0 K for a difference, got ${must.limit}`);
    if (counts.kind === 'stage' || counts.kind === 'stageEnd') refer(stages, counts.stage, [...path, 'counts', 'stage'], 'stage');
    if (counts.kind === 'within' && counts.from !== undefined) refer(stages, counts.from, [...path, 'counts', 'from'], 'stage');
  });
  checkSettings(project, say);
  return problems;
}

type Say = (path: Path, message: string) => void;
type Refer = (known: Set<string>, id: string, path: Path, what: string) => void;

function checkInitial(project: Project, layers: Set<string>, say: Say, refer: Refer): void {
  const { initial } = project;
  if ('steady' in initial) {
    const held = FACES.some((face) => !['insulated', 'flux'].includes(initial.steady[face].kind));
    if (!held) say(['initial', 'steady'], 'has no steady state: one face must meet a temperature, a film or radiation');
    if (isSolid(project.part) && initial.steady.start.kind !== 'insulated') say(['initial', 'steady', 'start'], SOLID);
    checkSteady(initial.steady, say);
  }
  if (!('layers' in initial)) return;
  const given = new Set<string>();
  initial.layers.forEach((entry, index) => {
    refer(layers, entry.layer, ['initial', 'layers', index, 'layer'], 'layer');
    if (given.has(entry.layer)) say(['initial', 'layers', index, 'layer'], `names layer "${entry.layer}" a second time`);
    given.add(entry.layer);
  });
  project.part.layers.forEach((layer) => {
    if (!given.has(layer.id)) say(['initial', 'layers'], `must give a temperature for layer "${layer.name || layer.id}"`);
  });
}

function checkSteady(exposures: Stage['exposures'], say: Say): void {
  const path = ['initial', 'steady'];
  let layable = true;
  for (const { path: inner, schedule } of stageSchedules({ exposures })) {
    if (typeof schedule !== 'object' || !('segments' in schedule) || schedule.start !== undefined) continue;
    say([...path, ...inner.slice(1), 'start'], 'is missing: nothing comes before a steady state that it could carry on from');
    layable = false;
  }
  for (const face of FACES) checkCoefficient(exposures[face], [...path, face], say);
  if (layable) checkExpressions(exposures, { start: 0, end: 0 }, path, say);
}

const SOLID = 'must be left out: a solid cylinder or sphere has no start face';

function checkPart({ part, materials }: Project, say: Say): void {
  if (part.kind === 'wall' && part.innerRadius !== 0)
    say(['part', 'innerRadius'], 'must be 0 for a wall: only round parts have a bore');
  materials.forEach((material, index) => {
    (material.latent ?? []).forEach(({ from, to }, change) => {
      if (to < from)
        say(['materials', index, 'latent', change, 'to'], `must be at least ${from} °C, where the change begins, got ${to}`);
    });
  });
}

function checkCycle(project: Project, layers: Set<string>, say: Say, refer: Refer): void {
  const before = new Set<string>();
  let runnable = true;
  project.cycle.stages.forEach((stage, index) => {
    const path = ['cycle', 'stages', index];
    let scheduled = (stage.setPoint?.segments.length ?? 0) > 0;
    if (isSolid(project.part) && stage.exposures.start.kind !== 'insulated') say([...path, 'exposures', 'start'], SOLID);
    const heated = new Set<string>();
    (stage.sources ?? []).forEach(({ layer }, source) => {
      refer(layers, layer, [...path, 'sources', source, 'layer'], 'layer');
      if (heated.has(layer))
        say([...path, 'sources', source, 'layer'], 'must be another layer: this one has a source in this stage already');
      heated.add(layer);
    });
    for (const { owner, path: inner, quantity, schedule } of stageSchedules(stage)) {
      const what = `${owner} ${quantity}`;
      if (typeof schedule === 'object' && 'segments' in schedule) {
        scheduled ||= schedule.segments.length > 0;
        if (schedule.start === undefined && !before.has(what)) {
          say([...path, ...inner, 'start'], 'is missing: nothing was reached in an earlier stage that it could carry on from');
          runnable = false;
        }
      }
      before.add(what);
    }
    for (const face of FACES) checkCoefficient(stage.exposures[face], [...path, 'exposures', face], say);
    if ('whenScheduleDone' in stage.end && !scheduled) {
      say([...path, 'end'], 'waits for a schedule, but no schedule of this stage has segments; give it a time instead');
      runnable = false;
    }
  });
  if (runnable) checkLaid(project, say);
}

function checkCoefficient(exposure: Exposure, path: Path, say: Say): void {
  if (exposure.kind !== 'film' || typeof exposure.coefficient !== 'object' || !('correlation' in exposure.coefficient)) return;
  const { correlation, velocity } = exposure.coefficient;
  const forced = correlation.startsWith('forced');
  if (forced && velocity === undefined)
    say([...path, 'coefficient', 'velocity'], 'is missing: a forced correlation needs a velocity in m/s');
  if (!forced && velocity !== undefined)
    say([...path, 'coefficient', 'velocity'], 'must be left out: natural convection has no velocity of its own');
}

/** Instants at which expressions of time are tried in every stage. */
const TRIED = 64;

function checkLaid(project: Project, say: Say): void {
  layCycle(project).stages.forEach((stage, index) => {
    const path = ['cycle', 'stages', index];
    if (!(stage.end > stage.start))
      say([...path, 'end'], 'must come later than the start of the stage: its schedules take no time');
    checkExpressions(project.cycle.stages[index].exposures, stage, [...path, 'exposures'], say);
  });
}

/** Whether every expression of time in exposures gives numbers that can be between two times; `path` leads to the exposures. */
function checkExpressions(
  exposures: Stage['exposures'],
  { start, end }: Pick<LaidStage, 'start' | 'end'>,
  path: Path,
  say: Say,
): void {
  for (const { path: inner, quantity, schedule } of stageSchedules({ exposures })) {
    if (typeof schedule !== 'object' || !('expression' in schedule)) continue;
    for (let i = 0; i <= TRIED; i++) {
      const time = start + (i / TRIED) * (end - start);
      const value = courseAt({ expression: schedule.expression, stageStart: start }, time);
      if (Number.isFinite(value) && (quantity === 'flux' || value > ABSOLUTE_ZERO_C)) continue;
      say([...path, ...inner.slice(1), 'expression'], `gives ${value} at t = ${time - start} s of the stage`);
      break;
    }
  }
}

/** Thickness of the whole part, m. */
export const partThickness = (part: Pick<Part, 'layers'>): number => part.layers.reduce((sum, layer) => sum + layer.thickness, 0);

function checkPlace(place: Place, part: Part, layers: Set<string>, path: Path, say: Say, refer: Refer): void {
  if ('depth' in place) {
    const thickness = partThickness(part);
    if (place.depth > thickness * (1 + 1e-9)) {
      say(
        [...path, 'depth'],
        `must be at most ${Number(thickness.toPrecision(6))} m, the thickness of the part, got ${place.depth}`,
      );
    }
  } else if ('fraction' in place) {
    if (place.layer !== undefined) refer(layers, place.layer, [...path, 'layer'], 'layer');
  } else if ('interface' in place) {
    refer(layers, place.interface, [...path, 'interface'], 'layer');
    if (part.layers.at(-1)?.id === place.interface)
      say([...path, 'interface'], 'must be a layer that another layer follows; this is the last one');
  }
}

function checkSettings(project: Project, say: Say): void {
  const { settings, part } = project;
  if (settings.scheme !== 'automatic' && settings.step === undefined) {
    say(['settings', 'step'], 'is missing: the explicit, implicit and Crank–Nicolson schemes need a step in s');
  }
  if (settings.grid === 'automatic') return;
  const [key, counts] =
    'nodes' in settings.grid ? (['nodes', settings.grid.nodes] as const) : (['cells', settings.grid.cells] as const);
  if (Array.isArray(counts) && counts.length !== part.layers.length) {
    say(['settings', 'grid', key], `must have one number a layer: ${part.layers.length}, got ${counts.length}`);
  }
}
