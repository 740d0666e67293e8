/** A made-up world for commands: files in memory, output kept, an interruption by hand. */
import { readFileSync } from 'node:fs';
import { soakwright, type ExitCode, type Io } from '../../../main/cli';

export const sampleText = (id: string): string => readFileSync(new URL(`../../../samples/${id}.soak`, import.meta.url), 'utf8');

export interface World {
  /** Texts by path; an Error is what reading it throws. */
  files?: Record<string, string | Error>;
  /** What printing a result throws. */
  printing?: Error;
  /** What writing throws. */
  writing?: Error;
  colour?: boolean;
  terminal?: boolean;
  /** Called with every remark; may interrupt. */
  onRemark?: (text: string, interrupt: () => void) => void;
  interrupted?: boolean;
}

export interface Ended {
  code: ExitCode;
  out: string;
  err: string;
  written: Record<string, string>;
}

/** Runs `soakwright` with these arguments in such a world. */
export async function command(args: string[], world: World = {}): Promise<Ended> {
  const { files = {}, writing, colour = false, terminal = false } = world;
  const controller = new AbortController();
  if (world.interrupted) controller.abort();
  const ended: Omit<Ended, 'code'> = { out: '', err: '', written: {} };
  const io: Io = {
    version: '1.2.3',
    print(text) {
      if (world.printing !== undefined) throw world.printing;
      ended.out += text;
    },
    remark(text) {
      ended.err += text;
      world.onRemark?.(text, () => controller.abort());
    },
    colour,
    terminal,
    async readInput(file) {
      const text = files[file] ?? systemError('ENOENT');
      if (text instanceof Error) throw text;
      return text;
    },
    async writeInto(folder, name, text) {
      if (writing !== undefined) throw writing;
      ended.written[`${folder}/${name}`] = text;
    },
    signal: controller.signal,
  };
  const code = await soakwright(args, io);
  return { code, ...ended };
}

/** An error as the file system throws it. */
export const systemError = (code: string): Error => Object.assign(new Error(`${code}: raw words of the system`), { code });
