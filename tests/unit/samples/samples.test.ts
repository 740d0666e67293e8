import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { openSample, samples } from '../../../samples';
import { readProject, writeProject, type Project, type RunResult, type Verdict } from '../../../solver/model';
import { solve } from '../../../solver/planning';

const folder = new URL('../../../samples/', import.meta.url);
const textOf = (id: string): string => readFileSync(new URL(`${id}.soak`, folder), 'utf8');

function projectOf(id: string): Project {
  const read = readProject(textOf(id));
  if (read.kind !== 'project') throw new Error(`${id} does not open: ${JSON.stringify(read)}`);
  return read.project;
}

/** Each sample is solved once, when the first test asks for it. */
const runs = new Map<string, RunResult>();
function runOf(id: string): RunResult {
  const run = runs.get(id) ?? solve(projectOf(id));
  runs.set(id, run);
  return run;
}

const between = (low: number, high: number, count: number): boolean => count >= low && count <= high;

describe('the list of samples', () => {
  it('names every file of the folder, and no other', () => {
    const files = readdirSync(folder).filter((name) => name.endsWith('.soak'));
    expect(samples.map(({ id }) => `${id}.soak`)).toEqual(files.sort());
  });

  it('holds at least five trades', () => {
    expect(new Set(samples.map(({ trade }) => trade)).size).toBeGreaterThanOrEqual(5);
  });

  it.each(samples)('gives the text of $id, whose title it tells', async ({ id, title }) => {
    expect(await openSample(id)).toBe(textOf(id));
    expect(projectOf(id).title).toBe(title);
  });

  it('refuses a sample that it does not hold', async () => {
    await expect(openSample('../package')).rejects.toThrow(RangeError);
  });
});

describe.each(samples)('sample $id', ({ id }) => {
  it('is written as the program writes it', () => {
    expect(textOf(id)).toBe(writeProject(projectOf(id)));
  });

  it('says what it plans, and that it is a plan', () => {
    const { notes } = projectOf(id);
    expect(notes.length).toBeGreaterThan(300);
    expect(notes).toMatch(/It asks/);
    expect(notes).toMatch(/A plan, not a certificate/);
  });

  it('has a whole cycle, probes, requirements and a source for every material', () => {
    const { cycle, probes, requirements, materials } = projectOf(id);
    expect(between(3, 6, cycle.stages.length)).toBe(true);
    expect(between(3, 5, probes.length)).toBe(true);
    expect(between(3, 5, requirements.length)).toBe(true);
    for (const { source } of materials) expect(source).toBe('from memory, rounded');
  });

  it('runs to its end, judges every requirement and loses no heat', () => {
    const { project, run } = { project: projectOf(id), run: runOf(id) };
    expect(run.outcome).toMatchObject({ reason: 'finished', message: null });
    expect(run.answers.map(({ requirement }) => requirement)).toEqual(project.requirements.map((requirement) => requirement.id));
    expect(run.answers.every(({ met }) => met !== null)).toBe(true);
    expect(run.energy.closure).toBeLessThan(1e-9);
    expect(run.energy.lag_K).toBeLessThanOrEqual(0.2 * project.settings.accuracy);
    expect(run.warnings).toEqual([]);
  });

  it('has all its first answers, and a history of every probe to the end', () => {
    const { first, probes, stages } = runOf(id);
    expect(Object.values(first).every((answer) => answer !== null)).toBe(true);
    for (const { time_s } of probes) expect(time_s.at(-1)).toBe(stages.at(-1)?.end_s);
  });
});

describe('the samples together', () => {
  const projects = samples.map(({ id }) => projectOf(id));
  const stages = projects.flatMap(({ cycle }) => cycle.stages);
  const exposures = stages.flatMap((stage) => Object.values(stage.exposures));

  it('show every face condition but the insulated one of a new plan', () => {
    expect(new Set(exposures.map(({ kind }) => kind))).toEqual(new Set(['film', 'flux', 'temperature']));
  });

  it('show both ends of a stage, own schedules, and initial temperatures by layer', () => {
    expect(stages.some(({ end }) => 'after' in end)).toBe(true);
    expect(stages.some(({ end }) => 'whenScheduleDone' in end)).toBe(true);
    expect(exposures.some((exposure) => exposure.kind === 'film' && typeof exposure.coefficient === 'object')).toBe(true);
    expect(exposures.some((exposure) => exposure.kind === 'film' && Object(exposure.surroundings).segments?.length > 2)).toBe(
      true,
    );
    expect(projects.some(({ initial }) => 'layers' in initial)).toBe(true);
  });

  it('show every rule, every subject and every place where a requirement counts', () => {
    const requirements = projects.flatMap((project) => project.requirements);
    const kinds = (key: 'must' | 'counts') => new Set(requirements.map((requirement) => requirement[key].kind));
    expect(kinds('must')).toEqual(new Set(['reaches', 'staysBelow', 'staysAbove', 'heldFor']));
    expect(kinds('counts')).toEqual(new Set(['cycle', 'stage', 'within', 'stageEnd']));
    expect(new Set(requirements.map(({ of }) => Object.keys(of)[0]))).toEqual(new Set(['probe', 'point', 'difference']));
  });

  it('include one of twelve layers or more, with contacts between them', () => {
    expect(
      Math.max(...projects.map(({ part }) => part.layers.filter(({ contact }) => contact > 0).length)),
    ).toBeGreaterThanOrEqual(12);
  });

  it('do not all come out well: most hold something that is met and something that is not', () => {
    const mixed = samples.filter(({ id }) => new Set(runOf(id).answers.map(({ met }) => met)).size === 2);
    expect(mixed.length).toBeGreaterThanOrEqual(samples.length - 1);
  });
});

