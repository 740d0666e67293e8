/** Whole-process time of `soakwright run` for every sample: from the start of the process to its end. */
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { samples } from '../../samples/list';
import { report } from './figures';

const root = resolve(import.meta.dirname, '../..');
const RUNS = 9;

export async function benchCli(): Promise<void> {
  const command = join(root, 'out/cli/soakwright.mjs');
  if (!existsSync(command)) throw new Error('The command is not built: npm run build:cli');
  for (const { id } of samples) {
    const times = Array.from({ length: RUNS }, () => {
      const start = performance.now();
      const { status } = spawnSync(process.execPath, [command, 'run', join(root, `samples/${id}.soak`)], { stdio: 'ignore' });
      if (status !== 0) throw new Error(`${id} ended with ${status}`);
      return performance.now() - start;
    });
    report({ bench: `soakwright run ${id}`, host: `node ${process.versions.node}`, unit: 'ms', limit: 500 }, times);
  }
}
