import { describe, expect, it } from 'vitest';
import {
  applyCommand,
  copyExposuresFromBefore,
  makeStartPerLayer,
  makeStartProfile,
  makeStartSteady,
  makeStartUniform,
  removeLayer,
  setContact,
  setContactKind,
  setCorrelationNumber,
  setEmissivity,
  setExposureKind,
  setGapNumber,
  setInnerRadius,
  setLatent,
  setLatentNumber,
  setMaterialCurve,
  setPartKind,
  setRadiation,
  setReaction,
  setReactionNumber,
  setSchedule,
  setScheduleNumber,
  setSource,
  setSourceNumber,
  setStartProfile,
  setStartTemperature,
  sourceOf,
  type Command,
} from '../../../app/commands';
import { reactionNumbers, reactionOfKind } from '../../../app/part/curves';
import { problemsIn } from '../../../app/stores';
import type { Project } from '../../../solver/model';
import { frozen, lining } from '../support/lining';

const plan = frozen(lining());
const [heat, soak] = plan.cycle.stages;
const [brick] = plan.materials;
const [l1, l2] = plan.part.layers;

/** Applies commands one after the other; the plan must be one that can be run after each. */
function after(project: Project, ...commands: Command[]): Project {
  return commands.reduce((now, command) => {
    const next = frozen(applyCommand(now, command));
    expect(problemsIn(next)).toEqual([]);
    return next;
  }, project);
}
const number = (value: number) => ({ value, text: String(value) });

describe('a round part', () => {
  it('begins hollow, so that no face loses what it meets', () => {
    const pipe = after(plan, setPartKind('cylinder'));
    expect(pipe.part).toMatchObject({ kind: 'cylinder', innerRadius: 0.237 });
    expect(pipe.cycle).toEqual(plan.cycle);
  });

  it('that is made solid has only an outer face', () => {
    const ball = after(plan, setPartKind('sphere'), setInnerRadius(number(0)));
    expect(ball.cycle.stages.map(({ exposures }) => exposures.start.kind)).toEqual(['insulated', 'insulated', 'insulated']);
    expect(ball.cycle.stages[0].exposures.end).toEqual(plan.cycle.stages[0].exposures.end);
  });

  it('becomes a wall again without a bore', () => {
    expect(after(plan, setPartKind('sphere'), setPartKind('wall')).part.innerRadius).toBe(0);
    expect(applyCommand(plan, setInnerRadius(number(0.1)))).toBe(plan);
  });

  it('renames only faces that were called by their kind', () => {
    const plain = lining((project) => ({
      ...project,
      part: { ...project.part, faces: { start: { name: 'Start face' }, end: { name: 'Cold face' } } },
    }));
    const pipe = after(plain, setPartKind('cylinder'));
    expect(pipe.part.faces).toEqual({ start: { name: 'Inner face' }, end: { name: 'Cold face' } });
    expect(after(pipe, setInnerRadius(number(0))).part.faces.start.name).toBe('Centre');
  });
});

describe('a material', () => {
  it('takes tables and expressions, and goes back to numbers', () => {
    const table: [number, number][] = [
      [20, 1.5],
      [900, 1.1],
    ];
    const over = after(plan, setMaterialCurve(brick, 'conductivity', { table }, 'table'));
    expect(over.materials[0].conductivity).toEqual({ table });
    expect(after(over, setMaterialCurve(brick, 'conductivity', 2, 'constant')).materials[0].conductivity).toBe(2);
    const expression = applyCommand(plan, setMaterialCurve(brick, 'density', { expression: '2200 - T' }, 'expression'));
    expect(expression.materials[0].density).toEqual({ expression: '2200 - T' });
  });

  it('takes a latent heat, its numbers, and loses it again', () => {
    const melting = after(plan, setLatent(brick, [{ heat: 334e3, from: 0, to: 0 }]), setLatentNumber(brick, 0, 'to', number(5)));
    expect(melting.materials[0].latent).toEqual([{ heat: 334e3, from: 0, to: 5 }]);
    expect(applyCommand(melting, setLatentNumber(brick, 1, 'to', number(7)))).toBe(melting);
    expect(after(melting, setLatent(brick, [])).materials[0]).not.toHaveProperty('latent');
  });

  it.each(['nthOrder', 'autocatalytic', 'hydration'] as const)(
    'can have a reaction of kind %s, each number of it set',
    (kind) => {
      const reacting = after(plan, setReaction(brick, reactionOfKind(kind)));
      const { reaction } = reacting.materials[0];
      if (reaction === undefined) throw new Error('no reaction');
      for (const { path, name, value } of reactionNumbers(reaction)) {
        const raised = applyCommand(reacting, setReactionNumber(brick, path, name, number(value + 0.125)));
        const found = reactionNumbers(raised.materials[0].reaction ?? reaction).find((item) => item.name === name);
        expect(found?.value).toBe(value + 0.125);
      }
      expect(after(reacting, setReaction(brick, null)).materials[0]).not.toHaveProperty('reaction');
    },
  );
});

