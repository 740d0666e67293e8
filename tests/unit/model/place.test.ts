import { describe, expect, it } from 'vitest';
import { positionOf } from '../../../solver/model';
import { plan } from '../../support/plan';

describe('the position of a place', () => {
  const { part } = plan({ layers: [0.1, 0.2, 0.3], materials: ['a', 'b', 'a'] });

  it('counts depths and fractions of the part from the start face', () => {
    expect(positionOf(part, { depth: 0.25 })).toEqual({ position_m: 0.25, layer: 1 });
    expect(positionOf(part, { fraction: 0.75 }).position_m).toBeCloseTo(0.45, 15);
    expect(positionOf(part, { fraction: 0.75 }).layer).toBe(2);
    expect(positionOf(part, { fraction: 0 })).toEqual({ position_m: 0, layer: 0 });
    expect(positionOf(part, { fraction: 1 }).layer).toBe(2);
  });

  it('gives a depth on the edge of two layers to the layer before, rounding of sums included', () => {
    expect(positionOf(part, { depth: 0.1 }).layer).toBe(0);
    expect(positionOf(part, { depth: 0.3 }).layer).toBe(1); // 0.1 + 0.2 is 0.30000000000000004
    expect(positionOf(part, { depth: 0.1 + 1e-9 }).layer).toBe(1);
    expect(positionOf(part, { fraction: 0.5 }).layer).toBe(1);
  });

  it('never lies behind the end face', () => {
    const thickness = 0.1 + 0.2 + 0.3;
    expect(positionOf(part, { depth: 0.6 * (1 + 1e-10) })).toEqual({ position_m: thickness, layer: 2 });
    expect(positionOf(part, { face: 'end' })).toEqual({ position_m: thickness, layer: 2 });
    expect(positionOf(part, { face: 'start' })).toEqual({ position_m: 0, layer: 0 });
  });

  it('takes a fraction within its layer, and the named side of an interface', () => {
    expect(positionOf(part, { layer: 'l2', fraction: 0.5 })).toEqual({ position_m: 0.2, layer: 1 });
    expect(positionOf(part, { layer: 'l2', fraction: 0 })).toEqual({ position_m: 0.1, layer: 1 });
    expect(positionOf(part, { interface: 'l1', side: 'before' })).toEqual({ position_m: 0.1, layer: 0 });
    expect(positionOf(part, { interface: 'l1', side: 'after' })).toEqual({ position_m: 0.1, layer: 1 });
  });
});
