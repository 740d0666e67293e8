/** Edits of what a face meets during a stage. */
import type { Coefficient, Exposure, ExposureKind, FaceId, PlainSchedule, Stage, TemperatureSchedule } from '../../solver/model';
import { valueAt } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { enterAt, indexOfId, writeAt } from './edit';
import { schedulePath, type ScheduleKey } from './segments';
import { changeStage, settled } from './stages';

export const EXPOSURE_NAMES: Record<ExposureKind, string> = {
  film: 'film',
  temperature: 'fixed temperature',
  flux: 'heat flux',
  radiation: 'radiation',
  insulated: 'insulated',
};

const AIR_FILM = 10;
export const GREY = 0.8;
const ROOM_C = 20;

/** An exposure of another kind that keeps what both kinds know: the temperature outside. */
export function exposureOfKind(kind: ExposureKind, before: Exposure): Exposure {
  const outside = outsideOf(before) ?? ROOM_C;
  switch (kind) {
    case 'insulated':
      return { kind };
    case 'flux':
      return { kind, flux: 0 };
    case 'temperature':
      return { kind, temperature: outside };
    case 'film':
      return { kind, coefficient: AIR_FILM, surroundings: outside };
    case 'radiation':
      return { kind, emissivity: GREY, enclosure: outside };
  }
}

/** The temperature outside that an exposure names, if any. */
function outsideOf(exposure: Exposure): TemperatureSchedule | null {
  if (exposure.kind === 'film') return exposure.surroundings;
  if (exposure.kind === 'radiation') return exposure.enclosure;
  return exposure.kind === 'temperature' ? exposure.temperature : null;
}

export const setExposureKind = (stage: Stage, face: FaceId, faceName: string, kind: ExposureKind): Command => ({
  name: `${faceName} in ${called(stage, 'stage')}: ${EXPOSURE_NAMES[kind]}`,
  apply: (project) =>
    changeStage(project, stage, (item) =>
      item.exposures[face].kind === kind
        ? item
        : { ...item, exposures: { ...item.exposures, [face]: exposureOfKind(kind, item.exposures[face]) } },
    ),
});

const SCHEDULE_NAMES: Record<ScheduleKey, string> = {
  temperature: 'Temperature',
  surroundings: 'Surroundings',
  flux: 'Heat flux',
  coefficient: 'Film coefficient',
  enclosure: 'Enclosure',
};

/** Replaces a whole schedule: a constant, the set-point, or ramps of its own. `text` says which for the undo list. */
export const setSchedule = (
  stage: Stage,
  face: FaceId,
  faceName: string,
  key: ScheduleKey,
  schedule: TemperatureSchedule | PlainSchedule | Coefficient,
  text: string,
): Command => ({
  name: `${SCHEDULE_NAMES[key]} at ${faceName} in ${called(stage, 'stage')}: ${text}`,
  apply: (project) => {
    const path = schedulePath(project, stage, { face, key });
    return path === null || valueAt(project, path) === undefined ? project : writeAt(project, path, schedule);
  },
});

/** The constant of a schedule, or the offset of one that follows the set-point. */
export const setScheduleNumber = (stage: Stage, face: FaceId, faceName: string, key: ScheduleKey, entered: Entered): Command => ({
  name: `${SCHEDULE_NAMES[key]} at ${faceName} in ${called(stage, 'stage')} to ${entered.text}`,
  apply: (project) => {
    const path = schedulePath(project, stage, { face, key });
    const schedule = path === null ? undefined : valueAt(project, path);
    if (path === null || schedule === undefined) return project;
    if (typeof schedule === 'number') return enterAt(project, path, entered);
    const follows = typeof schedule === 'object' && schedule !== null && 'follow' in schedule;
    return follows ? enterAt(project, [...path, 'offset'], entered) : project;
  },
});

/** Both faces meet again what they met in the stage before; own ramps hold their last value. */
export const copyExposuresFromBefore = (stage: Stage): Command => ({
  name: `Exposures of ${called(stage, 'stage')} from the stage before`,
  apply: (project) => {
    const before = project.cycle.stages[indexOfId(project.cycle.stages, stage.id) - 1];
    if (before === undefined) return project;
    const exposures = { start: settled(before.exposures.start), end: settled(before.exposures.end) };
    return changeStage(project, stage, (item) => ({ ...item, exposures }));
  },
});

/** Grey radiation beside a film: to its surroundings, or to an enclosure of its own; null: none. */
export const setRadiation = (
  stage: Stage,
  face: FaceId,
  faceName: string,
  radiation: { emissivity: number; enclosure?: TemperatureSchedule } | null,
): Command => {
  const text = radiation === null ? 'none' : radiation.enclosure === undefined ? 'to the surroundings' : 'to an enclosure';
  return {
    name: `Radiation at ${faceName} in ${called(stage, 'stage')}: ${text}`,
    apply: (project) => {
      const index = indexOfId(project.cycle.stages, stage.id);
      if (index < 0 || project.cycle.stages[index].exposures[face].kind !== 'film') return project;
      return writeAt(project, ['cycle', 'stages', index, 'exposures', face, 'radiation'], radiation ?? undefined);
    },
  };
};

/** Emissivity of a face that radiates, alone or beside a film. */
export const setEmissivity = (stage: Stage, face: FaceId, faceName: string, entered: Entered): Command => ({
  name: `Emissivity at ${faceName} in ${called(stage, 'stage')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.cycle.stages, stage.id);
    const exposure = project.cycle.stages[index]?.exposures[face];
    const path = ['cycle', 'stages', index, 'exposures', face];
    if (exposure?.kind === 'radiation') return enterAt(project, [...path, 'emissivity'], entered);
    const beside = exposure?.kind === 'film' && exposure.radiation !== undefined;
    return beside ? enterAt(project, [...path, 'radiation', 'emissivity'], entered) : project;
  },
});

/** A number of a correlation: its length, m, or the velocity of the stream, m/s. */
export const setCorrelationNumber = (
  stage: Stage,
  face: FaceId,
  faceName: string,
  key: 'length' | 'velocity',
  entered: Entered,
): Command => ({
  name: `${key === 'length' ? 'Length' : 'Velocity'} of the correlation at ${faceName} in ${called(stage, 'stage')} to ${entered.text}`,
  apply: (project) => {
    const index = indexOfId(project.cycle.stages, stage.id);
    const path = ['cycle', 'stages', index, 'exposures', face, 'coefficient', key];
    return valueAt(project, path) === undefined ? project : enterAt(project, path, entered);
  },
});
