import { readProject, wordProblem, type Project } from '../../solver/model';
import { wordFileError } from '../files';
import { EXIT, type ExitCode } from './exitCodes';
import { STANDARD_INPUT, type Io } from './io';

/** What remarks call the input. */
export const nameOf = (file: string): string => (file === STANDARD_INPUT ? 'standard input' : file);

/** A checked plan; or the exit code, after the reasons were said. */
export async function openPlan(file: string, io: Io): Promise<Project | ExitCode> {
  let text: string;
  try {
    text = await io.readInput(file);
  } catch (error) {
    io.remark(`soakwright: ${wordFileError(error, file, 'open')}\n`);
    return EXIT.noAccess;
  }
  const read = readProject(text);
  switch (read.kind) {
    case 'project':
      return read.project;
    case 'newer':
      io.remark(`${nameOf(file)}: ${read.message}\n`);
      return EXIT.badPlan;
    case 'problems':
      for (const problem of read.problems) io.remark(`${nameOf(file)}: ${wordProblem(problem)}\n`);
      return EXIT.badPlan;
  }
}
