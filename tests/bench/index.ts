/** `npm run bench -- NAME …`: measures, and prints a line of JSON a figure. Nothing here fails for being slow. */
import { benchApp } from './app';
import { benchCli } from './cli';

const BENCHES: Record<string, () => Promise<void>> = { app: benchApp, cli: benchCli };

const names = process.argv.slice(2);
const unknown = names.filter((name) => !(name in BENCHES));
if (unknown.length > 0) {
  console.error(`There is no bench "${unknown[0]}"; there are: ${Object.keys(BENCHES).join(', ')}.`);
  process.exit(2);
}
for (const name of names.length > 0 ? names : Object.keys(BENCHES)) await BENCHES[name]();
