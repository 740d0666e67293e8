import { describe, expect, it } from 'vitest';
import { checkProject, newProject, readProject, wordProblem, writeProject, type Project } from '../../../solver/model';
import { plan } from '../../support/plan';

/** The problems of a new plan after `spoil`, in words. */
function wordsAfter(spoil: (project: Loose) => void, base: Project = newProject()): string[] {
  const document = structuredClone(base) as Loose;
  spoil(document);
  const read = checkProject(document);
  return read.kind === 'problems' ? read.problems.map(wordProblem) : [read.kind];
}
// eslint-disable-next-line @typescript-eslint/no-explicit-any -- spoiling is what types are there to stop
type Loose = any;

describe('reading a file', () => {
  it('gives back what was written, digit for digit', () => {
    const project = plan({ layers: [0.1 + 0.2, 1 / 3], contacts: [1e-4] });
    expect(readProject(writeProject(project))).toEqual({ kind: 'project', project, migratedFrom: null });
    expect(writeProject(project).endsWith('}\n')).toBe(true);
  });

  it('passes over a byte order mark', () => {
    expect(readProject(`\uFEFF${writeProject(newProject())}`).kind).toBe('project');
  });

  it.each([
    ['an empty file', '', 'the document is not JSON: the file is empty'],
    ['blanks', ' \n ', 'the document is not JSON: the file is empty'],
    ['half a file', '{\n  "format": "soakwright-plan",\n', /^the document is not JSON: /],
    ['a list', '[]', 'the document must be a JSON object that holds a plan'],
    ['null', 'null', 'the document must be a JSON object that holds a plan'],
    [
      'another format',
      '{"format":"shopping-list","version":1}',
      'format must be "soakwright-plan": this is not a Soakwright plan',
    ],
  ])('says what is wrong with %s', (_, text, words) => {
    const read = readProject(text);
    expect(read.kind).toBe('problems');
    if (read.kind === 'problems') expect(read.problems.map(wordProblem).join()).toMatch(words);
  });

  it('names line and column of a stray character', () => {
    const read = readProject('{\n  "format": "soakwright-plan",\n  oops\n}');
    expect(read).toMatchObject({ problems: [{ path: [], message: expect.stringMatching(/line 3, column 3$/) }] });
  });

  it('fills in what has a default', () => {
    const { notes: _notes, output: _output, ...rest } = newProject();
    const [layer] = rest.part.layers;
    const { contact: _contact, ...bare } = layer;
    const document = { ...rest, settings: { scheme: 'automatic' }, part: { ...rest.part, layers: [bare] } };
    expect(checkProject(document)).toEqual({ kind: 'project', project: newProject(), migratedFrom: null });
  });
});

