import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout } from 'node:timers/promises';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { expectText, journalWritten, retitle, sampleText } from '../support/desk';
import { chooseInDialogs, launchElectron, launchUnattended, type LaunchedElectron } from '../support/hosts';

let folder: string;
let host: LaunchedElectron | null = null;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'soakwright-keeping-'));
});
afterEach(async () => {
  await host?.close();
  host = null;
  await rm(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 200 });
});

async function file(name: string, text: string): Promise<string> {
  const path = join(folder, name);
  await writeFile(path, text);
  return path;
}
const titled = (title: string): string => sampleText('forged-block', (plan) => void (plan.title = title));
const askToClose = ({ app }: LaunchedElectron): Promise<void> =>
  app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0].close());
const windowTitle = ({ app }: LaunchedElectron): Promise<string> =>
  app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0].getTitle());

describe('files handed over', () => {
  it('open at the start, and from a second start in the window that is there', async () => {
    host = await launchElectron([await file('one.soak', titled('Plan one'))]);
    await expectText(host.page, 'Plan one');
    expect(await host.startAgain(await file('two.soak', titled('Plan two')))).toBe(0);
    await expectText(host.page, 'Plan two');
    expect(host.app.windows()).toHaveLength(1);
    await expect.poll(() => windowTitle(host as LaunchedElectron)).toBe('Plan two – Soakwright');
  });

  it('that are no plans are explained, and the plan on the desk stays', async () => {
    host = await launchElectron([await file('one.soak', titled('Plan one'))]);
    await expectText(host.page, 'Plan one');
    await host.startAgain(await file('two.soak', '{"format": "something else"}'));
    await expectText(host.page, 'two.soak was not opened');
    await host.startAgain(join(folder, 'three.soak'));
    await expectText(host.page, 'three.soak could not be opened: there is no such file any more');
    await expectText(host.page, 'Plan one');
  });
});

describe('closing the window', () => {
  it('asks while there are unsaved edits; Cancel keeps it, Don’t save leaves the file as it was', async () => {
    const path = await file('one.soak', titled('Plan one'));
    host = await launchElectron([path]);
    await expectText(host.page, 'Plan one');
    await retitle(host.page, 'Changed');
    expect(await windowTitle(host)).toBe('• Changed – Soakwright');
    await askToClose(host);
    await host.page.getByRole('button', { name: /^Cancel/ }).click();
    await expectText(host.page, 'Changed');
    const closed = host.app.waitForEvent('close');
    await askToClose(host);
    await host.page.getByRole('button', { name: 'Don’t save' }).click();
    await closed;
    expect(await readFile(path, 'utf8')).toBe(titled('Plan one'));
  });

  it('saves first when that is chosen, which is what Enter does', async () => {
    const path = await file('one.soak', titled('Plan one'));
    host = await launchElectron([path]);
    await expectText(host.page, 'Plan one');
    await retitle(host.page, 'Changed');
    const closed = host.app.waitForEvent('close');
    await askToClose(host);
    await host.page.getByRole('dialog').waitFor();
    await host.page.keyboard.press('Enter');
    await closed;
    expect(JSON.parse(await readFile(path, 'utf8')).title).toBe('Changed');
  });

  it('asks nothing when there is nothing to lose', async () => {
    host = await launchElectron([await file('one.soak', titled('Plan one'))]);
    await expectText(host.page, 'Plan one');
    const closed = host.app.waitForEvent('close');
    await askToClose(host);
    await closed;
  });
});

describe('saving', () => {
  it('does not write over what another program wrote meanwhile, unless told to', async () => {
    const path = await file('one.soak', titled('Plan one'));
    host = await launchElectron([path]);
    await expectText(host.page, 'Plan one');
    await retitle(host.page, 'Mine');
    await writeFile(path, titled('Theirs'));
    await host.page.keyboard.press('Control+s');
    await expectText(host.page, 'one.soak changed on disk since you opened it');
    expect(await readFile(path, 'utf8')).toBe(titled('Theirs'));
    await host.page.getByRole('button', { name: 'Replace it' }).click();
    await expect.poll(async () => JSON.parse(await readFile(path, 'utf8')).title).toBe('Mine');
  });

  it('says in plain words why it cannot', async () => {
    host = await launchElectron([await file('one.soak', titled('Plan one'))]);
    await expectText(host.page, 'Plan one');
    await chooseInDialogs(host, join(folder, 'gone', 'one.soak'));
    await host.page.keyboard.press('Control+Shift+s');
    await expectText(host.page, `one.soak could not be saved: the folder ${join(folder, 'gone')} is not there any more`);
  });
});

describe('unsaved work', () => {
  it('comes back after the page went down', async () => {
    const alone = await launchUnattended([await file('one.soak', titled('Plan one'))]);
    const before = await alone.attach();
    await expectText(before.page, 'Plan one');
    await retitle(before.page, 'Nearly lost');
    await journalWritten(before.page);
    await before.detach();
    await alone.killPage();
    await setTimeout(2000);
    const after = await alone.attach();
    await expectText(after.page, 'Unsaved work from');
    await after.page.getByRole('button', { name: 'Restore' }).click();
    await expectText(after.page, 'Nearly lost');
    await alone.close();
  });

  it('comes back at the next start after the whole program was killed', async () => {
    const settings = join(folder, 'settings');
    const path = await file('one.soak', titled('Plan one'));
    host = await launchElectron([path], settings);
    await expectText(host.page, 'Plan one');
    await retitle(host.page, 'Nearly lost');
    await journalWritten(host.page);
    await host.close();

    host = await launchElectron([], settings);
    await expectText(host.page, 'Unsaved work from');
    await host.page.getByRole('button', { name: 'Restore' }).click();
    await expectText(host.page, 'Nearly lost');
    await expectText(host.page, 'edited');
    expect(await readFile(path, 'utf8')).toBe(titled('Plan one'));
  });
});

describe('a solver that is killed in the middle of a run', () => {
  it('is started again, the run repeated, and the person told; the plan is as it was', async () => {
    // 27 000 s by steps of 0.02 s: long enough to be interrupted.
    const long = sampleText('forged-block', (plan) => Object.assign(plan.settings, { scheme: 'implicit', step: 0.02 }));
    host = await launchElectron([await file('long.soak', long)]);
    await expectText(host.page, 'Solving');
    const [solver] = await host.app.evaluate(({ app }) =>
      app.getAppMetrics().flatMap(({ name, pid }) => (name === 'Soakwright solver' ? [pid] : [])),
    );
    process.kill(solver, 'SIGKILL');
    await expectText(host.page, 'It was started again and the run repeated');
    await expectText(host.page, 'Solving');
    await expectText(host.page, 'Forged block before the quench');
  });
});
