import { readFile } from 'node:fs/promises';
import { afterAll, beforeAll } from 'vitest';
import { describePlan, type Hands } from '../plan';
import { launchChromium } from '../support/hosts';

let host: Awaited<ReturnType<typeof launchChromium>>;
let hands: Hands;
beforeAll(async () => {
  // Without pickers, as in a browser that has none: files come by upload and go by download.
  host = await launchChromium('', { withoutPickers: true });
  const { page, complaints } = host;
  hands = {
    page,
    complaints,
    async saved(act) {
      const [download] = await Promise.all([page.waitForEvent('download'), act()]);
      return await readFile(await download.path(), 'utf8');
    },
    async open(text, act) {
      const [chooser] = await Promise.all([page.waitForEvent('filechooser'), act()]);
      await chooser.setFiles({ name: 'plan.soak', mimeType: 'application/json', buffer: Buffer.from(text) });
    },
  };
});
afterAll(() => host.close());

describePlan(() => hands);
