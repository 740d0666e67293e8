/** What was asked for on the command line. */
import { parseArgs } from 'node:util';

export type Command =
  | { kind: 'help' }
  | { kind: 'version' }
  | { kind: 'run'; file: string; json: boolean; csv: string | null; quiet: boolean }
  | { kind: 'check'; file: string; quiet: boolean }
  | { kind: 'validate'; file: string; quiet: boolean };

/** The command, or what is wrong with it. */
export function readArguments(args: string[]): Command | { kind: 'usage'; message: string } {
  const usage = (message: string) => ({ kind: 'usage' as const, message });
  let parsed: ReturnType<typeof parse>;
  try {
    parsed = parse(args);
  } catch (error) {
    // The first sentence says what is wrong; the ones after it speak of the parser.
    return usage((error as Error).message.split('. ')[0]);
  }
  const { values, positionals } = parsed;
  if (values.help) return { kind: 'help' };
  if (values.version) return { kind: 'version' };
  const [name, file, ...more] = positionals;
  if (name === undefined) return usage('There is no command');
  if (name !== 'run' && name !== 'check' && name !== 'validate') return usage(`"${name}" is not a command`);
  if (file === undefined) return usage(`${name} needs a FILE, or - for standard input`);
  if (more.length > 0) return usage(`${name} takes one FILE, got also "${more[0]}"`);
  const { json, csv, quiet } = values;
  if (name === 'run') return { kind: 'run', file, json, csv: csv ?? null, quiet };
  if (json || csv !== undefined) return usage(`${json ? '--json' : '--csv'} belongs to run, not to ${name}`);
  return { kind: name, file, quiet };
}

const parse = (args: string[]) =>
  parseArgs({
    args,
    allowPositionals: true,
    options: {
      help: { type: 'boolean', short: 'h', default: false },
      version: { type: 'boolean', default: false },
      json: { type: 'boolean', default: false },
      csv: { type: 'string' },
      quiet: { type: 'boolean', short: 'q', default: false },
    },
  });