describe('a contact', () => {
  it('becomes an air gap with two emissivities, and a resistance again', () => {
    const gap = after(
      plan,
      setContactKind(l1, { gap: 0.001, emissivities: [0.8, 0.8] }),
      setGapNumber(l1, 'gap', number(0.002)),
      setGapNumber(l1, 1, number(0.3)),
    );
    expect(gap.part.layers[0].contact).toEqual({ gap: 0.002, emissivities: [0.8, 0.3] });
    expect(after(gap, setContactKind(l1, 0), setContact(l1, number(0.01))).part.layers[0].contact).toBe(0.01);
    expect(applyCommand(plan, setGapNumber(l2, 'gap', number(1)))).toBe(plan);
  });
});

describe('a source', () => {
  it('is set, changed, and goes with its layer', () => {
    const heated = after(plan, setSource(soak, l1, 500, 'constant'), setSourceNumber(soak, l1, number(800)));
    expect(sourceOf(heated.cycle.stages[1], 'l1')).toBe(800);
    expect(after(heated, setSource(soak, l1, { expression: '100*x + t' }, 'e')).cycle.stages[1].sources).toEqual([
      { layer: 'l1', power: { expression: '100*x + t' } },
    ]);
    expect(after(heated, setSource(soak, l1, null, 'none')).cycle.stages[1]).not.toHaveProperty('sources');
    expect(after(heated, removeLayer(l1)).cycle.stages[1]).not.toHaveProperty('sources');
    expect(applyCommand(plan, setSourceNumber(soak, l1, number(5)))).toBe(plan);
  });
});

describe('a face', () => {
  const radiating = after(plan, setExposureKind(heat, 'start', 'Hot face', 'radiation'));

  it('that radiates keeps the temperature outside and has an emissivity', () => {
    expect(radiating.cycle.stages[0].exposures.start).toEqual({
      kind: 'radiation',
      emissivity: 0.8,
      enclosure: { follow: 'setPoint', offset: 0 },
    });
    const shiny = after(radiating, setEmissivity(heat, 'start', 'Hot face', number(0.2)));
    expect(shiny.cycle.stages[0].exposures.start).toMatchObject({ emissivity: 0.2 });
    const film = after(shiny, setExposureKind(heat, 'start', 'Hot face', 'film'));
    expect(film.cycle.stages[0].exposures.start).toMatchObject({ surroundings: { follow: 'setPoint' } });
  });

  it('radiates beside its film to an enclosure with a temperature of its own', () => {
    const beside = after(
      plan,
      setRadiation(heat, 'end', 'Cold face', { emissivity: 0.9, enclosure: 15 }),
      setScheduleNumber(heat, 'end', 'Cold face', 'enclosure', number(12)),
      setEmissivity(heat, 'end', 'Cold face', number(0.7)),
    );
    expect(beside.cycle.stages[0].exposures.end).toMatchObject({ radiation: { emissivity: 0.7, enclosure: 12 } });
    expect(after(beside, setRadiation(heat, 'end', 'Cold face', null)).cycle.stages[0].exposures.end).not.toHaveProperty(
      'radiation',
    );
    expect(applyCommand(plan, setEmissivity(heat, 'end', 'Cold face', number(0.5)))).toBe(plan);
  });

  it('takes a correlation and its numbers', () => {
    const wind = { correlation: 'forcedPlate', fluid: 'air', length: 2, velocity: 3 } as const;
    const blown = after(
      plan,
      setSchedule(heat, 'end', 'Cold face', 'coefficient', wind, 'wind'),
      setCorrelationNumber(heat, 'end', 'Cold face', 'length', number(4)),
      setCorrelationNumber(heat, 'end', 'Cold face', 'velocity', number(5)),
    );
    expect(blown.cycle.stages[0].exposures.end).toMatchObject({ coefficient: { ...wind, length: 4, velocity: 5 } });
  });

  it('copied to the next stage holds the last value of its enclosure', () => {
    const ramps = { start: 20, segments: [{ to: 300, duration: 600 }] };
    const own = after(radiating, setSchedule(heat, 'start', 'Hot face', 'enclosure', ramps, 'own ramps'));
    const copied = after(own, copyExposuresFromBefore(soak));
    expect(copied.cycle.stages[1].exposures.start).toEqual({ kind: 'radiation', emissivity: 0.8, enclosure: 300 });
  });
});

describe('the start', () => {
  it('is a profile that begins where the layers began, and can be replaced', () => {
    const cold = after(plan, makeStartPerLayer(), setStartTemperature(l1, number(80)), makeStartProfile());
    expect(cold.initial).toEqual({
      profile: [
        [0, 80],
        [0.237, 25],
      ],
    });
    const points: [number, number][] = [
      [0, 10],
      [0.1, 30],
    ];
    const set = after(cold, setStartProfile(points));
    expect(set.initial).toEqual({ profile: points });
    expect(after(set, makeStartUniform()).initial).toEqual({ temperature: 10 });
    expect(applyCommand(set, setStartTemperature(l1, number(99)))).toBe(set);
  });

  it('is the steady state of a stage, and room temperature after that', () => {
    const steady = after(plan, makeStartSteady(heat));
    expect(steady.initial).toEqual({ steady: heat.exposures });
    expect(after(steady, makeStartUniform()).initial).toEqual({ temperature: 20 });
  });
});
