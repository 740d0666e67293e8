/** What a person should know about a run that went on all the same. */
import type { Energy, Warning } from '../model';
import type { Prepared } from './prepare';
import type { ExplicitLimit } from './stabilityLimit';
import { figure, seconds } from './words';

/** The lag of temperatures behind carried heat may be this part of the accuracy. */
const LARGEST_LAG = 0.2;
const LARGEST_CLOSURE = 1e-9;

/** Warnings of a run so far; `limit` is asked for where a step is compared with it. */
export function warningsOf(prepared: Prepared, limit: () => ExplicitLimit | null, energy: Energy): Warning[] {
  const { settings, wantedAccuracy } = prepared;
  const warnings: Warning[] = [];
  const warn = (code: string, place: string | null, message: string): void => void warnings.push({ code, message, place });
  if (settings.scheme === 'explicit') {
    const { noOvershoot } = limit() ?? { noOvershoot: Infinity };
    if (settings.step > noOvershoot) {
      warn(
        'overshoot',
        'settings.step',
        `Explicit, ${seconds(settings.step)}: stable, but temperatures can overshoot for a few steps after a jump. None would at ` +
          `${seconds(noOvershoot)} or less.`,
      );
    }
  }
  if (settings.scheme === 'crankNicolson' && settings.dampedSteps === 0) {
    const rings = limit()?.limit ?? Infinity;
    if (settings.step > rings) {
      warn(
        'ringing',
        'settings.dampedSteps',
        `Crank–Nicolson, ${seconds(settings.step)}, without damped steps: temperatures can ring after a jump, as the step is above ` +
          `${seconds(rings)}. Take damped steps (4 is usual), or a shorter step.`,
      );
    }
  }
  if (settings.scheme === 'automatic') {
    if (settings.accuracy > wantedAccuracy) {
      warn(
        'accuracy-limited',
        'settings.accuracy',
        `The accuracy of ${figure(wantedAccuracy)} K lies in the rounding of the numbers; ${figure(settings.accuracy)} K was used.`,
      );
    }
    if (energy.lag_K > LARGEST_LAG * settings.accuracy) {
      warn(
        'lag',
        null,
        `Temperatures lag behind the heat by up to ${figure(energy.lag_K)} K, more than a fifth of the accuracy. Ask for a finer one.`,
      );
    }
  }
  if (energy.closure > LARGEST_CLOSURE) {
    warn('closure', null, `The energy balance closes to ${figure(energy.closure)} of the heat exchanged only.`);
  }
  return warnings;
}
