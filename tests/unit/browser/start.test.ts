import { mkdir, mkdtemp, rm, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { isStale } from '../../../main/browser/freshness';
import { openerFor } from '../../../main/browser/openBrowser';
import { findRuntime } from '../../../main/browser/runtime';

let folder: string;
beforeEach(async () => (folder = await mkdtemp(join(tmpdir(), 'soakwright-start-'))));
afterEach(() => rm(folder, { recursive: true }));

describe('the desktop’s runtime', () => {
  it('is missing when its package never fetched it, and the reason says what would', () => {
    expect(findRuntime(folder, undefined)).toEqual({
      kind: 'missing',
      reason: 'its download was not made; "npx install-electron" makes it',
    });
  });

  it('is missing when the fetched folder is gone', async () => {
    await writeFile(join(folder, 'path.txt'), 'electron');
    expect(findRuntime(folder, undefined)).toMatchObject({ kind: 'missing', reason: expect.stringContaining('not complete') });
  });

  it('is found where its package says', async () => {
    await mkdir(join(folder, 'dist'));
    await writeFile(join(folder, 'path.txt'), 'electron');
    await writeFile(join(folder, 'dist/electron'), '');
    expect(findRuntime(folder, undefined)).toEqual({ kind: 'found', program: join(folder, 'dist/electron') });
  });

  it('is looked for only where the override says, if there is one', async () => {
    await writeFile(join(folder, 'path.txt'), 'electron');
    const elsewhere = join(folder, 'elsewhere');
    expect(findRuntime(folder, elsewhere)).toMatchObject({
      kind: 'missing',
      reason: 'not at the place that ELECTRON_OVERRIDE_DIST_PATH names',
    });
    await mkdir(elsewhere);
    await writeFile(join(elsewhere, 'electron'), '');
    expect(findRuntime(folder, elsewhere)).toEqual({ kind: 'found', program: join(elsewhere, 'electron') });
  });
});

describe('what was built', () => {
  const age = (path: string, seconds: number) => utimes(path, seconds, seconds);

  it('is stale when missing, or older than any source however deep', async () => {
    const built = join(folder, 'index.html');
    const deep = join(folder, 'src/a/b.ts');
    await mkdir(join(folder, 'src/a'), { recursive: true });
    await writeFile(deep, '');
    expect(isStale(built, [join(folder, 'src')])).toBe(true);
    await writeFile(built, '');
    for (const path of [deep, join(folder, 'src/a'), join(folder, 'src')]) await age(path, 1000);
    await age(built, 2000);
    expect(isStale(built, [join(folder, 'src'), join(folder, 'not-there')])).toBe(false);
    await age(deep, 3000);
    expect(isStale(built, [join(folder, 'src')])).toBe(true);
    await age(deep, 1000);
    await age(join(folder, 'src/a'), 3000); // a file was removed
    expect(isStale(built, [join(folder, 'src')])).toBe(true);
  });
});

describe('the person’s browser', () => {
  it('is opened by each platform’s own program', () => {
    expect(openerFor('darwin', {})).toEqual(['open']);
    expect(openerFor('win32', {})?.[0]).toBe('cmd');
    expect(openerFor('linux', { DISPLAY: ':0' })).toEqual(['xdg-open']);
    expect(openerFor('linux', { WAYLAND_DISPLAY: 'wayland-0' })).toEqual(['xdg-open']);
  });

  it('is not opened where there is no screen', () => {
    expect(openerFor('linux', {})).toBeNull();
  });
});
