/** The command as it is shipped: one file, run by Node in a process of its own. */
import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtemp, readFile, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newProject, reportSchema, writeProject } from '../../../solver/model';

const root = fileURLToPath(new URL('../../..', import.meta.url));
const sample = join(root, 'samples/panel-cure.soak');
let folder = '';
let program = '';

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'soakwright-cli-'));
  const outDir = join(folder, 'out');
  await build({ configFile: join(root, 'cli.config.ts'), logLevel: 'error', build: { outDir } });
  program = join(outDir, 'soakwright.mjs');
}, 60_000);
afterAll(() => rm(folder, { recursive: true, force: true }));

interface Ended {
  code: number | null;
  out: string;
  err: string;
}

/** Runs it; `during` may meddle with the process. */
function start(args: string[], during: (child: ChildProcess) => void = () => undefined, env: object = {}): Promise<Ended> {
  return new Promise((done, failed) => {
    const child = spawn(process.execPath, [program, ...args], { cwd: folder, env: { ...process.env, ...env } });
    let [out, err] = ['', ''];
    child.stdout.on('data', (data) => (out += String(data)));
    child.stderr.on('data', (data) => (err += String(data)));
    child.on('error', failed);
    child.on('close', (code) => done({ code, out, err }));
    during(child);
  });
}

describe('the shipped command', () => {
  it('is one file that names its interpreter, checks plans by itself and leaves out the library of units', async () => {
    expect(await readdir(join(folder, 'out'))).toEqual(['soakwright.mjs']);
    const text = await readFile(program, 'utf8');
    expect(text.startsWith('#!/usr/bin/env node\n')).toBe(true);
    expect(text).toContain('must be more than');
    expect(text).not.toMatch(/createUnit|mathjs/);
    const imported = [...text.matchAll(/(?:^|[;}\n])import[^"']*["']([^"']+)["']/g)].map(([, name]) => name);
    expect(imported.length).toBeGreaterThan(0);
    expect(imported.every((name) => name.startsWith('node:'))).toBe(true);
  });

  it('says the version of the package', async () => {
    const { version } = JSON.parse(await readFile(join(root, 'package.json'), 'utf8')) as { version: string };
    expect(await start(['--version'])).toEqual({ code: 0, out: `soakwright ${version}\n`, err: '' });
  });

  it('runs a sample and ends with 0; the report obeys its schema', async () => {
    const { code, out, err } = await start(['run', sample, '--json']);
    expect([code, err]).toEqual([0, '']);
    expect(reportSchema.safeParse(JSON.parse(out)).success).toBe(true);
  });

  it('reads standard input, and never colours what is not a terminal', async () => {
    const text = await readFile(sample, 'utf8');
    const { code, out } = await start(['run', '-'], (child) => child.stdin?.end(text));
    expect(code).toBe(0);
    expect(out).toContain('Bonded panel, oven cure');
    expect(out).not.toContain('\x1b');
  });

  it('writes tables into a folder that it makes', async () => {
    const { code } = await start(['run', sample, '--csv', 'made/here']);
    expect(code).toBe(0);
    expect((await readdir(join(folder, 'made/here'))).sort()).toEqual(['answers.csv', 'field.csv', 'probes.csv']);
  });

  it.each([
    [1, ['check', sample]],
    [2, ['bake']],
    [3, ['run', 'bad.soak']],
    [5, ['run', 'nowhere.soak']],
    [5, ['run', sample, '--csv', 'bad.soak/x']],
  ])('ends with %d for %j, without a stack', async (code, args) => {
    await writeFile(join(folder, 'bad.soak'), '{}');
    const ended = await start(args);
    expect(ended.code).toBe(code);
    expect(ended.err + ended.out).not.toMatch(/\n\s+at .+:\d+/);
  });

  it('stops soon after SIGINT with 130 and prints what was reached', async () => {
    const plan = newProject();
    const settings = { ...plan.settings, scheme: 'implicit' as const, step: 0.02, grid: { nodes: 201 } };
    await writeFile(join(folder, 'long.soak'), writeProject({ ...plan, settings }));
    let [asked, ended] = [0, 0];
    const { code, out } = await start(['run', 'long.soak'], (child) => {
      const later = setTimeout(() => {
        asked = performance.now();
        child.kill('SIGINT');
      }, 1500);
      child.on('close', () => {
        clearTimeout(later);
        ended = performance.now();
      });
    });
    expect(code).toBe(130);
    expect(out).toMatch(/Stopped at .+: answers up to there\./);
    expect(ended - asked).toBeLessThan(5000);
  });

  it('ends quietly when its reader has seen enough', async () => {
    const ended = await start(['run', sample, '--json'], (child) => child.stdout?.destroy());
    expect(ended.code).toBe(0);
    expect(ended.err).toBe('');
  });
});
