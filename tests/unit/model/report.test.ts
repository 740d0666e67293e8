import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { buildReport, CAUTION, reportSchema, type Answer, type RunResult } from '../../../solver/model';
import { plan, requirement } from '../../support/plan';

const answer: Answer = {
  requirement: 'r',
  name: 'It',
  verdict: 'not-met',
  met: false,
  time_s: 130,
  stage: 's1',
  stage_time_s: 130,
  value: 140,
  limit: 150,
  margin: -10,
  unit: '°C',
  margin_unit: 's',
  uncertainty: 0.5,
  value_uncertainty: 0.01,
  time_uncertainty_s: null,
  position_m: null,
  spans: [{ from_s: 0, to_s: 100, kind: 'counting' }],
};
const result: RunResult = {
  outcome: { reason: 'finished', reached_s: 200, stage: 's1', message: null },
  answers: [answer],
  first: {
    slowest: { position_m: 0.1, layer: 'l1', stage: 's1', time_s: 190 },
    hottest: { position_m: 0, layer: 'l1', time_s: 200, temperature_C: 220 },
    largestDifference: { value_K: 40, time_s: 20, between: [0.1, 0] },
    largestDifferenceInMaterial: null,
  },
  stages: [{ stage: 's1', name: 'Stage 1', start_s: 0, end_s: 200, slowest: null }],
  probes: [
    { probe: 'p', name: 'Probe', position_m: 0, time_s: Float64Array.of(0, 200), temperature_C: Float64Array.of(20, 220) },
  ],
  field: {
    time_s: new Float64Array(0),
    coldest_C: new Float64Array(0),
    hottest_C: new Float64Array(0),
    withinMaterial_K: new Float64Array(0),
  },
  frames: {
    time_s: new Float64Array(0),
    position_m: new Float64Array(0),
    layerStart: new Int32Array(0),
    temperature_C: new Float32Array(0),
    faceFlux_W_m2: new Float32Array(0),
  },
  energy: { basis: 'J/m²', in_J: 1, byFace_J: { start: 1, end: 0 }, generated_J: 0, stored_J: 1, closure: 0, lag_K: 0 },
  stability: null,
  solver: {
    scheme: 'automatic',
    method: 'any',
    steps: 2,
    rejected: 0,
    volumes: 5,
    factorisations: 2,
    kernels: 'typescript',
    wall_s: 0.01,
  },
  refinement: [{ of: 'accuracy', runs: 4, order: 0.9 }],
  warnings: [{ code: 'c', message: 'm', place: null }],
};

describe('the report of a run', () => {
  const project = plan({ stages: [200], requirements: [requirement({ kind: 'reaches', sense: 'atLeast', limit: 150 })] });
  const report = buildReport(project, result);

  it('is plain data that its own schema accepts and JSON gives back', () => {
    expect(reportSchema.parse(JSON.parse(JSON.stringify(report)))).toEqual(report);
  });

  it('carries the figures of the run and the caution, and neither frames nor bars', () => {
    expect(report).toMatchObject({ title: 'Test plan', caution: CAUTION, first: result.first, energy: result.energy });
    expect(report.probes).toEqual([{ probe: 'p', name: 'Probe', position_m: 0, time_s: [0, 200], temperature_C: [20, 220] }]);
    expect(report.answers[0]).toMatchObject({ verdict: 'not-met', margin: -10, margin_unit: 's' });
    expect(report.answers[0]).not.toHaveProperty('spans');
    expect(report).not.toHaveProperty('frames');
  });

  it('is refused by its schema with a key too many, a verdict that does not exist or a number that is not finite', () => {
    expect(reportSchema.safeParse({ ...report, frames: [] }).success).toBe(false);
    expect(reportSchema.safeParse({ ...report, answers: [{ ...report.answers[0], verdict: 'solving' }] }).success).toBe(false);
    const broken = { ...report, first: { ...report.first, largestDifference: { value_K: NaN, time_s: 1, between: [0, 1] } } };
    expect(reportSchema.safeParse(broken).success).toBe(false);
  });

  it('has a JSON Schema that requires every part of it', () => {
    const schema = z.toJSONSchema(reportSchema) as { required: string[]; additionalProperties: boolean };
    expect(schema.required.sort()).toEqual(Object.keys(report).sort());
    expect(schema.additionalProperties).toBe(false);
  });
});
