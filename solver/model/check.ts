/** Checks across records: references, unique ids, places that exist, stages that end. */
import { FACES, type FaceId, type Part } from './part';
import type { Project } from './project';
import type { Path, Problem } from './problems';
import type { Place } from './probe';
import { layCycle, schedulesOf } from './timing';

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
  checkInitial(project, layers, say, refer);
  checkCycle(project, say);
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

function checkCycle(project: Project, say: Say): void {
  const before = { start: new Set<string>(), end: new Set<string>() } satisfies Record<FaceId, Set<string>>;
  let runnable = true;
  project.cycle.stages.forEach((stage, index) => {
    const path = ['cycle', 'stages', index];
    let scheduled = (stage.setPoint?.segments.length ?? 0) > 0;
    for (const face of FACES) {
      for (const { quantity, schedule } of schedulesOf(stage.exposures[face])) {
        if (typeof schedule === 'object' && 'segments' in schedule) {
          scheduled ||= schedule.segments.length > 0;
          if (schedule.start === undefined && !before[face].has(quantity)) {
            say(
              [...path, 'exposures', face, quantity, 'start'],
              'is missing: nothing was reached in an earlier stage that it could carry on from',
            );
            runnable = false;
          }
        }
        before[face].add(quantity);
      }
    }
    if ('whenScheduleDone' in stage.end && !scheduled) {
      say([...path, 'end'], 'waits for a schedule, but no schedule of this stage has segments; give it a time instead');
      runnable = false;
    }
  });
  if (!runnable) return;
  const laid = layCycle(project);
  laid.stages.forEach((stage, index) => {
    if (!(stage.end > stage.start))
      say(['cycle', 'stages', index, 'end'], 'must come later than the start of the stage: its schedules take no time');
  });
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
