import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { chmod, lstat, mkdir, mkdtemp, readdir, readFile, rm, stat, symlink, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { saveText } from '../../../main/files';

let folder: string;
let path: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'soakwright-save-'));
  path = join(folder, 'plan.soak');
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('saveText', () => {
  it('writes a new file and leaves nothing beside it', async () => {
    await saveText(path, 'first °C');
    expect(await readFile(path, 'utf8')).toBe('first °C');
    expect(await readdir(folder)).toEqual(['plan.soak']);
  });

  it('keeps the permissions of the file that it replaces', async () => {
    await writeFile(path, 'old');
    await chmod(path, 0o640);
    await saveText(path, 'new');
    expect((await stat(path)).mode & 0o777).toBe(0o640);
  });

  it('replaces the file behind a link and leaves the link a link', async () => {
    const link = join(folder, 'link.soak');
    await writeFile(path, 'old');
    await symlink(path, link);
    await saveText(link, 'new');
    expect((await lstat(link)).isSymbolicLink()).toBe(true);
    expect(await readFile(path, 'utf8')).toBe('new');
  });

  it('leaves the old file and no trace when the new one cannot take its place', async () => {
    await mkdir(path);
    await writeFile(join(path, 'inside'), 'kept');
    await expect(saveText(path, 'new')).rejects.toThrow();
    expect(await readFile(join(path, 'inside'), 'utf8')).toBe('kept');
    expect(await readdir(folder)).toEqual(['plan.soak']);
  });

  it('clears away what a killed save left, but not what a running one writes', async () => {
    const dead = join(folder, '.plan.soak.999999999-00000000.soak-tmp');
    const running = join(folder, `.plan.soak.${process.pid}-00000000.soak-tmp`);
    const fresh = join(folder, '.plan.soak.999999999-00000001.soak-tmp');
    const long = new Date(Date.now() - 3_600_000);
    for (const left of [dead, running, fresh]) await writeFile(left, 'half');
    for (const left of [dead, running]) await utimes(left, long, long);
    await saveText(path, 'whole');
    expect((await readdir(folder)).sort()).toEqual([running, fresh, path].map((left) => left.slice(folder.length + 1)).sort());
  });
});

/** Saves two contents of very different length in turns until it is killed. */
const ENDLESS_SAVER = `
  const { saveText } = await import(process.argv[1]);
  const contents = ['a'.repeat(300_000) + '.', 'b'.repeat(2_000_000) + '.'];
  await saveText(process.argv[2], contents[0]);
  console.log('saving');
  for (let i = 1; ; i++) await saveText(process.argv[2], contents[i % 2]);
`;

describe('a kill during a save', () => {
  it('leaves the old file or the new one, whole, at whatever instant it comes', { timeout: 60_000 }, async () => {
    const hooks = new URL('../../../typescript.hooks.js', import.meta.url).href;
    const files = new URL('../../../main/files/index.ts', import.meta.url).href;
    const seen = new Set<string>();
    for (let kill = 0; kill < 12; kill++) {
      const child = spawn(process.execPath, ['--import', hooks, '--input-type=module', '-e', ENDLESS_SAVER, files, path]);
      await once(child.stdout, 'data');
      await wait(kill * 3.7);
      child.kill('SIGKILL');
      await once(child, 'exit');
      const text = await readFile(path, 'utf8');
      seen.add(`${text[0]} ${text.length} ${text.at(-1)}`);
    }
    for (const state of seen) expect(['a 300001 .', 'b 2000001 .']).toContain(state);
    expect(seen.size).toBeGreaterThan(0);
  });
});