describe('words about a single field', () => {
  it('a new plan has no problems', () => expect(wordsAfter(() => undefined)).toEqual(['project']));

  it.each<[string, (project: Loose) => void, string]>([
    ['a bound', (p) => (p.part.layers[0].thickness = -0.004), 'part.layers[0].thickness must be more than 0 m, got -0.004'],
    ['its edge', (p) => (p.part.layers[0].thickness = 0), 'part.layers[0].thickness must be more than 0 m, got 0'],
    ['a least value', (p) => (p.part.layers[0].contact = -1), 'part.layers[0].contact must be at least 0 m²·K/W, got -1'],
    ['a text for a number', (p) => (p.part.layers[0].thickness = '2 in'), 'part.layers[0].thickness must be a finite number in m, got "2 in"'],
    ['null for a number', (p) => (p.part.layers[0].thickness = null), 'part.layers[0].thickness must be a finite number in m, got null'],
    ['a missing number', (p) => delete p.part.layers[0].thickness, 'part.layers[0].thickness is missing: a number in m is expected'],
    ['a missing name', (p) => delete p.probes[0].name, 'probes[0].name is missing: a name is expected'],
    ['absolute zero', (p) => (p.initial.temperature = -273.15), 'initial.temperature must be more than -273.15 °C, got -273.15'],
    ['a misspelt key', (p) => (p.part.layers[0].thicknes = 1), 'part.layers[0].thicknes is not a known key here'],
    ['no layers', (p) => (p.part.layers = []), 'part.layers must have at least one layer'],
    ['a part of another kind', (p) => (p.part.kind = 'cone'), 'part.kind must be "wall", "cylinder" or "sphere", got "cone"'],
    ['no stages', (p) => (p.cycle.stages = []), 'cycle.stages must have at least one stage'],
    ['a scheme', (p) => (p.settings.scheme = 'magic'), 'settings.scheme must be "automatic", "explicit", "implicit" or "crankNicolson", got "magic"'],
    ['half steps that are not whole', (p) => (p.settings.dampedSteps = 1.5), 'settings.dampedSteps must be a whole number, got 1.5'],
    ['a grid of one node', (p) => (p.settings.grid = { nodes: 1 }), 'settings.grid.nodes must be at least 2, got 1'],
    ['a word for a grid', (p) => (p.settings.grid = 'fine'), 'settings.grid has a form that is not known here, got "fine"'],
    ['an exposure', (p) => (p.cycle.stages[0].exposures.end = { kind: 'bath' }), 'cycle.stages[0].exposures.end.kind must have a kind: "insulated", "temperature", "flux", "film" or "radiation", got "bath"'],
    ['a rate of zero', (p) => (p.cycle.stages[0].setPoint.segments[0] = { to: 5, rate: 0 }), 'cycle.stages[0].setPoint.segments[0].rate must be more than 0 K/s, got 0'],
    ['a stage without an end', (p) => delete p.cycle.stages[0].end, 'cycle.stages[0].end is missing'],
    ['a stage of no length', (p) => (p.cycle.stages[0].end = { after: 0 }), 'cycle.stages[0].end.after must be more than 0 s, got 0'],
    ['a fraction above 1', (p) => (p.probes[0].at = { fraction: 1.2 }), 'probes[0].at.fraction must be at most 1, got 1.2'],
    ['a face of another part', (p) => (p.probes[0].at = { face: 'lid' }), 'probes[0].at.face must be "start" or "end", got "lid"'],
    ['a very long text is cut', (p) => (p.part.kind = 'x'.repeat(100)), `part.kind must be "wall", "cylinder" or "sphere", got "${'x'.repeat(40)}…"`],
  ])('%s', (_, spoil, words) => expect(wordsAfter(spoil)).toEqual([words])); // prettier-ignore

  it('all problems are told at once, each in its place', () => {
    const words = wordsAfter((project) => {
      project.materials[0].density = 0;
      project.part.layers[0].thickness = 'thick';
      project.cycle.stages[0].exposures.start.coefficient = -1;
    });
    expect(words.map((line) => line.split(' ')[0])).toEqual([
      'materials[0].density',
      'part.layers[0].thickness',
      'cycle.stages[0].exposures.start.coefficient',
    ]);
  });

  it('a schedule speaks for the form that was meant', () => {
    const ofSurroundings = (surroundings: unknown): string[] =>
      wordsAfter((project) => (project.cycle.stages[0].exposures.start.surroundings = surroundings));
    const place = 'cycle.stages[0].exposures.start.surroundings';
    expect(ofSurroundings(-300)).toEqual([`${place} must be more than -273.15 °C, got -300`]);
    expect(ofSurroundings({ start: 20, segments: [{ to: 50, duration: -1 }] })).toEqual([
      `${place}.segments[0].duration must be at least 0 s, got -1`,
    ]);
    expect(ofSurroundings({ start: 20, segments: [{ to: -400, rate: 1 }] })).toEqual([
      `${place}.segments[0].to must be more than -273.15 °C, got -400`,
    ]);
    expect(ofSurroundings({ follow: 'setPoint', offset: '5' })).toEqual([
      `${place}.offset must be a finite number in K, got "5"`,
    ]);
  });
});

