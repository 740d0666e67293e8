/** What is said of a run that ended before its cycle did: when, where, probably why, and what to do. */
import type { Outcome } from '../model';
import type { FailedStep } from './scheme';
import { roundedDown, seconds } from './words';

export const tooManySteps = (when: string, steps: number): string =>
  `Stopped ${when}, after ${steps} steps. Ask for a coarser accuracy.`;

/** `limit`: the stability limit as things were when the run ended, s; asked for where it says something. */
export function wordFailure(
  reason: FailedStep,
  when: string,
  where: string,
  limit: () => number,
): Pick<Outcome, 'message' | 'remedy'> {
  switch (reason) {
    case 'step-too-small':
      return {
        message:
          `Stopped ${when}: no step keeps the accuracy at ${where}. It may lie in the rounding of the numbers; ask for a coarser ` +
          `accuracy, or check the values there.`,
      };
    case 'not-converged':
      return {
        message:
          `Stopped ${when}: the equations of one step could not be solved; what changed most was ${where}. Something there is too ` +
          `steep for so long a step: latent heat, a peak of the heat capacity, a film curve, a reaction. Take a shorter step, or ` +
          `the automatic scheme.`,
      };
    case 'step-above-limit': {
      const doable = roundedDown(limit());
      return {
        message:
          `Stopped ${when}: the stability limit has fallen below the step, to ${seconds(limit())} at ${where}, further than the ` +
          `temperatures foreseen would bring it. Take ${seconds(doable)} or less, or the automatic scheme.`,
        remedy: { step_s: doable, nodes: null },
      };
    }
    case 'not-finite':
      return {
        message: `Stopped ${when}: the temperature at ${where} is not a finite number. Check the values there and of the exposures.`,
      };
  }
}
