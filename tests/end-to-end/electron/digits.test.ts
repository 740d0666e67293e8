import { afterAll, beforeAll } from 'vitest';
import { launchElectron, type LaunchedElectron } from '../support/hosts';
import { describeSameDigits } from '../support/sameDigits';

let host: LaunchedElectron;
beforeAll(async () => {
  host = await launchElectron();
});
afterAll(() => host.close());

describeSameDigits(() => host.page, null);
