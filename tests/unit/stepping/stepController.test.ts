import { describe, expect, it } from 'vitest';
import { StepController } from '../../../solver/stepping/stepController';

const started = (first = 1): StepController => {
  const controller = new StepController(4);
  controller.limit(first);
  return controller;
};

describe('the step controller', () => {
  it('starts no longer than it is limited to, and never longer than what is left', () => {
    expect(started(2).propose(100)).toBe(2);
    expect(started(200).propose(100)).toBe(100);
  });

  it('goes to the edge where a step would nearly get there, and halves what is less than two steps', () => {
    expect(started(0.9995).propose(1)).toBe(1);
    expect(started(0.8).propose(1)).toBe(0.5);
    expect(started(0.4).propose(1)).toBe(0.4);
  });

  it('takes the step at which the error would just do, with a margin: error^(−1/5)', () => {
    const controller = started();
    controller.accept(1, 1);
    expect(controller.next).toBeCloseTo(0.9, 6);
    controller.accept(0.9, 2 ** -5);
    expect(controller.next).toBeCloseTo(0.9 * 0.9 * 2, 6);
  });

  it('grows six times at most, and shrinks five times at most after acceptance', () => {
    const controller = started();
    controller.accept(1, 0);
    expect(controller.next).toBeCloseTo(6, 5);
    controller.accept(6, 1e9);
    expect(controller.next).toBeCloseTo(1.2, 6);
  });

  it('shrinks after a rejection, ten times at most, and always', () => {
    const controller = started();
    controller.reject(1, 32);
    expect(controller.next).toBeCloseTo(0.45, 6);
    controller.reject(0.45, Infinity);
    expect(controller.next).toBeCloseTo(0.045, 6);
    controller.reject(1, 0.5);
    expect(controller.next).toBeLessThan(1);
  });

  it('does not grow in the step after a rejection', () => {
    const controller = started();
    controller.reject(1, 32);
    controller.accept(0.45, 1e-6);
    expect(controller.next).toBeCloseTo(0.45, 6);
    controller.accept(0.45, 1e-6);
    expect(controller.next).toBeCloseTo(6 * 0.45, 6);
  });

  it('keeps what it wanted when an edge cut the step short', () => {
    const controller = started(10);
    expect(controller.propose(1)).toBe(1);
    controller.accept(1, 0.5);
    expect(controller.next).toBe(10);
  });

  it('is limited again where something jumps', () => {
    const controller = started(10);
    controller.limit(0.01);
    expect(controller.propose(100)).toBe(0.01);
    controller.limit(5);
    expect(controller.propose(100)).toBe(0.01);
  });
});
