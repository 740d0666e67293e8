/**
 * Verdicts: what a requirement's tally amounts to.
 *
 * | must    | counts       | met                         | time_s                 | value, limit            | margin, positive is good
 * | ------- | ------------ | --------------------------- | ---------------------- | ----------------------- | ------------------------------
 * | reaches | cycle, stage | holds at any instant of it  | first instant it holds | best in the window      | K: best beyond the limit
 * | reaches | within       | holds by the latest time    | first instant it holds | best in the window      | s: latest allowed − time
 * | stays…  | any window   | holds at every instant      | of the worst           | worst in the window     | K: worst inside the limit
 * | reaches, stays… | stageEnd | holds at that instant   | the stage's end        | at that instant         | K: inside, beyond the limit
 * | heldFor | cycle, stage, within | longest unbroken time in the window ≥ duration | when first held that long | longest time, duration | s: longest − duration
 * | heldFor | stageEnd     | unbroken time up to that instant, from wherever in the cycle, ≥ duration | the stage's end | that time, duration | s: that time − duration
 *
 * - Equality counts as holding: a limit is reached, and is not broken, by a value that equals it (EQUAL_K).
 * - not-met: a limit broken; reached, but late (time_s tells when); held, but not long enough (time_s null); not so at the
 *   stage's end.
 * - never-reached: the condition held at no instant. For "reaches" the margin is what is missing, K, and the value the nearest
 *   it came; with "within" the margin is null and the value is the nearest in the rest of the cycle. For "heldFor" the value
 *   is 0 s. "Stays", and anything but "heldFor" at a stage's end, cannot be never-reached.
 * - cannot-be-judged: the run ended, or has not come, where nothing is decided: the window is not over, the limit not yet
 *   reached or not yet broken. What is decided stands: reached, broken, held long enough, too late. Too late without having
 *   been reached before the run stopped is not-met, time and margin null.
 * - A window of "within" ends with the cycle at the latest; the time allowed does not.
 * - An instant at which a hold begins or ends counts; a hold runs on over stage edges, but counts only inside its window.
 */
import type { Answer, LaidCycle, Requirement, Rule, Verdict } from '../model';
import type { Condition } from './course';
import { spansOf } from './spans';
import { SAME_TIME, type Hold, type Moment, type Tally } from './tally';

/** Rounding of a hold beside its duration, as a part of it. */
const SAME_DURATION = 1e-9;

/** The condition behind a rule. */
export function conditionOf(rule: Rule): Condition {
  switch (rule.kind) {
    case 'reaches':
    case 'heldFor':
      return { sense: rule.sense, limit: rule.limit };
    case 'staysBelow':
      return { sense: 'atMost', limit: rule.limit };
    case 'staysAbove':
      return { sense: 'atLeast', limit: rule.limit };
  }
}

/** Verdict and figures, before they are dressed as an answer. */
interface Judgement {
  verdict: Verdict;
  time: number | null;
  /** Index of the stage of `time`; null: the stage that holds it. */
  stage: number | null;
  value: number | null;
  margin: number | null;
  position: number | null;
}

const undecided: Judgement = {
  verdict: 'cannot-be-judged',
  time: null,
  stage: null,
  value: null,
  margin: null,
  position: null,
};

/** The answer to a requirement from its tally over the cycle up to `reached`, s. */
export function judge(requirement: Requirement, tally: Tally, cycle: LaidCycle, reached: number): Answer {
  const { must } = requirement;
  const over = (time: number): boolean => reached >= time - SAME_TIME * cycle.end;
  const judgement = judgementOf(requirement, tally, over);
  const stage = judgement.time === null ? null : (judgement.stage ?? stageAt(cycle, judgement.time));
  const inSeconds = must.kind === 'heldFor';
  return {
    requirement: requirement.id,
    name: requirement.name,
    verdict: judgement.verdict,
    met: judgement.verdict === 'cannot-be-judged' ? null : judgement.verdict === 'met',
    time_s: judgement.time,
    stage: stage === null ? null : cycle.stages[stage].id,
    stage_time_s: stage === null || judgement.time === null ? null : judgement.time - cycle.stages[stage].start,
    value: judgement.value,
    limit: inSeconds ? must.duration : must.limit,
    margin: judgement.margin,
    unit: inSeconds ? 's' : 'difference' in requirement.of ? 'K' : '°C',
    margin_unit: marginUnit(requirement),
    uncertainty: null,
    value_uncertainty: null,
    time_uncertainty_s: null,
    position_m: 'point' in requirement.of ? judgement.position : null,
    spans: spansOf(requirement, tally, reached),
  };
}

