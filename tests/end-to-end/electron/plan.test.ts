import { mkdtemp, readFile, rm, stat } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect } from 'vitest';
import { describePlan, type Hands } from '../plan';
import { chooseInDialogs, launchElectron, type LaunchedElectron } from '../support/hosts';

let host: LaunchedElectron;
let folder: string;
let hands: Hands;
beforeAll(async () => {
  host = await launchElectron();
  folder = await mkdtemp(join(tmpdir(), 'soakwright-plans-'));
  const saveAs = join(folder, 'saved.soak');
  hands = {
    page: host.page,
    complaints: host.complaints,
    async saved(act) {
      await chooseInDialogs(host, saveAs);
      const before = await stat(saveAs).catch(() => null);
      await act();
      await expect.poll(async () => (await stat(saveAs).catch(() => null))?.ino).not.toBe(before?.ino);
      return await readFile(saveAs, 'utf8');
    },
    async open(text, act) {
      expect(await readFile(saveAs, 'utf8')).toBe(text);
      await chooseInDialogs(host, saveAs);
      await act();
    },
  };
});
afterAll(async () => {
  await host.close();
  await rm(folder, { recursive: true });
});

describePlan(() => hands);
