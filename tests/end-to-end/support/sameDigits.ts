/** The same plan gives the same digits wherever it runs; the same test for either host. */
import { readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { readProject } from '../../../solver/model';
import { samples } from '../../../samples/list';
import { comparable, reportOfCommand, reportOfPage } from './solving';

const folder = resolve(import.meta.dirname, '../../../samples');

/** `worker` is the address of the built worker, null on the desktop. */
export function describeSameDigits(page: () => Page, worker: string | null): void {
  describe('the report of a run', () => {
    it.each(samples.map(({ id }) => id))('of %s is that of the command, digit for digit', async (id) => {
      const file = join(folder, `${id}.soak`);
      const read = readProject(readFileSync(file, 'utf8'));
      if (read.kind !== 'project') throw new Error(`${id} cannot be read`);
      const here = comparable(await reportOfPage(page(), read.project, worker));
      const command = comparable(reportOfCommand(file));
      expect(here.solver.steps).toBeGreaterThan(10);
      expect(JSON.parse(JSON.stringify(here))).toEqual(command);
    });
  });
}
