import { describe, expect, it } from 'vitest';
import { applyCommand, depthOf, moveEdge, placeNear, pullSegment, pullSetPoint } from '../../../app/commands';
import { frozen, lining } from '../support/lining';

const plan = frozen(lining());
const { layers } = plan.part;
const thicknesses = (project: typeof plan): number[] => project.part.layers.map(({ thickness }) => thickness);

describe('moving an edge', () => {
  it('moves that edge alone: the layer after it gives or takes the difference', () => {
    const after = applyCommand(plan, moveEdge(layers[0], 0.16, '160 mm'));
    expect(thicknesses(after)).toEqual([0.16, 0.065, 0.012]);
  });

  it('makes the part thicker or thinner at the end face', () => {
    const after = applyCommand(plan, moveEdge(layers[2], 0.02, '20 mm'));
    expect(thicknesses(after)).toEqual([0.15, 0.075, 0.02]);
  });

  it('never uses a layer up', () => {
    expect(applyCommand(plan, moveEdge(layers[0], 0.3, '300 mm'))).toBe(plan);
    expect(applyCommand(plan, moveEdge(layers[2], 0, '0 mm'))).toBe(plan);
  });

  it('is named for the undo list', () => {
    expect(moveEdge(layers[0], 0.16, '160 mm').name).toBe('Edge of Lining to 160 mm');
  });
});

describe('dropping a probe', () => {
  const reach = 0.001;
  it('near a face or an edge ties it there, on the near side', () => {
    expect(placeNear(0.0004, layers, { depth: 0.1 }, reach)).toEqual({ face: 'start' });
    expect(placeNear(0.9, layers, { depth: 0.1 }, reach)).toEqual({ face: 'end' });
    expect(placeNear(0.1496, layers, { depth: 0.1 }, reach)).toEqual({ interface: 'l1', side: 'before' });
    expect(placeNear(0.2255, layers, { depth: 0.1 }, reach)).toEqual({ interface: 'l2', side: 'after' });
  });

  it('elsewhere keeps the kind of place it had, as long as that can say it', () => {
    expect(placeNear(0.05, layers, { depth: 0.1 }, reach)).toEqual({ depth: 0.05 });
    expect(placeNear(0.05, layers, { face: 'start' }, reach)).toEqual({ depth: 0.05 });
    const inLayer = placeNear(0.16875, layers, { layer: 'l2', fraction: 0.5 }, reach);
    expect(inLayer).toEqual({ layer: 'l2', fraction: 0.25 });
    expect(placeNear(0.05, layers, { layer: 'l2', fraction: 0.5 }, reach)).toEqual({ depth: 0.05 });
    const inPart = placeNear(0.1185, layers, { fraction: 0.1 }, reach);
    expect(depthOf(inPart, layers)).toBeCloseTo(0.1185, 12);
    expect(inPart).toHaveProperty('fraction');
  });
});

describe('pulling a segment', () => {
  it('in value keeps the rate, so that it takes longer', () => {
    expect(pullSegment({ to: 525, rate: 0.1 }, 25, { to: 725 })).toEqual({ to: 725, rate: 0.1 });
  });

  it('in time takes another rate', () => {
    expect(pullSegment({ to: 525, rate: 0.1 }, 25, { length: 10_000 })).toEqual({ to: 525, rate: 0.05 });
    expect(pullSegment({ to: 25, rate: 0.1 }, 125, { length: 1_000 })).toEqual({ to: 25, rate: 0.1 });
  });

  it('keeps the rate where a time says nothing about it', () => {
    expect(pullSegment({ to: 525, rate: 0.1 }, 25, { length: 0 })).toEqual({ to: 525, rate: 0.1 });
    expect(pullSegment({ to: 25, rate: 0.1 }, 25, { length: 500 })).toEqual({ to: 25, rate: 0.1 });
  });

  it('moves what segments with a duration and holds have', () => {
    expect(pullSegment({ to: 100, duration: 60 }, 20, { to: 120, length: 90 })).toEqual({ to: 120, duration: 90 });
    expect(pullSegment({ hold: 60 }, 20, { to: 120 })).toEqual({ hold: 60 });
    expect(pullSegment({ hold: 60 }, 20, { length: 90 })).toEqual({ hold: 90 });
  });

  it('changes that one segment of the set-point', () => {
    const heat = plan.cycle.stages[0];
    const after = applyCommand(plan, pullSetPoint(heat, 0, 25, { to: 600 }, '600 °C'));
    expect(after.cycle.stages[0].setPoint?.segments).toEqual([{ to: 600, rate: 100 / 3600 }, { hold: 3600 }]);
    expect(pullSetPoint(heat, 0, 25, { to: 600 }, '600 °C').name).toBe('Set-point of Heat to 600 °C');
    expect(applyCommand(plan, pullSetPoint(heat, 7, 25, { to: 600 }, '600 °C'))).toBe(plan);
    expect(applyCommand(plan, pullSetPoint({ id: 'gone', name: '' }, 0, 25, { to: 600 }, '600 °C'))).toBe(plan);
  });
});
