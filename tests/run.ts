/**
 * `npm test`: every check there is, each to its end, then what could not be run here and why, and the count as the last line.
 *
 * Missing Chromium or Xvfb is a remark for a person and a failure where CI=true; a missing test runtime of Electron is a remark.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { prepareRuntime } from './end-to-end/electron-runtime/prepare';
import { findChromium, findScreen } from './end-to-end/support/machine';

const ci = process.env['CI'] === 'true';
const reports = mkdtempSync(join(tmpdir(), 'soakwright-reports-'));
let passed = 0;
let failed = 0;
const failures: string[] = [];
const remarks: string[] = [];

function say(line: string): void {
  console.log(`\n── ${line}`);
}

/** Runs a program of node_modules/.bin (npm scripts have it on PATH) and tells whether it went well. */
function runs(...command: string[]): boolean {
  const [program, ...args] = command;
  return spawnSync(program, args, { stdio: 'inherit', shell: process.platform === 'win32' }).status === 0;
}

function count(name: string, good: number, bad: number): void {
  passed += good;
  failed += bad;
  if (bad > 0) failures.push(`${name}: ${bad} failed`);
}

/** A check that is either good or not. */
function check(name: string, ...command: string[]): boolean {
  say(name);
  const good = runs(...command);
  count(name, good ? 1 : 0, good ? 0 : 1);
  return good;
}

/** Vitest projects, counted test by test; a run that ends without a report has failed as a whole. */
function tests(name: string, ...args: string[]): void {
  say(name);
  const report = join(reports, `${name.replace(/\W+/g, '-')}.json`);
  const good = runs('vitest', 'run', ...args, '--reporter=dot', '--reporter=json', `--outputFile.json=${report}`);
  try {
    const { numPassedTests, numFailedTests } = JSON.parse(readFileSync(report, 'utf8'));
    // A file that cannot be loaded fails without a failed test in it.
    count(name, numPassedTests, good ? numFailedTests : Math.max(1, numFailedTests));
  } catch {
    count(name, 0, 1);
  }
}

const short = (what: string): void => {
  remarks.push(what);
  if (ci) count('what this machine lacks', 0, 1);
};

check('Lint', 'npm', 'run', '--silent', 'lint');
check('Format', 'npm', 'run', '--silent', 'format:check');
check('Types', 'npm', 'run', '--silent', 'typecheck');
tests('Tests', '--project', '!end-to-end/*', '--coverage');
if (check('Build', 'npm', 'run', '--silent', 'build')) {
  if (findChromium() === null) short('Chromium is not on this machine: the app was NOT tested in a browser.');
  else tests('In Chromium', '--project', 'end-to-end/chromium');
  if (findScreen() === null) short('Xvfb is not on this machine: the app was NOT tested in its window.');
  else {
    say('Electron for tests');
    const runtime = await prepareRuntime();
    if (runtime.kind === 'ready') tests('In Electron', '--project', 'end-to-end/electron');
    else remarks.push(`The test runtime of Electron is not here (${runtime.reason}): the app was NOT tested in its window.`);
  }
}
rmSync(reports, { recursive: true });

console.log('');
for (const failure of failures) console.log(`FAILED   ${failure}`);
for (const remark of remarks) console.log(`MISSING  ${remark}`);
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;
