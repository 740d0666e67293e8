/** What a planner should know besides the answers: things that are allowed, and most likely not meant. */
import {
  FACES,
  layState,
  placeOf,
  type Answer,
  type LaidCycle,
  type LaidExposure,
  type Outcome,
  type Project,
  type Requirement,
  type Warning,
} from '../model';
import { instantOf, timesOf } from '../materials';

/** Warnings that the plan itself gives, before a step is taken. */
export function planWarnings(project: Project, cycle: LaidCycle): Warning[] {
  return [
    ...sameNames(project.probes, 'probes', 'probe'),
    ...sameNames(project.requirements, 'requirements', 'requirement'),
    ...project.requirements.flatMap((requirement, index) => [
      ...windowWarnings(requirement, index, cycle),
      ...reachWarnings(requirement, index, project, cycle),
    ]),
  ];
}

/** Warnings that follow from how the run ended. */
export function runWarnings(outcome: Outcome, answers: readonly Answer[]): Warning[] {
  const open = answers.filter(({ verdict }) => verdict === 'cannot-be-judged').length;
  if (outcome.reason === 'finished' || open === 0) return [];
  const message =
    `The run ended at ${time(outcome.reached_s)}, before ${open} of ${answers.length} requirements could be judged; ` +
    'those judged were decided by then.';
  return [{ code: 'not-judged', message, place: null }];
}

function sameNames(list: readonly { name: string }[], key: string, what: string): Warning[] {
  return list.flatMap(({ name }, index) => {
    if (name === '' || list.findIndex((other) => other.name === name) === index) return [];
    return [
      { code: `${what}-name-twice`, message: `Another ${what} is named "${name}" too.`, place: placeOf([key, index, 'name']) },
    ];
  });
}

function windowWarnings({ name, must, counts }: Requirement, index: number, cycle: LaidCycle): Warning[] {
  const stage = 'stage' in counts ? counts.stage : counts.kind === 'within' ? counts.from : undefined;
  const laid = cycle.stages.find(({ id }) => id === stage);
  const from = counts.kind === 'stageEnd' ? 0 : (laid?.start ?? 0);
  const left = (counts.kind === 'stage' || counts.kind === 'stageEnd' ? (laid?.end ?? cycle.end) : cycle.end) - from;
  const warnings: Warning[] = [];
  if (counts.kind === 'within' && counts.time > left * (1 + 1e-9)) {
    warnings.push({
      code: 'window-beyond-cycle',
      message: `"${name}" allows ${time(counts.time)}, but the cycle ends ${time(left)} after the time begins to count.`,
      place: placeOf(['requirements', index, 'counts', 'time']),
    });
  }
  const room = counts.kind === 'within' ? Math.min(counts.time, left) : left;
  if (must.kind === 'heldFor' && must.duration > room * (1 + 1e-9)) {
    warnings.push({
      code: 'hold-longer-than-window',
      message: `"${name}" cannot be met: ${time(must.duration)} do not fit into the ${time(room)} in which it counts.`,
      place: placeOf(['requirements', index, 'must', 'duration']),
    });
  }
  return warnings;
}

/**
 * A limit that no point can come to. With no source, no reaction and no imposed flux, temperatures stay between the
 * lowest and the highest of the initial ones and those at the faces (the maximum principle of heat conduction).
 */
function reachWarnings({ name, of, must }: Requirement, index: number, project: Project, cycle: LaidCycle): Warning[] {
  if ('difference' in of || must.kind === 'staysBelow' || must.kind === 'staysAbove') return [];
  const [lowest, highest] = span(project, cycle);
  const place = placeOf(['requirements', index, 'must', 'limit']);
  if (must.sense === 'atLeast' && must.limit > highest) {
    const message = `"${name}" cannot be met: nothing in the plan is hotter than ${degrees(highest)}, the limit is ${degrees(must.limit)}.`;
    return [{ code: 'limit-out-of-reach', message, place }];
  }
  if (must.sense === 'atMost' && must.limit < lowest) {
    const message = `"${name}" cannot be met: nothing in the plan is colder than ${degrees(lowest)}, the limit is ${degrees(must.limit)}.`;
    return [{ code: 'limit-out-of-reach', message, place }];
  }
  return [];
}

/** Lowest and highest temperature that any point can have, °C; without bounds where a flux is imposed or heat is given off. */
function span(project: Project, cycle: LaidCycle): [number, number] {
  const met = initialTemperatures(project);
  for (const { exposures, sources, start, end } of cycle.stages) {
    for (const face of FACES) met.push(...temperaturesAt(exposures[face], start, end));
    // What an expression of a source comes to is known only while it runs.
    const powers = sources.flatMap(({ power }) => ('expression' in power ? [1, -1] : power.value));
    met.push(...powers.filter((power) => power !== 0).map((power) => power * Infinity));
  }
  for (const { reaction } of project.materials)
    if (reaction !== undefined && reaction.heat !== 0) met.push(reaction.heat * Infinity);
  return [Math.min(...met), Math.max(...met)];
}

/** Temperatures between which the start lies. */
function initialTemperatures({ initial, part, cycle }: Project): number[] {
  if ('temperature' in initial) return [initial.temperature];
  if ('layers' in initial) return initial.layers.map(({ temperature }) => temperature);
  if ('profile' in initial) return initial.profile.map(([, temperature]) => temperature);
  const { exposures, start, end } = layState({ part, cycle }, { exposures: initial.steady });
  return FACES.flatMap((face) => temperaturesAt(exposures[face], start, end));
}

/** Temperatures that a face meets between two times; none that bounds where a flux is imposed. */
const temperaturesAt = (exposure: LaidExposure, start: number, end: number): number[] =>
  timesOf(exposure, start, end).flatMap((time) =>
    (['before', 'after'] as const).flatMap((side) => {
      const { outside, flux } = instantOf(exposure, time, side);
      if (exposure.kind !== 'flux') return outside;
      const imposed = flux(0);
      return imposed === 0 ? [] : [imposed * Infinity];
    }),
  );

const degrees = (value: number): string => `${Number(value.toPrecision(6))} °C`;

/** "28 h 00 min", "45 min 30 s", "12.5 s". */
function time(seconds: number): string {
  if (seconds < 60) return `${Number(seconds.toPrecision(4))} s`;
  const whole = Math.round(seconds);
  const [hours, minutes, rest] = [Math.floor(whole / 3600), Math.floor((whole % 3600) / 60), whole % 60];
  if (hours > 0 && rest === 0) return `${hours} h ${String(minutes).padStart(2, '0')} min`;
  if (hours > 0) return `${hours} h ${String(minutes).padStart(2, '0')} min ${String(rest).padStart(2, '0')} s`;
  return rest === 0 ? `${minutes} min` : `${minutes} min ${rest} s`;
}