/** Unit of a requirement's margin: s for "within" and "held for", K for all other limits. */
const marginUnit = ({ must, counts }: Pick<Requirement, 'must' | 'counts'>): 'K' | 's' =>
  must.kind === 'heldFor' || (must.kind === 'reaches' && counts.kind === 'within') ? 's' : 'K';

function judgementOf({ must, counts }: Requirement, tally: Tally, over: (time: number) => boolean): Judgement {
  if (must.kind === 'heldFor') {
    return counts.kind === 'stageEnd' ? heldUpTo(must.duration, tally, over) : heldFor(must.duration, tally, over);
  }
  if (counts.kind === 'stageEnd') return atInstant(tally);
  if (must.kind !== 'reaches') return stays(tally, over);
  return counts.kind === 'within' ? reachesWithin(tally, over) : reaches(tally, over);
}

const from = (moment: Moment, tally: Tally): Omit<Judgement, 'verdict'> => ({
  time: moment.time,
  stage: moment.stage,
  value: moment.value,
  margin: tally.margin(moment.value),
  position: moment.position,
});

function atInstant(tally: Tally): Judgement {
  const { worst } = tally;
  if (worst === null) return undecided;
  return { ...from(worst, tally), verdict: tally.margin(worst.value) >= 0 ? 'met' : 'not-met' };
}

function stays(tally: Tally, over: (time: number) => boolean): Judgement {
  const { worst, window } = tally;
  if (worst !== null && tally.margin(worst.value) < 0) return { ...from(worst, tally), verdict: 'not-met' };
  return worst !== null && over(window.counts.to) ? { ...from(worst, tally), verdict: 'met' } : undecided;
}

function reaches(tally: Tally, over: (time: number) => boolean): Judgement {
  const { best, holds, window } = tally;
  if (best === null) return undecided;
  if (holds.length > 0) {
    const { time, stage, position } = holds[0].begin;
    return { ...from(best, tally), verdict: 'met', time, stage, position };
  }
  return over(window.counts.to) ? { ...from(best, tally), verdict: 'never-reached', time: null } : undecided;
}

function reachesWithin(tally: Tally, over: (time: number) => boolean): Judgement {
  const { best, bestEver, holds, window } = tally;
  if (best === null || bestEver === null) return undecided;
  if (holds.length > 0) {
    const { begin } = holds[0];
    const left = (window.latest ?? window.counts.to) - begin.time;
    const met = left >= -SAME_TIME * begin.time;
    return { ...from(begin, tally), verdict: met ? 'met' : 'not-met', value: best.value, margin: met ? Math.max(0, left) : left };
  }
  if (over(window.look.to)) return { ...from(bestEver, tally), verdict: 'never-reached', time: null, margin: null };
  return over(window.counts.to) ? { ...from(best, tally), verdict: 'not-met', time: null, margin: null } : undecided;
}

const lengthOf = (hold: Hold): number => hold.to - hold.begin.time;
const longEnough = (length: number, duration: number): boolean => length >= duration * (1 - SAME_DURATION);

function held(verdict: Verdict, hold: Hold | null, length: number, duration: number): Judgement {
  const margin = longEnough(length, duration) ? Math.max(0, length - duration) : length - duration;
  return { verdict, time: null, stage: null, value: length, margin, position: hold?.begin.position ?? null };
}

function heldFor(duration: number, tally: Tally, over: (time: number) => boolean): Judgement {
  const { holds, window } = tally;
  const longest = holds.reduce<Hold | null>(
    (most, hold) => (most === null || lengthOf(hold) > lengthOf(most) ? hold : most),
    null,
  );
  const first = holds.find((hold) => longEnough(lengthOf(hold), duration));
  if (first !== undefined && longest !== null) {
    const time = Math.min(first.begin.time + duration, first.to);
    return { ...held('met', first, lengthOf(longest), duration), time };
  }
  if (!over(window.counts.to)) return undecided;
  return longest === null ? held('never-reached', null, 0, duration) : held('not-met', longest, lengthOf(longest), duration);
}

function heldUpTo(duration: number, tally: Tally, over: (time: number) => boolean): Judgement {
  const { holds, window, best } = tally;
  const end = window.counts.to;
  if (best === null || !over(end)) return undecided;
  const last = holds.at(-1);
  if (last === undefined) return { ...held('never-reached', null, 0, duration), time: null };
  const length = last.to >= end - SAME_TIME * end ? lengthOf(last) : 0;
  return { ...held(longEnough(length, duration) ? 'met' : 'not-met', last, length, duration), time: end, stage: best.stage };
}

/** Index of the stage that holds a time; an edge belongs to the stage that ends there. */
function stageAt(cycle: LaidCycle, time: number): number {
  const index = cycle.stages.findIndex((stage) => time <= stage.end);
  return index < 0 ? cycle.stages.length - 1 : index;
}
