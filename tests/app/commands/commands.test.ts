import { describe, expect, it } from 'vitest';
import * as commands from '../../../app/commands';
import { applyCommand, type Command, type Entered } from '../../../app/commands';
import { problemsIn } from '../../../app/stores';
import { valueAt, type Path, type Project } from '../../../solver/model';
import { frozen, lining } from '../support/lining';

const plan = frozen(lining());
const [l1, l2, l3] = plan.part.layers;
const [brick, , spare] = plan.materials;
const [heat, soak, rest] = plan.cycle.stages;
const [, p2, p3, p4] = plan.probes;
const [r1, r2, r3] = plan.requirements;
const entered = (value: number, text = `${value}`): Entered => ({ value, text });

/** Every command, the name it goes by in the undo menu, and one place that shows what it did. */
const CASES: [Command, string, Path, unknown][] = [
  [commands.setTitle('Other'), 'Title to Other', ['title'], 'Other'],
  [commands.setNotes('Why'), 'Notes', ['notes'], 'Why'],
  [commands.addLayer(commands.nextLayer(plan, 0), 0), 'Add layer Layer 4', ['part', 'layers', 1, 'name'], 'Layer 4'],
  [commands.duplicateLayer(plan, l2), 'Duplicate layer Backing', ['part', 'layers', 2, 'name'], 'Backing 2'],
  [commands.removeLayer(l1), 'Remove layer Lining', ['part', 'layers', 0, 'id'], 'l2'],
  [commands.moveLayer(l1, 1), 'Move layer Lining', ['part', 'layers', 1, 'id'], 'l1'],
  [commands.renameLayer(l3, 'Casing'), 'Name of Shell to Casing', ['part', 'layers', 2, 'name'], 'Casing'],
  [commands.setLayerMaterial(l1, spare), 'Material of Lining to Spare', ['part', 'layers', 0, 'material'], 'spare'],
  [commands.setThickness(l3, entered(0.02, '20 mm')), 'Thickness of Shell to 20 mm', ['part', 'layers', 2, 'thickness'], 0.02],
  [commands.setContact(l2, entered(0)), 'Contact after Backing to bonded', ['part', 'layers', 1, 'contact'], 0],
  [
    commands.renameFace('end', 'Cold face', 'Outside'),
    'Name of Cold face to Outside',
    ['part', 'faces', 'end', 'name'],
    'Outside',
  ],
  [
    commands.setStartTemperature(l1, entered(40, '40 °C')),
    'Start temperature of Lining to 40 °C',
    ['initial', 'temperature'],
    40,
  ],
  [commands.makeStartPerLayer(), 'Start with a temperature for each layer', ['initial', 'layers', 2, 'temperature'], 25],
  [commands.addMaterial({ ...brick, id: 'new', name: 'New' }), 'Add material New', ['materials', 3, 'id'], 'new'],
  [commands.duplicateMaterial(plan, brick), 'Add material Brick 2', ['materials', 3, 'conductivity'], 1.5],
  [commands.removeMaterial(spare), 'Remove material Spare', ['materials', 2], undefined],
  [commands.renameMaterial(brick, 'Dense'), 'Name of Brick to Dense', ['materials', 0, 'name'], 'Dense'],
  [commands.setMaterialSource(spare, 'handbook'), 'Source of Spare', ['materials', 2, 'source'], 'handbook'],
  [
    commands.setMaterialProperty(brick, 'density', entered(2300, '2300 kg/m³')),
    'Density of Brick to 2300 kg/m³',
    ['materials', 0, 'density'],
    2300,
  ],
  [commands.addProbe(commands.nextProbe(plan), 0), 'Add probe Probe 5', ['probes', 1, 'at', 'fraction'], 0.5],
  [commands.duplicateProbe(plan, p2), 'Duplicate probe Middle', ['probes', 2, 'name'], 'Middle 2'],
  [commands.removeProbe(plan, p2), 'Remove probe Middle and 1 requirement on it', ['requirements', 1, 'id'], 'r3'],
  [commands.moveProbe(p4, -1), 'Move probe Deep', ['probes', 2, 'id'], 'p4'],
  [commands.renameProbe(p4, 'Deeper'), 'Name of Deep to Deeper', ['probes', 3, 'name'], 'Deeper'],
  [commands.setProbePlace(p3, { face: 'end' }, 'Cold face'), 'Place of Behind to Cold face', ['probes', 2, 'at', 'face'], 'end'],
  [commands.setProbeNumber(p4, 'depth', entered(0.1, '100 mm')), 'Place of Deep to 100 mm', ['probes', 3, 'at', 'depth'], 0.1],
  [commands.addStage(commands.nextStage(plan, 1), 1), 'Add stage Stage 4', ['cycle', 'stages', 2, 'end', 'after'], 3600],
  [commands.duplicateStage(plan, rest), 'Duplicate stage Rest', ['cycle', 'stages', 3, 'name'], 'Rest 2'],
  [
    commands.removeStage(plan, soak),
    'Remove stage Soak and 1 requirement that counts in it',
    ['cycle', 'stages', 1, 'id'],
    'rest',
  ],
  [commands.moveStage(rest, -1), 'Move stage Rest', ['cycle', 'stages', 1, 'id'], 'rest'],
  [commands.renameStage(rest, 'Wait'), 'Name of Rest to Wait', ['cycle', 'stages', 2, 'name'], 'Wait'],
  [commands.setStageEnd(heat, { after: 60 }), 'End of Heat after a time', ['cycle', 'stages', 0, 'end', 'after'], 60],
  [commands.setStageLength(soak, entered(60, '1 min')), 'Length of Soak to 1 min', ['cycle', 'stages', 1, 'end', 'after'], 60],
  [commands.renameSetPoint('Oven'), 'Name of the set-point to Oven', ['cycle', 'setPoint', 'name'], 'Oven'],
  [commands.setSetPointStart(entered(30, '30 °C')), 'Start of the set-point to 30 °C', ['cycle', 'setPoint', 'start'], 30],
  [
    commands.addSegment(rest, 'setPoint', { hold: 60 }),
    'Add segment to set-point of Rest',
    ['cycle', 'stages', 2, 'setPoint', 'segments', 0, 'hold'],
    60,
  ],
  [
    commands.removeSegment(heat, 'setPoint', 0),
    'Remove segment 1 of set-point of Heat',
    ['cycle', 'stages', 0, 'setPoint', 'segments', 0, 'hold'],
    3600,
  ],
  [
    commands.moveSegment(heat, 'setPoint', 1, -1),
    'Move segment 2 of set-point of Heat',
    ['cycle', 'stages', 0, 'setPoint', 'segments', 0, 'hold'],
    3600,
  ],
  [
    commands.setSegment(heat, 'setPoint', 1, { to: 500, duration: 0 }),
    'Segment 2 of set-point of Heat',
    ['cycle', 'stages', 0, 'setPoint', 'segments', 1, 'to'],
    500,
  ],
  [
    commands.setSegmentNumber(heat, 'setPoint', 0, 'to', entered(300, '300 °C')),
    'Target of set-point of Heat, segment 1, to 300 °C',
    ['cycle', 'stages', 0, 'setPoint', 'segments', 0, 'to'],
    300,
  ],
  [
    commands.setRampStart(soak, 'setPoint', entered(400, '400 °C')),
    'Start of set-point of Soak to 400 °C',
    ['cycle', 'stages', 1, 'setPoint', 'start'],
    400,
  ],
  [
    commands.setExposureKind(rest, 'start', 'Hot face', 'film'),
    'Hot face in Rest: film',
    ['cycle', 'stages', 2, 'exposures', 'start', 'surroundings'],
    20,
  ],
  [
    commands.setSchedule(heat, 'start', 'Hot face', 'surroundings', 500, 'constant'),
    'Surroundings at Hot face in Heat: constant',
    ['cycle', 'stages', 0, 'exposures', 'start', 'surroundings'],
    500,
  ],
  [
    commands.setScheduleNumber(heat, 'start', 'Hot face', 'surroundings', entered(-5, '−5 K')),
    'Surroundings at Hot face in Heat to −5 K',
    ['cycle', 'stages', 0, 'exposures', 'start', 'surroundings', 'offset'],
    -5,
  ],
  [
    commands.copyExposuresFromBefore(rest),
    'Exposures of Rest from the stage before',
    ['cycle', 'stages', 2, 'exposures', 'start', 'temperature'],
    550,
  ],
  [
    commands.addRequirement(commands.startRequirement(plan, 'neverAbove', 600)),
    'Add requirement Never above',
    ['requirements', 3, 'must', 'limit'],
    600,
  ],
  [commands.duplicateRequirement(plan, r1), 'Duplicate requirement Lining hot', ['requirements', 1, 'name'], 'Lining hot 2'],
  [commands.removeRequirement(r2), 'Remove requirement Middle below', ['requirements', 1, 'id'], 'r3'],
  [commands.moveRequirement(r3, -1), 'Move requirement requirement', ['requirements', 1, 'id'], 'r3'],
  [commands.renameRequirement(r2, 'Cooler'), 'Name of Middle below to Cooler', ['requirements', 1, 'name'], 'Cooler'],
  [commands.setSubject(r3, { point: 'hottest' }, 525), 'Subject of requirement', ['requirements', 2, 'must', 'limit'], 525],
  [commands.setRuleKind(r1, 'reaches', 'atMost'), 'Rule of Lining hot', ['requirements', 0, 'must', 'sense'], 'atMost'],
  [commands.setLimit(r1, entered(120, '120 °C')), 'Limit of Lining hot to 120 °C', ['requirements', 0, 'must', 'limit'], 120],
  [commands.setHoldTime(r1, entered(60, '1 min')), 'Hold of Lining hot to 1 min', ['requirements', 0, 'must', 'duration'], 60],
  [
    commands.setCounts(r1, { kind: 'stageEnd', stage: 'soak' }),
    'Where Lining hot counts',
    ['requirements', 0, 'counts', 'stage'],
    'soak',
  ],
  [commands.setWithinTime(r3, entered(60, '1 min')), 'Time for requirement to 1 min', ['requirements', 2, 'counts', 'time'], 60],
  [commands.setScheme('explicit', 0.5), 'Scheme to explicit', ['settings', 'step'], 0.5],
  [commands.setAccuracy(entered(1, '1 K')), 'Accuracy to 1 K', ['settings', 'accuracy'], 1],
  [commands.setStep(entered(2, '2 s')), 'Step to 2 s', ['settings', 'step'], 2],
  [commands.setDampedSteps(0), 'Damped steps to 0', ['settings', 'dampedSteps'], 0],
  [commands.setGrid({ nodes: 21 }, '21 nodes'), 'Grid to 21 nodes', ['settings', 'grid', 'nodes'], 21],
];

