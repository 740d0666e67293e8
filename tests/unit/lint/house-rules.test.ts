import { ESLint } from 'eslint';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { features, packages, rooms } from '../../../eslint/house.js';

const root = fileURLToPath(new URL('../../..', import.meta.url));
const eslint = new ESLint({ cwd: root });

/** What the lint run says about a file of this content, were it there. */
async function lint(file: string, code: string): Promise<string[]> {
  const [result] = await eslint.lintText(`${code}\n`, { filePath: `${root}${file}` });
  return result.messages.map((message) => `${message.ruleId}: ${message.message}`);
}

const REFUSED: [why: string, file: string, code: string, message: string][] = [
  ['model reaching up', 'solver/model/x.ts', "export { a } from '../heat';", 'solver/model must not import solver/heat'],
  ['materials reaching up', 'solver/materials/x.ts', "export * from '../grid';", 'must not import solver/grid'],
  ['grid reaching up', 'solver/grid/x.ts', "import '../heat/index.ts';", 'must not import solver/heat'],
  ['heat reaching up', 'solver/heat/x.ts', "export { a } from '../stepping';", 'must not import solver/stepping'],
  ['stepping reaching up', 'solver/stepping/x.ts', "export { a } from '../measures';", 'must not import solver/measures'],
  ['measures reaching up', 'solver/measures/x.ts', "export { a } from '../planning';", 'must not import solver/planning'],
  [
    'planning reaching up',
    'solver/planning/x.ts',
    "export { a } from '../service/runner';",
    'must not import solver/service/runner',
  ],
  [
    'linear importing ours',
    'solver/linear/x.ts',
    "import type { A } from '../model';\nexport type B = A;",
    'solver/linear must not',
  ],
  ['grid using algebra', 'solver/grid/x.ts', "export { a } from '../linear';", 'solver/grid must not import solver/linear'],
  [
    'protocol with physics',
    'solver/service/protocol/x.ts',
    "export { a } from '../../measures';",
    'must not import solver/measures',
  ],
  [
    'migrations of today',
    'solver/model/migrations/x.ts',
    "import type { A } from '../project';\nexport type B = A;",
    'must not import',
  ],
  [
    'passing by an index',
    'solver/heat/x.ts',
    "export { a } from '../model/check';",
    'solver/model is entered only through its index',
  ],
  ['a detour of dots', 'app/part/x.ts', "export { a } from '../../app/../app/cycle';", 'app/part must not import app/cycle'],
  ['a lazy import', 'app/part/x.ts', "export const a = () => import('../cycle');", 'app/part must not import app/cycle'],
  ['a type by import()', 'app/part/x.ts', "export type A = import('../cycle').A;", 'app/part must not import app/cycle'],
  [
    'app with physics',
    'app/stores/x.ts',
    "export { a } from '../../solver/stepping';",
    'app/stores must not import solver/stepping',
  ],
  ['app with a shell', 'app/x.ts', "export { a } from '../main/files';", 'app must not import main/files'],
  [
    'a worker in a store',
    'app/stores/x.ts',
    "export const u = new URL('../../solver/service/hosts/worker.ts', import.meta.url);",
    'solver/service/hosts',
  ],
  [
    'values of the contract',
    'app/bridge/x.ts',
    "export { a } from '../../main/desktop/contract';",
    'must not import main/desktop',
  ],
  ['features reaching the host', 'app/start/x.ts', "export { host } from '../bridge';", 'app/start must not import app/bridge'],
  [
    'a store reading back',
    'app/stores/project.ts',
    "export { useRun } from './run';",
    'app/stores/project must not know app/stores/run',
  ],
  ['main with app', 'main/desktop/x.ts', "export { a } from '../../app/stores';", 'main/desktop must not import app/stores'],
  [
    'the server with a solver',
    'main/browser/x.ts',
    "export { a } from '../../solver/service';",
    'must not import solver/service',
  ],
  ['a program outside', 'solver/model/x.ts', "export { a } from '../../tests/support/a';", 'outside the rooms of the house'],
  ['Vue in the solver', 'solver/measures/x.ts', "export { ref } from 'vue';", 'vue is not for solver/measures'],
  ['Vue in draw', 'app/draw/x.ts', "export { ref } from 'vue';", 'vue is not for app/draw'],
  [
    'Node modules in the solver',
    'solver/model/x.ts',
    "export { readFileSync } from 'node:fs';",
    'modules of Node are not for solver/model',
  ],
  ['Node modules without prefix', 'app/stores/x.ts', "export { join } from 'path';", 'modules of Node are not for app/stores'],
  [
    'Node modules in the preload',
    'main/desktop/preload.ts',
    "export { join } from 'node:path';",
    'modules of Node are not for main/desktop',
  ],
  ['Electron in the app', 'app/bridge/x.ts', "export { ipcRenderer } from 'electron';", 'electron is not for app/bridge'],
  ['Electron in the command line', 'main/cli/x.ts', "export { app } from 'electron';", 'electron is not for main/cli'],
  ['Electron in a test', 'tests/unit/x.test.ts', "export { app } from 'electron';", 'electron is imported only in main/desktop'],
  ['a package of nobody', 'solver/model/x.ts', "export { a } from 'left-out';", 'left-out is not among the packages'],
  ['the DOM in the solver', 'solver/heat/x.ts', 'export const w = () => window.innerWidth;', 'The DOM belongs in app'],
  ['the DOM in draw', 'app/draw/x.ts', "export const c = () => document.createElement('canvas');", 'The DOM belongs in app'],
  ['the DOM in a shell', 'main/files/x.ts', 'export const l = () => localStorage;', 'The DOM belongs in app'],
  ['Node in the solver', 'solver/stepping/x.ts', 'export const e = () => process.env;', 'Node belongs in solver/service/hosts'],
  ['Node in the app', 'app/stores/x.ts', "export const b = () => Buffer.from('');", 'Node belongs in solver/service/hosts'],
  ['the network', 'app/stores/x.ts', "export const f = () => fetch('https://example.org');", 'The program uses no network'],
  [
    'a component with a neighbour',
    'app/part/X.vue',
    '<script setup lang="ts">\nimport A from \'../cycle\';\n</script>\n<template><A /></template>',
    'app/part must not import app/cycle',
  ],
  ['any', 'solver/model/x.ts', 'export const f = (a: any) => a;', 'no-explicit-any'],
  ['a test that does not run', 'tests/unit/x.test.ts', "it.skip('a', () => {});", 'A test runs, always.'],
  [
    'a click without a key',
    'app/ui/X.vue',
    '<template><div @click="$emit(\'a\')">A</div></template>',
    'click-events-have-key-events',
  ],
];

