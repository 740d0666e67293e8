/**
 * What makes `electron [-r MODULE] FOLDER …` run the app in FOLDER: this runtime comes without the part that does it.
 *
 * The module that the test driver asks for is loaded first. Waiting for the app here holds back the runtime's own readiness.
 */
// eslint-disable-next-line house/rooms -- this is the runtime's own side
import { app } from 'electron';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';

const required = process.argv.indexOf('-r');
if (required > 0) createRequire(import.meta.url)(process.argv[required + 1]);

const folder = resolve(process.argv.slice(1).find((argument) => !argument.startsWith('-')) ?? '.');
const manifest = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'));
process.defaultApp = true;
app.setName(manifest.productName ?? manifest.name);
app.setVersion(manifest.version);
app.setAppPath(folder);
await import(pathToFileURL(join(folder, manifest.main)).href);
