/** What a command line asks the window to open. */
import { resolve } from 'node:path';

export interface Asked {
  /** Absolute paths of project files. */
  files: string[];
  /** Id of a sample, from --sample=ID. */
  sample: string | null;
}

/** Reads the arguments after the program's own; switches that are not ours are the runtime's. */
export function readArguments(args: readonly string[], folder: string): Asked {
  const sample = args.map((arg) => /^--sample=([a-z0-9-]+)$/.exec(arg)?.[1]).find((id) => id !== undefined) ?? null;
  const files = args.filter((arg) => !arg.startsWith('-') && /\.(soak|json)$/i.test(arg)).map((arg) => resolve(folder, arg));
  return { files, sample };
}
