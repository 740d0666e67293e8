import type { HeatSystem } from '../heat';
import { Automatic } from './automatic';
import { CrankNicolson } from './crankNicolson';
import { Explicit } from './explicit';
import { Implicit } from './implicit';
import type { HeatState, Scheme } from './scheme';

/** What a scheme is made from: its name, with the accuracy (K) or the step (s) that it needs. */
export type SchemeSettings =
  | { readonly scheme: 'automatic'; readonly accuracy: number }
  | { readonly scheme: 'explicit' | 'implicit'; readonly step: number }
  | { readonly scheme: 'crankNicolson'; readonly step: number; readonly dampedSteps: number };

/** A scheme for a system and its state; `cycleEnd` in s. */
export function makeScheme(settings: SchemeSettings, system: HeatSystem, state: HeatState, cycleEnd: number): Scheme {
  switch (settings.scheme) {
    case 'automatic':
      return new Automatic(system, state, settings.accuracy, cycleEnd);
    case 'explicit':
      return new Explicit(system, state, settings.step);
    case 'implicit':
      return new Implicit(system, state, settings.step);
    case 'crankNicolson':
      return new CrankNicolson(system, state, settings.step, settings.dampedSteps);
  }
}
