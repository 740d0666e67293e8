/** The real world of a command. */
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { text } from 'node:stream/consumers';
import { readText, saveText } from '../files';
import { STANDARD_INPUT, type Io } from './io';

export function nodeIo(version: string, signal: AbortSignal): Io {
  const { stdout, stderr, env } = process;
  const plain = (env['NO_COLOR'] ?? '') !== '' || env['TERM'] === 'dumb';
  return {
    version,
    print: (words) => void stdout.write(words),
    remark: (words) => void stderr.write(words),
    colour: stdout.isTTY === true && !plain,
    terminal: stderr.isTTY === true && env['TERM'] !== 'dumb',
    readInput: async (file) => (file === STANDARD_INPUT ? await text(process.stdin) : (await readText(file)).text),
    async writeInto(folder, name, words) {
      await mkdir(folder, { recursive: true });
      await saveText(join(folder, name), words);
    },
    signal,
  };
}