/** Verdicts of a sample's requirements in their order. */
const verdictsOf = (id: string): Verdict[] => runOf(id).answers.map(({ verdict }) => verdict);
/** Highest temperature of a probe, °C. */
const highest = (id: string, probe: string): number =>
  Math.max(...(runOf(id).probes.find((history) => history.probe === probe)?.temperature_C ?? []));

describe('answers that can be told without the solver', () => {
  /** Resistances of the lining from the gas to the air outside, m²·K/W: films 1/h, layers thickness/conductivity, contacts. */
  const lining = {
    gas: 1 / 35,
    hotGas: 1 / 45,
    castable: 0.16 / 2,
    brick: 0.064 / 0.45,
    contacts: 0.001 + 0.003,
    outside: 1 / 12,
  };
  const shell = 0.025 / 48;

  it('the lining: at the end of the first hold the back of the castable is near its steady temperature, and below it', () => {
    const all = lining.gas + lining.castable + lining.brick + lining.contacts + shell + lining.outside;
    const steady = 150 - ((150 - 25) * (lining.gas + lining.castable)) / all;
    const back = runOf('dry-out-lining').answers[0];
    expect(back.value).toBeLessThan(steady);
    expect(back.value).toBeGreaterThan(20 + 0.9 * (steady - 20));
  });

  it('the lining: the brick, which insulates, carries more than the limit within one material, the castable does not set it', () => {
    const all = lining.hotGas + lining.castable + lining.brick + lining.contacts + shell + lining.outside;
    const flux = (550 - 25) / all;
    const { largestDifferenceInMaterial } = runOf('dry-out-lining').first;
    expect(largestDifferenceInMaterial?.material).toBe('brick');
    expect(largestDifferenceInMaterial?.value_K).toBeLessThan(1.02 * flux * lining.brick);
    expect(flux * lining.brick).toBeGreaterThan(200);
    expect(highest('dry-out-lining', 'shell')).toBeLessThan(25 + flux * lining.outside);
    expect(verdictsOf('dry-out-lining')).toEqual(['met', 'met', 'not-met', 'met']);
  });

  it('the block: never hotter than its furnace, and the half hour at heat comes too late in a soak of three hours', () => {
    const [soak, difference, over, transfer, quench] = runOf('forged-block').answers;
    expect(over.value).toBeLessThanOrEqual(1020);
    expect([soak, difference, over, transfer, quench].map(({ verdict }) => verdict)).toEqual([
      'not-met',
      'met',
      'met',
      'met',
      'not-met',
    ]);
    // The largest difference of the whole cycle is that of the quench, between a face and the middle.
    const { largestDifference } = runOf('forged-block').first;
    expect(largestDifference?.time_s).toBeGreaterThan(transfer.time_s ?? Infinity);
    expect(largestDifference?.between[1]).toBeCloseTo(0.1, 2);
  });

  it('the mould: it is warmed by no more than the burners give', () => {
    const given = (18000 * 300) / 2 + 18000 * 3300 + 9000 * 600 + (18000 - 9000) * 30;
    const { energy } = runOf('mould-preheat');
    expect(energy.byFace_J.start).toBeLessThan(given);
    expect(energy.byFace_J.start).toBeGreaterThan(0.9 * given);
    expect(energy.byFace_J.end).toBeLessThan(0);
    const iron = 0.07 * 7200 * 520;
    expect(highest('mould-preheat', 'back') - 35).toBeLessThan(given / iron);
    expect(verdictsOf('mould-preheat')).toEqual(['met', 'met', 'met', 'not-met']);
  });

  it('the panel: the glue line over the tool is the later one', () => {
    const [upper, lower] = runOf('panel-cure').answers;
    expect(lower.time_s).toBeGreaterThan(upper.time_s ?? Infinity);
    expect(runOf('panel-cure').first.slowest?.layer).toBe('tool');
    expect(verdictsOf('panel-cure')).toEqual(['met', 'met', 'met', 'met', 'not-met']);
  });

  it('the stack: its middle is the slowest, and its faces obey the platens', () => {
    const { first, answers } = runOf('press-stack');
    expect(first.slowest?.position_m).toBeCloseTo(0.02625, 3);
    expect(first.hottest?.temperature_C).toBeCloseTo(185, 1);
    expect(answers[1].value).toBeLessThan(185);
    expect(verdictsOf('press-stack')).toEqual(['met', 'met', 'met', 'met', 'not-met']);
  });

  it('the tray: it makes the band, and storage at 3 °C is too mild to bring it below 4 °C', () => {
    const [band, , coldest, storage] = runOf('tray-chill').answers;
    expect(band.position_m).toBeGreaterThan(0.02);
    expect(band.position_m).toBeLessThan(0.035);
    expect(coldest.value).toBeGreaterThan(-4);
    expect(storage.value).toBe(0);
    expect(verdictsOf('tray-chill')).toEqual(['met', 'met', 'met', 'never-reached']);
  });

  it('the wall: it gives up no more heat than it holds above the coldest air, and does not come down to 10 °C', () => {
    const { energy, answers } = runOf('wall-stripping');
    const held = 2400 * 1000 * (0.1 * (40 - 1) + 0.15 * (49 - 1) + 0.4 * (56 - 1) + 0.15 * (50 - 1) + 0.1 * (42 - 1));
    expect(-energy.stored_J).toBeLessThan(held);
    expect(-energy.stored_J).toBeGreaterThan(0.6 * held);
    expect(answers[4].value).toBeGreaterThan(10);
    expect(verdictsOf('wall-stripping')).toEqual(['met', 'met', 'met', 'met', 'never-reached']);
  });
});
