/** The commands: each does its work, prints, and returns its exit code; none ends the process. */
import { buildReport, type Outcome, type Project, type Report, type RunResult } from '../../solver/model';
import { wordFileError } from '../files';
import { csvFiles } from './csv';
import { EXIT, type ExitCode } from './exitCodes';
import { passes } from './figures';
import type { Io } from './io';
import { nameOf, openPlan } from './openPlan';
import { runPlan } from './runPlan';
import { answersTable, noPaint, runText, terminalPaint, type Paint } from './tables';

const paintFor = (io: Io): Paint => (io.colour ? terminalPaint : noPaint);

/** Opens and runs a plan; a run that ended too early is a result too. */
async function runFile(file: string, quiet: boolean, io: Io): Promise<{ project: Project; result: RunResult } | ExitCode> {
  const project = await openPlan(file, io);
  if (typeof project === 'number') return project;
  const ran = await runPlan(project, io, quiet);
  if (ran.kind === 'result') return { project, result: ran.result };
  if (io.signal.aborted) return EXIT.interrupted;
  io.remark(`soakwright: ${ran.message}\n`);
  return EXIT.ourFault;
}

/** 0 for a run that finished; otherwise its reason is said. */
function exitOf(outcome: Outcome, file: string, io: Io): ExitCode {
  // Interrupted while the run was over and its uncertainty still sought.
  if (outcome.reason === 'finished') return io.signal.aborted ? EXIT.interrupted : EXIT.done;
  io.remark(`${nameOf(file)}: ${outcome.message ?? outcome.reason}\n`);
  if (outcome.reason === 'cancelled') return EXIT.interrupted;
  return outcome.reason === 'invalid-project' ? EXIT.badPlan : EXIT.notFinished;
}

export interface RunOptions {
  json: boolean;
  /** Folder for tables; null for none. */
  csv: string | null;
  quiet: boolean;
}

/** Prints the answers as tables, or gives them as JSON, as CSV files, or as both. */
export async function run(file: string, { json, csv, quiet }: RunOptions, io: Io): Promise<ExitCode> {
  const ran = await runFile(file, quiet, io);
  if (typeof ran === 'number') return ran;
  const { project, result } = ran;
  const report = buildReport(project, result);
  if (csv !== null) {
    const failed = await writeTables(csv, project, result, io, quiet);
    if (failed !== null) return failed;
  }
  if (json) io.print(`${JSON.stringify(report)}\n`);
  else if (csv === null && result.outcome.reached_s > 0) io.print(runText(project, report, paintFor(io)));
  return exitOf(result.outcome, file, io);
}

async function writeTables(
  folder: string,
  project: Project,
  result: RunResult,
  io: Io,
  quiet: boolean,
): Promise<ExitCode | null> {
  for (const [name, text] of csvFiles(project, result)) {
    try {
      await io.writeInto(folder, name, text);
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code === undefined) throw error;
      io.remark(`soakwright: ${wordFileError(error, `${folder}/${name}`, 'save')}\n`);
      return EXIT.noAccess;
    }
    if (!quiet) io.remark(`Wrote ${folder}/${name}\n`);
  }
  return null;
}

/** Prints the verdicts, and sums them up; 1 where a requirement is not met or cannot be judged. */
export async function check(file: string, { quiet }: { quiet: boolean }, io: Io): Promise<ExitCode> {
  const ran = await runFile(file, quiet, io);
  if (typeof ran === 'number') return ran;
  const { project, result } = ran;
  const report = buildReport(project, result);
  if (result.outcome.reached_s > 0) io.print(`${report.title}\n${answersTable(project, report, paintFor(io))}`);
  const ended = exitOf(result.outcome, file, io);
  if (ended !== EXIT.done) return ended;
  return sumUp(report, quiet, io);
}

/** Says how many requirements are met; 1 unless all are. A thin margin passes, with a remark. */
export function sumUp(report: Report, quiet: boolean, io: Pick<Io, 'print' | 'remark'>): ExitCode {
  io.print(`${summaryOf(report)}\n`);
  const thin = quiet ? [] : report.answers.filter(({ verdict }) => verdict === 'thin');
  for (const { name } of thin) io.remark(`"${name}" is met with a thin margin: the limit lies within its uncertainty.\n`);
  return report.answers.every(({ verdict }) => passes(verdict)) ? EXIT.done : EXIT.requirementFailed;
}

function summaryOf({ answers }: Report): string {
  const met = answers.filter(({ verdict }) => passes(verdict)).length;
  if (answers.length === 0) return 'Nothing to check.';
  if (met === answers.length) return answers.length === 1 ? 'The requirement is met.' : `All ${met} requirements are met.`;
  return `${met} of ${answers.length} requirements ${met === 1 ? 'is' : 'are'} met.`;
}

/** Says that a file is a plan that can be run, or names every problem with its place. */
export async function validate(file: string, { quiet }: { quiet: boolean }, io: Io): Promise<ExitCode> {
  const project = await openPlan(file, io);
  if (typeof project === 'number') return project;
  if (!quiet) io.print(`${nameOf(file)}: a plan that can be run\n`);
  return EXIT.done;
}
