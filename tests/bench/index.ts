/** `npm run bench -- NAME …`: measures, and prints a line of JSON a figure; without a name, what there is. Nothing here fails for being slow. */
import { benchApp } from './app';
import { benchCli } from './cli';

const BENCHES: Record<string, () => Promise<void>> = { app: benchApp, cli: benchCli };

const names = process.argv.slice(2);
const unknown = names.find((name) => !(name in BENCHES));
if (names.length === 0) console.log(`There are: ${Object.keys(BENCHES).join(', ')}.`);
if (unknown === undefined) for (const name of names) await BENCHES[name]();
else {
  console.error(`There is no bench "${unknown}"; there are: ${Object.keys(BENCHES).join(', ')}.`);
  process.exitCode = 2;
}
