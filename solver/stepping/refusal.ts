/** Plans that are not run: decided before the first step, with the figures that say why. */
import type { Outcome, OutcomeReason } from '../model';
import { stepsIn } from './fixedSteps';
import type { Prepared } from './prepare';
import { countThatDoes, type ExplicitLimit } from './stabilityLimit';
import { depth, figure, layerNamed, roundedDown, seconds } from './words';

/** More steps of a chosen length than anyone would wait for. */
export const MOST_STEPS = 20_000_000;

const SCHEME_NAMES = { explicit: 'Explicit', implicit: 'Implicit', crankNicolson: 'Crank–Nicolson' } as const;

/** Why a plan is not run, as its outcome; null: it can be. `limit` is asked for explicit steps only. */
export function refusalOf(prepared: Prepared, limit: () => ExplicitLimit | null): Outcome | null {
  if (prepared.unusable !== null) return refused('invalid-project', prepared.unusable);
  const { settings, intervals } = prepared;
  if (settings.scheme === 'automatic') return null;
  const { scheme, step } = settings;
  if (scheme === 'explicit') {
    const explicitLimit = limit();
    if (explicitLimit !== null && step > explicitLimit.limit) return aboveLimit(prepared, step, explicitLimit);
  }
  const steps = intervals.reduce((sum, { from, to }) => sum + stepsIn(to - from, step), 0);
  if (steps > MOST_STEPS) {
    const end = prepared.cycle.end;
    return refused(
      'too-many-steps',
      `${SCHEME_NAMES[scheme]}, ${seconds(step)}: not run. The cycle of ${seconds(end)} would take ${figure(steps)} steps, more ` +
        `than the ${figure(MOST_STEPS)} that are run at most. Take a longer step, or the automatic scheme.`,
    );
  }
  return null;
}

const refused = (reason: OutcomeReason, message: string): Outcome => ({ reason, reached_s: 0, stage: null, message });

function aboveLimit(prepared: Prepared, step: number, limit: ExplicitLimit): Outcome {
  const { layers, grid, cycle } = prepared;
  const count = countThatDoes(layers, grid, cycle, limit.layer, step);
  const doable = roundedDown(limit.limit);
  const fewer = count === null ? '' : `, or ${count} ${grid.kind} in that layer`;
  return {
    ...refused(
      'step-above-limit',
      `Explicit, ${seconds(step)}: not run. The stability limit is ${seconds(limit.limit)}, set by ` +
        `${layerNamed(layers[limit.layer].name)} at ${depth(limit.depth)}. Take ${seconds(doable)} or less${fewer}, or the automatic scheme.`,
    ),
    remedy: { step_s: doable, nodes: count },
  };
}
