/** Edits of what a face meets during a stage. */
import type { Exposure, ExposureKind, FaceId, PlainSchedule, Stage, TemperatureSchedule } from '../../solver/model';
import { valueAt } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { enterAt, indexOfId, writeAt } from './edit';
import { schedulePath, type ScheduleKey } from './segments';
import { changeStage, settled } from './stages';

export const EXPOSURE_NAMES: Record<ExposureKind, string> = {
  film: 'film',
  temperature: 'fixed temperature',
  flux: 'heat flux',
  insulated: 'insulated',
};

const AIR_FILM = 10;
const ROOM_C = 20;

/** An exposure of another kind that keeps what both kinds know: the temperature outside. */
export function exposureOfKind(kind: ExposureKind, before: Exposure): Exposure {
  const outside: TemperatureSchedule =
    before.kind === 'film' ? before.surroundings : before.kind === 'temperature' ? before.temperature : ROOM_C;
  switch (kind) {
    case 'insulated':
      return { kind };
    case 'flux':
      return { kind, flux: 0 };
    case 'temperature':
      return { kind, temperature: outside };
    case 'film':
      return { kind, coefficient: AIR_FILM, surroundings: outside };
  }
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
};

/** Replaces a whole schedule: a constant, the set-point, or ramps of its own. `text` says which for the undo list. */
export const setSchedule = (
  stage: Stage,
  face: FaceId,
  faceName: string,
  key: ScheduleKey,
  schedule: TemperatureSchedule | PlainSchedule,
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
