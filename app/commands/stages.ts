import { MAX_STAGES, type Exposure, type Project, type Ramp, type Stage, type StageEnd } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { changeById, enterAt, indexOfId, insertAfter, moveItem, writeAt } from './edit';
import { freeName, newId } from './ids';

const HOUR = 3600;

/** What a copied exposure is in the stage after: its own ramps have run, so their last value holds. */
export function settled(exposure: Exposure): Exposure {
  const still = <T>(schedule: T | Ramp): T | number | Ramp => {
    if (typeof schedule !== 'object' || schedule === null || !('segments' in schedule)) return schedule as T;
    const last = schedule.segments.filter((segment) => 'to' in segment).at(-1);
    return last?.to ?? schedule.start ?? { segments: [] };
  };
  switch (exposure.kind) {
    case 'insulated':
      return exposure;
    case 'temperature':
      return { ...exposure, temperature: still(exposure.temperature) };
    case 'flux':
      return { ...exposure, flux: still(exposure.flux) };
    case 'radiation':
      return { ...exposure, enclosure: still(exposure.enclosure) };
    case 'film': {
      const { coefficient, surroundings, radiation } = exposure;
      const settledFilm = { ...exposure, coefficient: still(coefficient), surroundings: still(surroundings) };
      if (radiation?.enclosure === undefined) return settledFilm;
      return { ...settledFilm, radiation: { ...radiation, enclosure: still(radiation.enclosure) } };
    }
  }
}

/** A stage of one hour that meets what the stage before it met. */
export function nextStage(project: Project, after: number): Stage {
  const { stages } = project.cycle;
  const before = stages[after] ?? stages[stages.length - 1];
  return {
    id: newId('stage'),
    name: freeName(stages, `Stage ${stages.length + 1}`),
    end: { after: HOUR },
    exposures: { start: settled(before.exposures.start), end: settled(before.exposures.end) },
  };
}

export const addStage = (stage: Stage, after: number): Command => ({
  name: `Add stage ${called(stage, 'stage')}`,
  apply: (project) => {
    const { stages } = project.cycle;
    return stages.length >= MAX_STAGES ? project : writeAt(project, ['cycle', 'stages'], insertAfter(stages, after, stage));
  },
});

export const duplicateStage = (project: Project, stage: Stage): Command => ({
  ...addStage(
    { ...stage, id: newId('stage'), name: freeName(project.cycle.stages, stage.name) },
    indexOfId(project.cycle.stages, stage.id),
  ),
  name: `Duplicate stage ${called(stage, 'stage')}`,
});

/** Removes a stage (the last one stays), and with it the requirements that count in it; the name says so. */
export function removeStage(project: Project, stage: Stage): Command {
  const countsIn = ({ counts }: Project['requirements'][number]): boolean =>
    counts.kind === 'within' ? counts.from === stage.id : counts.kind !== 'cycle' && counts.stage === stage.id;
  const lost = project.requirements.filter(countsIn).length;
  const along = lost === 0 ? '' : ` and ${lost} ${lost === 1 ? 'requirement that counts' : 'requirements that count'} in it`;
  return {
    name: `Remove stage ${called(stage, 'stage')}${along}`,
    apply: (now) => {
      const stages = now.cycle.stages.filter((item) => item.id !== stage.id);
      if (stages.length === 0 || stages.length === now.cycle.stages.length) return now;
      return {
        ...now,
        cycle: { ...now.cycle, stages },
        requirements: now.requirements.filter((item) => !countsIn(item)),
      };
    },
  };
}

export const moveStage = (stage: Stage, by: number): Command => ({
  name: `Move stage ${called(stage, 'stage')}`,
  apply: (project) =>
    writeAt(project, ['cycle', 'stages'], moveItem(project.cycle.stages, indexOfId(project.cycle.stages, stage.id), by)),
});

export const renameStage = (stage: Stage, name: string): Command => ({
  name: `Name of ${called(stage, 'stage')} to ${name}`,
  apply: (project) => changeStage(project, stage, (item) => ({ ...item, name })),
});

/** Ends a stage after a time, or when its schedules are done. */
export const setStageEnd = (stage: Stage, end: StageEnd): Command => ({
  name: `End of ${called(stage, 'stage')} ${'after' in end ? 'after a time' : 'at target'}`,
  apply: (project) => changeStage(project, stage, (item) => ({ ...item, end })),
});

export const setStageLength = (stage: Stage, entered: Entered): Command => ({
  name: `Length of ${called(stage, 'stage')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.cycle.stages, stage.id);
    if (index < 0 || !('after' in project.cycle.stages[index].end)) return project;
    return enterAt(project, ['cycle', 'stages', index, 'end', 'after'], entered);
  },
});

export const renameSetPoint = (name: string): Command => ({
  name: `Name of the set-point to ${name}`,
  apply: (project) => writeAt(project, ['cycle', 'setPoint', 'name'], name),
});

export const setSetPointStart = (entered: Entered): Command => ({
  name: `Start of the set-point to ${entered.text}`,
  apply: (project) => enterAt(project, ['cycle', 'setPoint', 'start'], entered),
});

export const changeStage = (project: Project, stage: { id: string }, change: (stage: Stage) => Stage): Project =>
  writeAt(project, ['cycle', 'stages'], changeById(project.cycle.stages, stage.id, change));