const ACCEPTED: [what: string, file: string, code: string][] = [
  [
    'rooms below, by their index',
    'solver/heat/x.ts',
    "export { a } from '../model';\nexport { b } from '../linear';\nexport { c } from '../grid/index.ts';",
  ],
  ['its own files', 'solver/model/x.ts', "export { a } from './check';\nexport { b } from './migrations';"],
  [
    'arrays and clocks in the solver',
    'solver/stepping/x.ts',
    'export const now = () => [new Float64Array(2), performance.now()];',
  ],
  [
    'a feature meeting others',
    'app/part/x.ts',
    "export { a } from '../stores';\nexport { b } from '../ui';\nexport { c } from '../../solver/model';",
  ],
  ['run reading project', 'app/stores/run.ts', "export { useProject } from './project';"],
  ['types of the contract', 'app/bridge/x.ts', "export type { DesktopApi } from '../../main/desktop/contract';"],
  [
    'the address of the worker',
    'app/bridge/x.ts',
    "export const u = new URL('../../solver/service/hosts/worker.ts', import.meta.url);",
  ],
  [
    'Node in a solver host',
    'solver/service/hosts/x.ts',
    "import { parentPort } from 'node:worker_threads';\nexport const f = () => [process.exit, parentPort];",
  ],
  ['the worker scope in the worker host', 'solver/service/hosts/worker.ts', 'export const f = () => self.postMessage(1);'],
  ['Electron on the desktop', 'main/desktop/x.ts', "export { app } from 'electron';\nexport { join } from 'node:path';"],
  ['the insides of a room in a test', 'tests/unit/x.test.ts', "export { a } from '../../solver/model/check';"],
];

describe('the lint run', () => {
  it.each(REFUSED)('refuses %s', async (_, file, code, message) => {
    expect((await lint(file, code)).join('\n')).toContain(message);
  });

  it.each(ACCEPTED)('accepts %s', async (_, file, code) => {
    expect(await lint(file, code)).toEqual([]);
  });
});

describe('the table of rooms', () => {
  it('names in its rows only rooms that have a row of their own', () => {
    const named = Object.values(rooms as Record<string, string[]>).flat();
    for (const room of named.filter((name) => !name.includes(':'))) expect(Object.keys(rooms)).toContain(room);
    for (const feature of features) expect(Object.keys(rooms)).toContain(`app/${feature}`);
  });

  it('lets no two rooms import each other', () => {
    const table = rooms as Record<string, string[]>;
    const pairs = Object.keys(table).flatMap((a) => table[a].filter((b) => table[b]?.includes(a)).map((b) => `${a} and ${b}`));
    expect(pairs).toEqual([]);
  });

  it('lists every package that the product depends on, and no other', async () => {
    const { dependencies } = (await import('../../../package.json')).default;
    const listed = Object.keys(packages).filter((name) => !['node:', 'electron'].includes(name));
    expect(listed.sort()).toEqual(Object.keys(dependencies).sort());
  });
});