describe('commands', () => {
  it.each(CASES)('$name', (command, name, path, value) => {
    const after = applyCommand(plan, command);
    expect(command.name).toBe(name);
    expect(valueAt(after, path)).toEqual(value);
    expect(problemsIn(after)).toEqual([]);
    expect(plan).toEqual(lining());
  });

  it('share everything that they do not touch', () => {
    const after = applyCommand(plan, commands.setThickness(l1, entered(0.2)));
    expect(after.cycle).toBe(plan.cycle);
    expect(after.part.layers[1]).toBe(plan.part.layers[1]);
  });

  it('give back the same plan when nothing changes', () => {
    expect(applyCommand(plan, commands.setThickness(l1, entered(0.15)))).toBe(plan);
    expect(applyCommand(plan, commands.moveLayer(l1, -1))).toBe(plan);
    expect(applyCommand(plan, commands.renameStage({ ...heat, id: 'gone' }, 'x'))).toBe(plan);
  });
});

describe('what commands refuse', () => {
  it('the last layer and the last stage stay', () => {
    const small = lining((project) => ({
      ...project,
      part: { ...project.part, layers: [project.part.layers[0]] },
      cycle: { ...project.cycle, stages: [project.cycle.stages[0]] },
      probes: [],
      requirements: [],
    }));
    expect(applyCommand(small, commands.removeLayer(l1))).toBe(small);
    expect(applyCommand(small, commands.removeStage(small, heat))).toBe(small);
  });

  it('a material in use stays', () => expect(applyCommand(plan, commands.removeMaterial(brick))).toBe(plan));

  it('no more than thirty layers', () => {
    let many: Project = plan;
    for (let i = 0; i < 40; i++) many = applyCommand(many, commands.addLayer(commands.nextLayer(many, 0), 0));
    expect(many.part.layers).toHaveLength(30);
    expect(new Set(many.part.layers.map(({ id }) => id)).size).toBe(30);
  });
});

