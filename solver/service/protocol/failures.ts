/** Why a job could not be carried out: cancelled, connection lost, refused and broken are different things. */
export const FAILURES = {
  cancelled: 'The run was cancelled before it began.',
  superseded: 'A newer edit took the place of this run.',
  'not-understood': 'The solver did not understand the message.',
  'invalid-project': 'The plan has a problem that keeps it from running.',
  'other-version': 'The solver and the window come from different versions of the program; start the program again.',
  'not-started': 'The solver could not be started.',
  'solver-gone': 'The solver ended before its time.',
  'solver-silent': 'The solver did not answer any more.',
  broken: 'The solver met a fault of its own.',
} as const;
export type FailureCode = keyof typeof FAILURES;
