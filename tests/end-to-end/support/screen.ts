/** A screen in memory, of our own: the window needs one and the machine may have none. */
import { spawn } from 'node:child_process';
import { findScreen } from './machine';

export interface Screen {
  /** For DISPLAY. */
  readonly display: string;
  close(): void;
}

export async function startScreen(width = 1600, height = 1000): Promise<Screen> {
  const program = findScreen();
  if (program === null) throw new Error('Xvfb is not on this machine');
  const size = ['-screen', '0', `${width}x${height}x24`];
  const child = spawn(program, ['-displayfd', '3', ...size, '-nolisten', 'tcp'], {
    stdio: ['ignore', 'ignore', 'ignore', 'pipe'],
  });
  const number = await new Promise<string>((found, failed) => {
    child.once('exit', (code) => failed(new Error(`Xvfb ended with code ${code}`)));
    child.stdio[3]?.once('data', (data: Buffer) => found(data.toString().trim()));
  });
  return { display: `:${number}`, close: () => void child.kill() };
}