describe('what belongs together stays together', () => {
  it('probes of a removed layer keep their depth', () => {
    const after = applyCommand(plan, commands.removeLayer(l2));
    expect(after.probes[1].at).toEqual({ depth: 0.162 }); // the part is 162 mm now, the middle of the layer lay at 187.5 mm
    expect(after.probes[2].at).toEqual({ depth: 0.162 });
    expect(after.probes[3].at).toEqual({ depth: 0.162 });
  });

  it('a probe at an interface that became a face keeps its depth', () => {
    const after = applyCommand(plan, commands.moveLayer(l3, -1));
    expect(after.probes[2].at).toEqual({ depth: 0.225 });
  });

  it('a new layer starts as warm as its neighbour', () => {
    const each = applyCommand(
      applyCommand(plan, commands.makeStartPerLayer()),
      commands.setStartTemperature(l2, entered(80, '80 °C')),
    );
    const after = applyCommand(each, commands.addLayer(commands.nextLayer(each, 1), 1));
    expect(commands.startTemperature(after.initial, after.part.layers[2].id)).toBe(80);
    expect(problemsIn(after)).toEqual([]);
    expect(problemsIn(applyCommand(after, commands.removeLayer(l2)))).toEqual([]);
  });

  it('one temperature for the whole part is that of the first layer', () => {
    const each = applyCommand(plan, commands.makeStartPerLayer());
    const warm = applyCommand(each, commands.setStartTemperature(l1, entered(90, '90 °C')));
    expect(applyCommand(warm, commands.makeStartUniform()).initial).toEqual({ temperature: 90 });
  });

  it('a stage after one with ramps of its own holds what they reached', () => {
    expect(commands.nextStage(plan, 1).exposures.start).toEqual({ kind: 'temperature', temperature: 550 });
  });

  it('a set-point without segments and start is not kept', () => {
    const one = applyCommand(plan, commands.removeSegment(heat, 'setPoint', 1));
    const none = applyCommand(one, commands.removeSegment(heat, 'setPoint', 0));
    expect('setPoint' in none.cycle.stages[0]).toBe(false);
  });

  it('the count of one layer leaves those of the others', () => {
    const grid = applyCommand(plan, commands.setGrid({ cells: 20 }, '20 cells'));
    expect(applyCommand(grid, commands.setLayerCount(l3, 5)).settings.grid).toEqual({ cells: [20, 20, 5] });
    expect(applyCommand(plan, commands.setLayerCount(l3, 5))).toBe(plan);
  });
});
