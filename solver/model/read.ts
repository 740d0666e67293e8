/** The one way in: text → JSON → version → migrate → check → project. Nothing else builds a project from foreign data. */
import { crossCheck } from './check';
import { checkMigrations, migrate, migrations, type PlainDocument } from './migrations';
import { problemsOf, type Problem } from './problems';
import { FORMAT, VERSION, projectSchema, type Project } from './project';

checkMigrations(migrations, VERSION);

export type ReadResult =
  | { kind: 'project'; project: Project; migratedFrom: number | null }
  | { kind: 'problems'; problems: Problem[] }
  /** Written by a newer version: refused, and the file stays as it is. */
  | { kind: 'newer'; version: number; message: string };

/** Reads a project from the text of a file. */
export function readProject(text: string): ReadResult {
  let document: unknown;
  try {
    document = JSON.parse(text.charCodeAt(0) === 0xfeff ? text.slice(1) : text);
  } catch (error) {
    return { kind: 'problems', problems: [{ path: [], message: `is not JSON: ${wordJsonError(error, text)}` }] };
  }
  return checkProject(document);
}

/** Checks foreign data (a parsed file, a pasted or received project). */
export function checkProject(document: unknown): ReadResult {
  if (typeof document !== 'object' || document === null || Array.isArray(document)) {
    return { kind: 'problems', problems: [{ path: [], message: 'must be a JSON object that holds a plan' }] };
  }
  const plain = document as PlainDocument;
  if (plain['format'] !== FORMAT) {
    return { kind: 'problems', problems: [{ path: ['format'], message: `must be "${FORMAT}": this is not a Soakwright plan` }] };
  }
  const version = plain['version'];
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1) {
    return { kind: 'problems', problems: [{ path: ['version'], message: 'must be a whole number from 1 on' }] };
  }
  const outcome = migrate(plain, version, VERSION);
  if (outcome.kind === 'newer') {
    return {
      kind: 'newer',
      version,
      message: `Written by a newer version, format ${version}; this one reads up to format ${VERSION}. The file stays untouched.`,
    };
  }
  const checked = projectSchema.safeParse(outcome.document);
  if (!checked.success) return { kind: 'problems', problems: problemsOf(checked.error.issues, outcome.document) };
  const problems = crossCheck(checked.data);
  if (problems.length > 0) return { kind: 'problems', problems };
  return { kind: 'project', project: checked.data, migratedFrom: outcome.kind === 'migrated' ? outcome.from : null };
}

/** The text of a file: JSON with two spaces and a newline at the end. */
export const writeProject = (project: Project): string => `${JSON.stringify(project, null, 2)}\n`;

function wordJsonError(error: unknown, text: string): string {
  const message = error instanceof Error ? error.message : String(error);
  const at = /position (\d+)/.exec(message);
  if (at === null) return text.trim() === '' ? 'the file is empty' : 'it breaks off or has a stray character';
  const before = text.slice(0, Number(at[1])).split('\n');
  return `line ${before.length}, column ${(before.at(-1)?.length ?? 0) + 1}`;
}
