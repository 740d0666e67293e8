/** The command as a program. */
import { EXIT, soakwright } from './index';
import { nodeIo } from './nodeIo';

/** Put in by the build, from package.json. */
declare const SOAKWRIGHT_VERSION: string;

const interruption = new AbortController();
process.once('SIGINT', () => {
  interruption.abort();
  // A second time means now.
  process.once('SIGINT', () => process.exit(EXIT.interrupted));
});
// Whoever reads the output may have seen enough: `soakwright run plan.soak | head -3`.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  process.exit(error.code === 'EPIPE' ? EXIT.done : EXIT.noAccess);
});

process.exitCode = await soakwright(process.argv.slice(2), nodeIo(SOAKWRIGHT_VERSION, interruption.signal));