describe('words about what belongs together', () => {
  const three = plan({ layers: [0.1, 0.02, 0.01] });
  const requirement = (more: object): object => ({
    id: 'r',
    name: 'R',
    of: { point: 'coldest' },
    must: { kind: 'reaches', sense: 'atLeast', limit: 100 },
    counts: { kind: 'cycle' },
    ...more,
  });

  it.each<[string, (project: Loose) => void, string]>([
    ['a material that is not there', (p) => (p.part.layers[1].material = 'gold'), 'part.layers[1].material must be the id of a material of this plan, got "gold"'],
    ['two layers of one id', (p) => (p.part.layers[2].id = 'l1'), 'part.layers[2].id must be unique in its list; "l1" is there twice'],
    ['two stages of one id', (p) => p.cycle.stages.push(structuredClone(p.cycle.stages[0])), 'cycle.stages[1].id must be unique in its list; "s1" is there twice'],
    ['a probe outside the part', (p) => (p.probes = [{ id: 'p', name: 'P', at: { depth: 0.2 } }]), 'probes[0].at.depth must be at most 0.13 m, the thickness of the part, got 0.2'],
    ['a probe in a layer that is not there', (p) => (p.probes = [{ id: 'p', name: 'P', at: { fraction: 0.5, layer: 'x' } }]), 'probes[0].at.layer must be the id of a layer of this plan, got "x"'],
    ['an interface after the last layer', (p) => (p.probes = [{ id: 'p', name: 'P', at: { interface: 'l3', side: 'after' } }]), 'probes[0].at.interface must be a layer that another layer follows; this is the last one'],
    ['a layer without initial temperature', (p) => (p.initial = { layers: [{ layer: 'l1', temperature: 20 }, { layer: 'l2', temperature: 20 }] }), 'initial.layers must give a temperature for layer "Layer 3"'],
    ['a layer with two', (p) => (p.initial = { layers: ['l1', 'l2', 'l3', 'l1'].map((layer) => ({ layer, temperature: 20 })) }), 'initial.layers[3].layer names layer "l1" a second time'],
    ['a requirement of a probe that is not there', (p) => (p.requirements = [requirement({ of: { probe: 'x' } })]), 'requirements[0].of.probe must be the id of a probe of this plan, got "x"'],
    ['a requirement in a stage that is not there', (p) => (p.requirements = [requirement({ counts: { kind: 'stageEnd', stage: 'x' } })]), 'requirements[0].counts.stage must be the id of a stage of this plan, got "x"'],
    ['a time that runs from a stage that is not there', (p) => (p.requirements = [requirement({ counts: { kind: 'within', time: 5, from: 'x' } })]), 'requirements[0].counts.from must be the id of a stage of this plan, got "x"'],
    ['a difference below zero', (p) => (p.requirements = [requirement({ of: { difference: 'part' }, must: { kind: 'staysBelow', limit: -5 } })]), 'requirements[0].must.limit must be at least 0 K for a difference, got -5'],
    ['a steady start that lets no heat out', (p) => (p.initial = { steady: { start: { kind: 'flux', flux: 100 }, end: { kind: 'insulated' } } }), 'initial.steady has no steady state: one face must meet a temperature, a film or radiation'],
    ['a steady start under a schedule without a start', (p) => (p.initial = { steady: { start: { kind: 'film', coefficient: 10, surroundings: { segments: [{ to: 90, duration: 5 }] } }, end: { kind: 'insulated' } } }), 'initial.steady.start.surroundings.start is missing: nothing comes before a steady state that it could carry on from'],
    ['a steady start under an expression that gives no number', (p) => (p.initial = { steady: { start: { kind: 'temperature', temperature: { expression: 'log(t)' } }, end: { kind: 'insulated' } } }), 'initial.steady.start.temperature.expression gives -Infinity at t = 0 s of the stage'],
    ['a steady start by a forced correlation without a velocity', (p) => (p.initial = { steady: { start: { kind: 'film', coefficient: { correlation: 'forcedPlate', fluid: 'air', length: 1 }, surroundings: 20 }, end: { kind: 'insulated' } } }), 'initial.steady.start.coefficient.velocity is missing: a forced correlation needs a velocity in m/s'],
    ['an enclosure below absolute zero', (p) => (p.cycle.stages[0].exposures.end = { kind: 'radiation', emissivity: 0.5, enclosure: { expression: '20 - 10*t' } }), 'cycle.stages[0].exposures.end.enclosure.expression gives -276.875 at t = 29.6875 s of the stage'],
    ['an enclosure beside a film below absolute zero', (p) => (p.cycle.stages[0].exposures.end = { kind: 'film', coefficient: 5, surroundings: 20, radiation: { emissivity: 0.5, enclosure: { expression: '-300' } } }), 'cycle.stages[0].exposures.end.radiation.enclosure.expression gives -300 at t = 0 s of the stage'],
    ['a stage that waits for nothing', (p) => (p.cycle.stages[0].end = { whenScheduleDone: true }), 'cycle.stages[0].end waits for a schedule, but no schedule of this stage has segments; give it a time instead'],
    ['a textbook scheme without a step', (p) => (p.settings.scheme = 'implicit'), 'settings.step is missing: the explicit, implicit and Crank–Nicolson schemes need a step in s'],
    ['one count of nodes too few', (p) => (p.settings.grid = { nodes: [5, 5] }), 'settings.grid.nodes must have one number a layer: 3, got 2'],
  ])('%s', (_, spoil, words) => expect(wordsAfter(spoil, three)).toEqual([words])); // prettier-ignore

  it('a schedule that takes no time cannot be waited for', () => {
    const words = wordsAfter((project) => {
      project.cycle.stages[0].end = { whenScheduleDone: true };
      project.cycle.stages[0].setPoint = { segments: [{ to: 90, duration: 0 }] };
    });
    expect(words).toEqual(['cycle.stages[0].end must come later than the start of the stage: its schedules take no time']);
  });

  it('a schedule of its own needs a value to start from, and finds it in an earlier stage of its face', () => {
    const stage = (id: string, flux: unknown) => ({
      id,
      name: id,
      end: { after: 60 },
      exposures: { start: { kind: 'flux', flux }, end: { kind: 'insulated' } },
    });
    const loose = { segments: [{ to: 500, duration: 30 }] };
    const first = wordsAfter((project) => (project.cycle.stages = [stage('a', loose)]));
    expect(first).toEqual([
      'cycle.stages[0].exposures.start.flux.start is missing: nothing was reached in an earlier stage that it could carry on from',
    ]);
    expect(wordsAfter((project) => (project.cycle.stages = [stage('a', 100), stage('b', loose)]))).toEqual(['project']);
  });
});
