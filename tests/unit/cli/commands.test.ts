import { describe, expect, it } from 'vitest';
import { EXIT, EXIT_MEANINGS } from '../../../main/cli';
import { sumUp } from '../../../main/cli/commands';
import {
  CAUTION,
  VERSION,
  buildReport,
  newProject,
  readProject,
  reportSchema,
  writeProject,
  type Project,
  type Report,
  type Verdict,
} from '../../../solver/model';
import { solve } from '../../../solver/planning';
import { command, sampleText, systemError, type Ended } from './fakeIo';

const lining = sampleText('dry-out-lining');
const panel = sampleText('panel-cure');
/** The text of a new plan with changes. */
const plan = (changes: Partial<Project>): string => writeProject({ ...newProject(), ...changes });
/** A plan that takes many seconds, for interrupting. */
const endless = plan({ settings: { scheme: 'implicit', step: 0.05, accuracy: 0.1, dampedSteps: 4, grid: { nodes: 61 } } });

const noStack = ({ out, err }: Ended): void => expect(out + err).not.toMatch(/\n\s+at .+[:(]/);

describe('usage', () => {
  it.each([[['--help']], [['-h']], [['run', '--help']]])('help is printed for %j', async (args) => {
    const { code, out, err } = await command(args);
    expect(code).toBe(0);
    expect(err).toBe('');
    for (const word of ['run FILE', 'check FILE', 'validate FILE', '--json', '--csv DIR', 'NO_COLOR', CAUTION])
      expect(out).toContain(word);
  });

  it('help lists every exit code with its meaning', async () => {
    const { out } = await command(['--help']);
    for (const [key, code] of Object.entries(EXIT)) {
      const line = `  ${String(code).padStart(3)}  ${EXIT_MEANINGS[key as keyof typeof EXIT]}`;
      expect(out.split('\n')).toContain(line);
    }
    expect(Object.values(EXIT)).toEqual([0, 1, 2, 3, 4, 5, 70, 130]);
  });

  it('the version is printed', async () => {
    expect(await command(['--version'])).toMatchObject({ code: 0, out: 'soakwright 1.2.3\n', err: '' });
  });

  it.each([
    [[], 'There is no command'],
    [['bake', 'x.soak'], '"bake" is not a command'],
    [['run'], 'run needs a FILE, or - for standard input'],
    [['run', 'a', 'b'], 'run takes one FILE, got also "b"'],
    [['run', '--jsn', 'a'], "Unknown option '--jsn'"],
    [['run', 'a', '--csv'], '--csv'],
    [['check', 'a', '--json'], '--json belongs to run, not to check'],
    [['validate', 'a', '--csv', 'd'], '--csv belongs to run, not to validate'],
  ])('%j is refused with 2, and says why', async (args, words) => {
    const ended = await command(args, { files: { a: lining } });
    expect(ended.code).toBe(2);
    expect(ended.out).toBe('');
    expect(ended.err).toContain(words);
    expect(ended.err).toContain('soakwright --help');
    noStack(ended);
  });
});

describe('files that cannot be used', () => {
  const bad = structuredClone(newProject());
  bad.part.layers[0].thickness = -0.004;
  const noStep = plan({ settings: { scheme: 'explicit', accuracy: 0.1, dampedSteps: 4, grid: 'automatic' } });

  it.each([
    ['a thickness below zero', writeProject(bad), 'part.layers[0].thickness must be more than 0 m, got -0.004'],
    ['no JSON', '{ "format": ', 'is not JSON'],
    ['JSON of another kind', '{"format":"recipe"}', 'format must be "soakwright-plan": this is not a Soakwright plan'],
    ['an explicit scheme without a step', noStep, 'settings.step is missing'],
    [
      'a newer version',
      plan({}).replace(`"version": ${VERSION}`, '"version": 99'),
      `Written by a newer version, format 99; this one reads up to format ${VERSION}. The file stays untouched.`,
    ],
  ])('%s: 3 from every command, with the place', async (_, text, words) => {
    for (const name of ['run', 'check', 'validate']) {
      const ended = await command([name, 'x.soak'], { files: { 'x.soak': text } });
      expect(ended.code).toBe(3);
      expect(ended.out).toBe('');
      expect(ended.err).toContain('x.soak: ');
      expect(ended.err).toContain(words);
      noStack(ended);
    }
  });

  it('every problem of a file is named, a line each', async () => {
    const worse = structuredClone(bad);
    worse.materials[0].conductivity = 0;
    worse.initial = { temperature: -300 };
    const { err } = await command(['validate', 'x'], { files: { x: writeProject(worse) } });
    expect(err.trimEnd().split('\n')).toEqual([
      'x: materials[0].conductivity must be more than 0 W/(m·K), got 0',
      'x: part.layers[0].thickness must be more than 0 m, got -0.004',
      'x: initial.temperature must be more than -273.15 °C, got -300',
    ]);
  });

  it.each([
    ['ENOENT', 'there is no such file'],
    ['EACCES', 'no right to read'],
    ['EISDIR', 'is a folder'],
  ])('one that cannot be read (%s): 5, in plain words', async (code, words) => {
    const ended = await command(['run', 'dir/x.soak'], { files: { 'dir/x.soak': systemError(code) } });
    expect(ended.code).toBe(5);
    expect(ended.err).toContain('x.soak');
    expect(ended.err).toContain(words);
    expect(ended.err).not.toContain('raw words');
  });

  it('a fault of ours: 70, without a stack', async () => {
    const fault = new TypeError('x is not a function');
    for (const world of [{ printing: fault }, { writing: fault }]) {
      const ended = await command(['run', 'a', '--csv', 'd', '--json'], { files: { a: lining }, ...world });
      expect(ended.code).toBe(70);
      expect(ended.err).toMatch(/soakwright: a fault of this program: x is not a function\n$/);
      noStack(ended);
    }
  });
});

describe('run', () => {
  it('prints answers, first answers, stages, what they rest on, and the caution', async () => {
    const ended = await command(['run', 'a'], { files: { a: lining } });
    expect(ended.code).toBe(0);
    expect(ended.err).toBe('');
    const headings = [
      'Ladle lining, first dry-out',
      'Answers',
      'First answers',
      'Stages',
      'What they rest on',
      'A plan, not a certificate',
    ];
    const places = headings.map((heading) => ended.out.indexOf(heading));
    expect(places).toEqual([...places].sort((a, b) => a - b));
    expect(places[0]).toBe(0);
    expect(ended.out).toMatch(/^ {2}Verdict +Requirement +When +Value +Limit +Margin +Numerical, 95 %$/m);
    expect(ended.out).toMatch(
      /^ {2}not met +No more than 180 K within one material +at \d+ h \d\d min, .+ K +≤ 180\.0 K +−[\d.]+ K +± [\d.]+ K$/m,
    );
    expect(ended.out).toMatch(
      /^ {2}met +Cold end of the brick above 110 °C for 8 h .+ ≥ 8 h 00 min +\+\d+ h \d\d min +± [\d.]+ s$/m,
    );
    expect(ended.out).toMatch(/Slowest point .*95 % of its change in Hold at 550 °C at \d+ h \d\d min/);
    expect(ended.out).toMatch(/Energy +[\d.]+ MJ\/m² in, [\d.]+ MJ\/m² stored; closure/);
    expect(ended.out).toMatch(/Solver +automatic \(.+\), \d+ steps/);
    expect(ended.out).not.toContain('\x1b');
  });

  it('keeps its columns in line', async () => {
    const { out } = await command(['run', 'a'], { files: { a: panel } });
    const lines = out.split('\n');
    const head = lines.findIndex((line) => line.includes('Verdict'));
    const column = lines[head].indexOf('Requirement');
    for (const line of lines.slice(head + 1, head + 6)) expect(line.slice(column - 2, column + 1)).toMatch(/^ {2}\S$/);
    expect(out).not.toMatch(/ \n/);
  });

  it('reads standard input for -', async () => {
    const ended = await command(['run', '-'], { files: { '-': panel } });
    expect(ended.code).toBe(0);
    expect(ended.out).toContain('Bonded panel, oven cure');
    const bad = await command(['run', '-'], { files: { '-': '[]' } });
    expect(bad.err).toMatch(/^standard input: /);
  });

  it('colours verdicts on a terminal only, and their words stay', async () => {
    const plain = await command(['run', 'a'], { files: { a: panel } });
    const coloured = await command(['run', 'a'], { files: { a: panel }, colour: true });
    expect(coloured.out).toContain('\x1b[31mnot met\x1b[0m');
    // eslint-disable-next-line no-control-regex -- colours are control characters
    const stripped = coloured.out.replace(/\x1b\[\d+m/g, '');
    const untimed = (text: string): string => text.replace(/, [\d.]+ ms/, '');
    expect(untimed(stripped)).toBe(untimed(plain.out));
  });

  it('--json prints one document that obeys its schema and says what the solve says', async () => {
    const { code, out, err } = await command(['run', 'a', '--json'], { files: { a: panel } });
    expect([code, err]).toEqual([0, '']);
    const report = reportSchema.parse(JSON.parse(out));
    const read = readProject(panel);
    if (read.kind !== 'project') throw new Error('the plan is bad');
    const direct = solve(read.project);
    expect(report.answers.map(({ verdict, time_s, value, margin }) => [verdict, time_s, value, margin])).toEqual(
      direct.answers.map(({ verdict, time_s, value, margin }) => [verdict, time_s, value, margin]),
    );
    expect(report.probes[0].temperature_C).toEqual([...direct.probes[0].temperature_C]);
    expect(report.energy).toEqual(direct.energy);
    expect(report.caution).toBe(CAUTION);
  });

  it('gives the same digits every time, the time on the clock apart', async () => {
    const [first, second] = await Promise.all([0, 1].map(() => command(['run', 'a', '--json'], { files: { a: lining } })));
    const untimed = (text: string): string => text.replace(/"wall_s":[^}]+/, '');
    expect(untimed(first.out)).toBe(untimed(second.out));
  });

  it('an explicit step above the limit is refused with 4, the limit and what would do', async () => {
    const text = plan({ settings: { scheme: 'explicit', step: 60, accuracy: 0.1, dampedSteps: 4, grid: { nodes: 21 } } });
    const ended = await command(['run', 'a'], { files: { a: text } });
    expect(ended.code).toBe(4);
    expect(ended.out).toBe('');
    expect(ended.err).toMatch(/limit/);
    const json = await command(['run', 'a', '--json'], { files: { a: text } });
    expect(json.code).toBe(4);
    expect(reportSchema.parse(JSON.parse(json.out)).outcome).toMatchObject({ reason: 'step-above-limit', reached_s: 0 });
  });

  it('an interruption ends it with 130, and what was reached is printed and marked', async () => {
    const ended = await command(['run', 'a'], {
      files: { a: endless },
      terminal: true,
      onRemark: (text, interrupt) => text.includes('Solving') && interrupt(),
    });
    expect(ended.code).toBe(130);
    expect(ended.out).toMatch(/^Stopped at .+: answers up to there\.$/m);
    expect(ended.out).toContain('First answers');
    noStack(ended);
  });

  it('an interruption before it begins ends it with 130 and prints no answers', async () => {
    const ended = await command(['run', 'a'], { files: { a: endless }, interrupted: true });
    expect(ended.code).toBe(130);
    expect(ended.out).toBe('');
  });

  it('shows progress on a terminal only, and not with --quiet', async () => {
    const slow = plan({ settings: { scheme: 'implicit', step: 0.5, accuracy: 0.1, dampedSteps: 4, grid: { nodes: 61 } } });
    const shown = await command(['run', 'a'], { files: { a: slow }, terminal: true });
    expect(shown.err).toMatch(/\rSolving|\x1b\[KSolving +\d+ %, .+ of 2 h 00 min, stage Heat/); // eslint-disable-line no-control-regex
    expect(shown.err.endsWith('\r\x1b[K')).toBe(true);
    expect((await command(['run', 'a'], { files: { a: slow } })).err).toBe('');
    expect((await command(['run', 'a', '--quiet'], { files: { a: slow }, terminal: true })).err).toBe('');
  });
});

describe('check', () => {
  const met = plan({
    requirements: [
      {
        id: 'r1',
        name: 'Warm',
        of: { point: 'coldest' },
        must: { kind: 'reaches', sense: 'atLeast', limit: 60 },
        counts: { kind: 'cycle' },
      },
    ],
  });

  it('gives 0 where all requirements are met', async () => {
    const { code, out, err } = await command(['check', 'a'], { files: { a: met } });
    expect([code, err]).toEqual([0, '']);
    expect(out).toMatch(/The requirement is met\.\n$/);
  });

  it('gives 1 where one is not, and names it', async () => {
    const { code, out } = await command(['check', 'a'], { files: { a: panel } });
    expect(code).toBe(1);
    expect(out).toMatch(/not met +All of it below 45 °C before unbagging/);
    expect(out).toMatch(/4 of 5 requirements are met\.\n$/);
  });

  it('gives 1 where one is never reached', async () => {
    const { code, out } = await command(['check', 'a'], { files: { a: met.replace('"limit": 60', '"limit": 190') } });
    expect(code).toBe(1);
    expect(out).toMatch(/never reached +Warm/);
    expect(out).toMatch(/0 of 1 requirements are met/);
  });

  it('gives 0 where nothing is asked', async () => {
    const { code, out } = await command(['check', 'a'], { files: { a: plan({}) } });
    expect(code).toBe(0);
    expect(out).toMatch(/Nothing to check\.\n$/);
  });

  it('gives 4, not 1, where the run was refused', async () => {
    const text = plan({ settings: { scheme: 'explicit', step: 60, accuracy: 0.1, dampedSteps: 4, grid: { nodes: 21 } } });
    expect((await command(['check', 'a'], { files: { a: text } })).code).toBe(4);
  });

  it('gives 130 when it is interrupted', async () => {
    const interrupt = (text: string, stop: () => void): unknown => text.includes('Solving') && stop();
    const world = { files: { a: endless }, terminal: true, onRemark: interrupt };
    expect((await command(['check', 'a'], world)).code).toBe(130);
  });
});

describe('the sum of a check', () => {
  const reportOf = (...verdicts: Verdict[]): Report => {
    const report = buildReport(newProject(), solve(newProject()));
    const answer = { name: 'Warm' } as Report['answers'][number];
    return { ...report, answers: verdicts.map((verdict) => ({ ...answer, verdict })) };
  };
  const sum = (quiet: boolean, ...verdicts: Verdict[]) => {
    let [out, err] = ['', ''];
    const io = { print: (text: string) => void (out += text), remark: (text: string) => void (err += text) };
    return { code: sumUp(reportOf(...verdicts), quiet, io), out, err };
  };

  it.each<[Verdict, number]>([
    ['met', 0],
    ['thin', 0],
    ['not-met', 1],
    ['never-reached', 1],
    ['cannot-be-judged', 1],
  ])('a requirement that is %s gives %d', (verdict, code) => expect(sum(false, 'met', verdict).code).toBe(code));

  it('remarks on a thin margin, unless it is to be quiet', () => {
    expect(sum(false, 'thin')).toEqual({
      code: 0,
      out: 'The requirement is met.\n',
      err: '"Warm" is met with a thin margin: the limit lies within its uncertainty.\n',
    });
    expect(sum(true, 'thin').err).toBe('');
  });

  it.each<[string, Verdict[]]>([
    ['Nothing to check.', []],
    ['All 2 requirements are met.', ['met', 'thin']],
    ['1 of 2 requirements is met.', ['met', 'not-met']],
    ['0 of 1 requirements are met.', ['never-reached']],
  ])('says "%s"', (words, verdicts) => expect(sum(true, ...verdicts).out).toBe(`${words}\n`));
});

describe('validate', () => {
  it('says that a plan can be run, without running it', async () => {
    expect(await command(['validate', 'a'], { files: { a: endless } })).toMatchObject({
      code: 0,
      out: 'a: a plan that can be run\n',
      err: '',
    });
  });

  it('says nothing with --quiet', async () => {
    expect(await command(['validate', 'a', '-q'], { files: { a: lining } })).toMatchObject({ code: 0, out: '', err: '' });
  });
});
