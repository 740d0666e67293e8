import { CAUTION, FORMAT, VERSION } from '../../solver/model';
import { EXIT, EXIT_MEANINGS } from './exitCodes';

const codes = (Object.keys(EXIT) as (keyof typeof EXIT)[])
  .map((key) => `  ${String(EXIT[key]).padStart(3)}  ${EXIT_MEANINGS[key]}`)
  .join('\n');

export const HELP = `Soakwright plans heating and cooling cycles: when the slowest point gets there, and what happens on the way.

  soakwright run FILE [--json] [--csv DIR] [--quiet]   run a plan and print its answers
  soakwright check FILE [--quiet]                      say whether all requirements are met
  soakwright validate FILE [--quiet]                   say whether a file is a plan that can be run
  soakwright --help, soakwright --version

FILE is a plan (.soak, format ${FORMAT} ${VERSION}), or - for standard input.

  --json      one JSON document instead of tables, for programs
  --csv DIR   answers.csv, probes.csv and field.csv in folder DIR instead of tables
  --quiet     no remarks and no progress; failures are still said

Results go to standard output, remarks to standard error. Colours only on a terminal, and never with NO_COLOR.

Exit codes
${codes}

${CAUTION}
`;
