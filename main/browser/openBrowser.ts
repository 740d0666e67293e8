/** Opens an address in the person's own browser, if this machine has one to show. */
import { spawn } from 'node:child_process';

/** The program that opens an address, or null where there is no screen to open it on. */
export function openerFor(
  platform: NodeJS.Platform,
  environment: NodeJS.ProcessEnv,
): [program: string, ...args: string[]] | null {
  if (platform === 'darwin') return ['open'];
  if (platform === 'win32') return ['cmd', '/c', 'start', ''];
  return environment['DISPLAY'] === undefined && environment['WAYLAND_DISPLAY'] === undefined ? null : ['xdg-open'];
}

/** True if a browser was asked; whether it came up cannot be known. */
export function openBrowser(url: string): Promise<boolean> {
  const opener = openerFor(process.platform, process.env);
  if (opener === null) return Promise.resolve(false);
  const [program, ...args] = opener;
  return new Promise((resolve) => {
    const child = spawn(program, [...args, url], { stdio: 'ignore', detached: true });
    child.once('error', () => resolve(false));
    child.once('spawn', () => {
      child.unref();
      resolve(true);
    });
  });
}
