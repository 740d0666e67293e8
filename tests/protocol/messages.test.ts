import { describe, expect, it } from 'vitest';
import { newProject } from '../../solver/model';
import { FAILURES, readFromSolver, readToSolver } from '../../solver/service/protocol';
import { anyFrames, anyResult } from './fakes';

describe('what a solver is told', () => {
  const cases = [newProject()];
  it.each([
    { type: 'solve', job: 1, revision: 0, cases },
    { type: 'cancel', job: 1 },
    { type: 'ping', id: 3 },
  ])('is understood: $type', (message) => expect(readToSolver(message)).toEqual(message));

  it.each([
    ['no object', 'solve'],
    ['no type', { job: 1, revision: 1, cases }],
    ['an unknown type', { type: 'explode', job: 1 }],
    ['no case', { type: 'solve', job: 1, revision: 1, cases: [] }],
    ['a case that is no object', { type: 'solve', job: 1, revision: 1, cases: ['plan'] }],
    ['a job that is no whole number', { type: 'cancel', job: 1.5 }],
    ['a job below zero', { type: 'cancel', job: -1 }],
    ['too many cases', { type: 'solve', job: 1, revision: 1, cases: new Array(10001).fill(cases[0]) }],
  ])('is refused with %s', (_, message) => expect(readToSolver(message)).toBeNull());

  it('survives the way through structured cloning', () => {
    const message = { type: 'solve', job: 1, revision: 0, cases };
    expect(readToSolver(structuredClone(message))).toEqual(message);
  });
});

describe('what a solver says', () => {
  const about = { job: 1, revision: 2 };
  const way = { ...about, case: 0, time_s: 5, end_s: 9, stage: 's1', fraction: 0.5 };
  it.each([
    { type: 'ready', protocol: 1 },
    { type: 'pong', id: 3 },
    { type: 'progress', ...way },
    { type: 'answers', ...about, case: 0, final: false, result: anyResult },
    { type: 'frames', ...about, case: 0, frames: anyFrames },
    { type: 'done', ...about, outcomes: [{ reason: 'finished', reached_s: 1, stage: null, message: null }] },
  ])('is understood: $type', (message) => expect(readFromSolver(message)).toEqual(message));

  it.each(Object.keys(FAILURES))('is understood: failed, %s', (code) => {
    const message = { type: 'failed', ...about, code, message: 'why' };
    expect(readFromSolver(message)).toEqual(message);
  });

  it.each([
    ['no type', way],
    ['a fraction above 1', { type: 'progress', ...way, fraction: 1.01 }],
    ['a time that is no number', { type: 'progress', ...way, time_s: Number.NaN }],
    ['answers without answers', { type: 'answers', ...about, case: 0, final: true, result: {} }],
    ['frames without temperatures', { type: 'frames', ...about, case: 0, frames: {} }],
    ['an outcome without a reason', { type: 'done', ...about, outcomes: [{}] }],
    ['an unknown failure', { type: 'failed', ...about, code: 'bored', message: '' }],
  ])('is refused with %s', (_, message) => expect(readFromSolver(message)).toBeNull());
});
