import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { expectText, journalWritten, retitle, sampleText } from '../support/desk';
import { launchChromium } from '../support/hosts';

let host: Awaited<ReturnType<typeof launchChromium>>;
afterEach(() => host.close());

const DISK = 'plan.soak';

/** A file of the browser's own file system, as the pickers would give one that the person chose. */
async function usePickers(text: string): Promise<void> {
  await host.page.evaluate(
    async ([name, text]) => {
      const folder = await navigator.storage.getDirectory();
      const handle = await folder.getFileHandle(name, { create: true });
      const writing = await handle.createWritable();
      await writing.write(text);
      await writing.close();
      Object.assign(window, { showOpenFilePicker: async () => [handle], showSaveFilePicker: async () => handle });
    },
    [DISK, text],
  );
}
const onDisk = (): Promise<string> =>
  host.page.evaluate(async (name) => {
    const folder = await navigator.storage.getDirectory();
    return await (await (await folder.getFileHandle(name)).getFile()).text();
  }, DISK);
const writeByOthers = (text: string): Promise<void> =>
  host.page.evaluate(
    async ([name, text]) => {
      const folder = await navigator.storage.getDirectory();
      const writing = await (await folder.getFileHandle(name)).createWritable();
      await writing.write(text);
      await writing.close();
    },
    [DISK, text],
  );
const titled = (title: string): string => sampleText('forged-block', (plan) => void (plan.title = title));
const titleOnDisk = async (): Promise<string> => JSON.parse(await onDisk()).title;

describe('files by handle', () => {
  beforeEach(async () => {
    host = await launchChromium();
    await expectText(host.page, 'Forged block before the quench');
    await usePickers(titled('Plan one'));
    await host.page.keyboard.press('Control+o');
    await expectText(host.page, 'Plan one');
  });

  it('are saved in place, again and again', async () => {
    for (const title of ['Changed', 'Changed again']) {
      await retitle(host.page, title);
      await host.page.keyboard.press('Control+s');
      await expect.poll(titleOnDisk).toBe(title);
      await expect.poll(() => host.page.title()).toBe(`${title} – Soakwright`);
    }
    expect(host.complaints).toEqual([]);
  });

  it('are not written over what another program wrote, unless told to', async () => {
    await retitle(host.page, 'Mine');
    await writeByOthers(titled('Theirs'));
    await host.page.keyboard.press('Control+s');
    await expectText(host.page, 'plan.soak changed on disk since you opened it');
    expect(await titleOnDisk()).toBe('Theirs');
    await host.page.getByRole('button', { name: 'Replace it' }).click();
    await expect.poll(titleOnDisk).toBe('Mine');
  });

  it('are asked about before another plan takes the desk', async () => {
    await retitle(host.page, 'Mine');
    await host.page.keyboard.press('Control+o');
    await host.page.getByRole('dialog').waitFor();
    await host.page.keyboard.press('Escape');
    await expectText(host.page, 'Mine');
  });
});

describe('a page that is left', () => {
  beforeEach(async () => {
    host = await launchChromium('?sample=forged-block');
    await expectText(host.page, 'Slowest point');
  });

  it('asks first when there are unsaved edits, and offers them when it comes back', async () => {
    const asked: string[] = [];
    host.page.on('dialog', (dialog) => {
      asked.push(dialog.type());
      void dialog.accept();
    });
    await host.page.reload();
    await expectText(host.page, 'Slowest point');
    expect(asked).toEqual([]);

    await retitle(host.page, 'Nearly lost');
    await journalWritten(host.page);
    await host.page.reload();
    expect(asked).toEqual(['beforeunload']);
    await expectText(host.page, 'Unsaved work from');
    await host.page.getByRole('button', { name: 'Restore' }).click();
    await expectText(host.page, 'Nearly lost');
  });
});
