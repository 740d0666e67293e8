/** How a command can end, for scripts; listed by `--help`. */
export const EXIT = {
  done: 0,
  requirementFailed: 1,
  usage: 2,
  badPlan: 3,
  notFinished: 4,
  noAccess: 5,
  ourFault: 70,
  interrupted: 130,
} as const;
export type ExitCode = (typeof EXIT)[keyof typeof EXIT];

export const EXIT_MEANINGS: Readonly<Record<keyof typeof EXIT, string>> = {
  done: 'done',
  requirementFailed: 'a requirement is not met, or cannot be judged (check only)',
  usage: 'the command was not understood',
  badPlan: 'the plan cannot be used: its place and what would be right are named',
  notFinished: 'the run was refused, or did not come to its end',
  noAccess: 'a file could not be read or written',
  ourFault: 'a fault of this program',
  interrupted: 'interrupted (Ctrl C)',
};
