import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { resolve } from 'node:path';
import { chromium } from 'playwright-core';
import { afterEach, describe, expect, it } from 'vitest';
import { expectText } from '../support/desk';
import { CHROMIUM_SWITCHES } from '../support/hosts';
import { findChromium } from '../support/machine';

const root = resolve(import.meta.dirname, '../../..');
let program: ChildProcess | undefined;
afterEach(() => program?.kill('SIGKILL'));

/** `npm start` on a machine without a runtime and without a screen; gives what it says until it waits. */
async function start(...args: string[]): Promise<string> {
  const { DISPLAY: _screen, WAYLAND_DISPLAY: _other, ...env } = process.env;
  env['ELECTRON_OVERRIDE_DIST_PATH'] = '/nowhere';
  const hooks = ['--import', './typescript.hooks.js', 'main/browser/start.ts'];
  program = spawn(process.execPath, [...hooks, ...args], { cwd: root, env, stdio: ['ignore', 'pipe', 'inherit'] });
  let said = '';
  for await (const chunk of program.stdout as NodeJS.ReadableStream) {
    said += String(chunk);
    if (said.includes('Ctrl C')) break;
  }
  return said;
}

describe('npm start without Electron’s runtime', () => {
  it('says so in one sentence and serves the first sample, solved, until Ctrl C', async () => {
    const said = await start();
    const sentence =
      /^Electron's runtime is not here \(.+\), so Soakwright opens in your browser: (http:\/\/127\.0\.0\.1:\d+\/\?sample=\S+)$/m;
    const [, url] = sentence.exec(said) ?? [];
    expect(said).toMatch(sentence);

    const browser = await chromium.launch({ executablePath: findChromium() ?? '', args: CHROMIUM_SWITCHES });
    const page = await browser.newPage();
    await page.goto(url);
    await expectText(page, 'Ladle lining, first dry-out');
    await expectText(page, 'Slowest point');
    await expectText(page, 'Live');
    await browser.close();

    program?.kill('SIGINT');
    const [code] = await once(program as ChildProcess, 'exit');
    expect(code).toBe(0);
  });

  it('explains where to open a file that it was given', async () => {
    const said = await start('samples/forged-block.soak');
    expect(said).toContain('choose forged-block.soak with Open in the page');
    expect(said).not.toContain('?sample=');
  });

  it('ends at once for a file that is not there', async () => {
    await start('samples/nothing.soak');
    const code = program?.exitCode ?? (await once(program as ChildProcess, 'exit'))[0];
    expect(code).toBe(5);
  });
});
