import { afterAll, beforeAll } from 'vitest';
import { launchChromium } from '../support/hosts';
import { describeSameDigits } from '../support/sameDigits';
import { workerAddress } from '../support/solving';

let host: Awaited<ReturnType<typeof launchChromium>>;
beforeAll(async () => {
  host = await launchChromium();
});
afterAll(() => host.close());

describeSameDigits(() => host.page, workerAddress());
