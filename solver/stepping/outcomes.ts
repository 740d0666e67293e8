/** Every way a run can end: whether it counts as success, what usually causes it, and what to do. */
import type { Outcome, OutcomeReason } from '../model';

export interface OutcomeEntry {
  readonly success: boolean;
  readonly meaning: string;
  readonly causes: readonly string[];
  readonly whatToDo: string;
}

export const OUTCOMES: Readonly<Record<OutcomeReason, OutcomeEntry>> = {
  finished: {
    success: true,
    meaning: 'The run reached the end of the cycle.',
    causes: [],
    whatToDo: 'Read the answers.',
  },
  cancelled: {
    success: false,
    meaning: 'The run was stopped before the end of the cycle; what it gave up to there stands.',
    causes: ['someone stopped it', 'a newer edit took its place'],
    whatToDo: 'Run it again.',
  },
  'step-above-limit': {
    success: false,
    meaning:
      'The explicit scheme was not run, or was stopped: its step is above the stability limit, and the result would grow without bound.',
    causes: [
      'a thin layer or a fine grid',
      'a good conductor beside a poor one',
      'a strong film on a thin volume',
      'properties that changed further than foreseen while it ran',
    ],
    whatToDo: 'Take a step below the limit, fewer nodes in the layer that sets it, or another scheme.',
  },
  'step-too-small': {
    success: false,
    meaning: 'The automatic scheme could not keep its accuracy with any step that still moves time.',
    causes: ['an accuracy near the rounding of the numbers', 'values in the plan that differ by very many orders of magnitude'],
    whatToDo: 'Ask for a coarser accuracy, and check the values of the layer named.',
  },
  'not-converged': {
    success: false,
    meaning: 'The equations of an implicit step could not be solved: its step is too long for how steeply something changes.',
    causes: [
      'latent heat at a point, or a sharp peak of heat capacity, crossed in one step',
      'a steep curve of the film coefficient',
      'a fast reaction',
    ],
    whatToDo: 'Take a shorter step, or the automatic scheme.',
  },
  'not-finite': {
    success: false,
    meaning: 'A temperature became infinite or undefined.',
    causes: ['values in the plan beyond what the numbers hold'],
    whatToDo: 'Check the values of the layer and of the exposures named.',
  },
  'too-many-steps': {
    success: false,
    meaning: 'The run would take, or took, more steps than anyone would wait for.',
    causes: ['a step that is tiny beside the cycle', 'an accuracy far below what the plan can mean'],
    whatToDo: 'Take a longer step, a coarser accuracy, or the automatic scheme.',
  },
  'invalid-project': {
    success: false,
    meaning: 'The plan cannot be run as it stands.',
    causes: ['a value that is missing or out of bounds', 'more nodes than a run can hold'],
    whatToDo: 'Correct the place that is named.',
  },
};

/** Whether a run did what was asked: the one place that decides. */
export const succeeded = (outcome: Pick<Outcome, 'reason'>): boolean => OUTCOMES[outcome.reason].success;
