import { readArguments } from './arguments';
import { check, run, validate } from './commands';
import { EXIT, type ExitCode } from './exitCodes';
import { HELP } from './help';
import type { Io } from './io';

/** Does what the arguments ask for and returns the exit code. Never throws, never ends the process, never shows a stack. */
export async function soakwright(args: string[], io: Io): Promise<ExitCode> {
  const command = readArguments(args);
  try {
    switch (command.kind) {
      case 'usage':
        io.remark(`soakwright: ${command.message}. See soakwright --help.\n`);
        return EXIT.usage;
      case 'help':
        io.print(HELP);
        return EXIT.done;
      case 'version':
        io.print(`soakwright ${io.version}\n`);
        return EXIT.done;
      case 'run':
        return await run(command.file, command, io);
      case 'check':
        return await check(command.file, command, io);
      case 'validate':
        return await validate(command.file, command, io);
    }
  } catch (error) {
    io.remark(`soakwright: a fault of this program: ${error instanceof Error ? error.message : String(error)}\n`);
    return EXIT.ourFault;
  }
}
