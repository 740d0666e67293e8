/** Random probes and requirements, of every kind, with limits among the temperatures that the plan can meet. */
import type { Part, Probe, Requirement } from '../../../solver/model';
import { isSolid } from '../../../solver/model';
import { round, type Dice } from './dice';

export interface Span {
  /** Lowest and highest temperature of the start and of all surroundings, °C. */
  readonly lowest: number;
  readonly highest: number;
  /** Temperature at the start, about. */
  readonly start: number;
}

export function randomProbes(dice: Dice, part: Part): Probe[] {
  const place = (): Probe['at'] => {
    const kind = dice.next();
    const layer = dice.pick(part.layers);
    if (kind < 0.25) return { face: isSolid(part) || dice.chance(0.5) ? 'end' : 'start' };
    if (kind < 0.45 && part.layers.length > 1) {
      return { interface: part.layers[dice.whole(0, part.layers.length - 2)].id, side: dice.chance(0.5) ? 'before' : 'after' };
    }
    if (kind < 0.75) return { fraction: dice.pick([0.25, 0.5, 0.5, 0.75, 0]), layer: layer.id };
    const thickness = part.layers.reduce((sum, { thickness }) => sum + thickness, 0);
    return { depth: round(0.999 * thickness * dice.next()) };
  };
  return Array.from({ length: dice.whole(1, 3) }, (_, i) => ({ id: `p${i + 1}`, name: `Probe ${i + 1}`, at: place() }));
}

export function randomRequirements(
  dice: Dice,
  probes: readonly Probe[],
  stages: readonly { id: string; length: number }[],
  span: Span,
): Requirement[] {
  return Array.from({ length: dice.whole(2, 4) }, (_, i) => ({
    id: `r${i + 1}`,
    name: `Requirement ${i + 1}`,
    ...randomRule(dice, probes, stages, span),
  }));
}

function randomRule(
  dice: Dice,
  probes: readonly Probe[],
  stages: readonly { id: string; length: number }[],
  span: Span,
): Pick<Requirement, 'of' | 'must' | 'counts'> {
  const subject = dice.next();
  const isDifference = subject >= 0.8;
  const of: Requirement['of'] =
    subject < 0.5
      ? { probe: dice.pick(probes).id }
      : isDifference
        ? { difference: dice.chance(0.5) ? 'part' : 'material' }
        : { point: dice.chance(0.5) ? 'coldest' : 'hottest' };
  const upward = span.highest - span.start > span.start - span.lowest;
  const target = upward ? span.highest : span.lowest;
  const limit = isDifference
    ? round(dice.between(0.05, 0.6) * (span.highest - span.lowest) + 1)
    : round(span.start + dice.between(0.1, 0.85) * (target - span.start));
  return { of, must: ruleFor(dice, isDifference, upward, limit, stages), counts: countsFor(dice, stages) };
}

function ruleFor(
  dice: Dice,
  isDifference: boolean,
  upward: boolean,
  limit: number,
  stages: readonly { length: number }[],
): Requirement['must'] {
  const towards = isDifference ? 'atMost' : upward ? 'atLeast' : 'atMost';
  const sense = dice.chance(0.85) ? towards : towards === 'atMost' ? 'atLeast' : 'atMost';
  const kind = dice.next();
  if (kind < 0.4) return { kind: 'reaches', sense, limit };
  if (kind < 0.78) return { kind: isDifference || upward ? 'staysBelow' : 'staysAbove', limit };
  return { kind: 'heldFor', sense, limit, duration: round(dice.pick(stages).length * dice.between(0.05, 0.5)) };
}

function countsFor(dice: Dice, stages: readonly { id: string; length: number }[]): Requirement['counts'] {
  const stage = dice.pick(stages);
  const kind = dice.next();
  if (kind < 0.4) return { kind: 'cycle' };
  if (kind < 0.6) return { kind: 'stage', stage: stage.id };
  if (kind < 0.82)
    return {
      kind: 'within',
      time: round(stage.length * dice.between(0.3, 1.5)),
      ...(dice.chance(0.4) ? { from: stage.id } : {}),
    };
  return { kind: 'stageEnd', stage: stage.id };
}
