/**
 * The report of a run: the document that `run --json` prints. Every key carries its unit; a time is cycle time, and null
 * where a thing never happened.
 */
import { z } from 'zod';
import { quantity } from './fields';
import type { Project } from './project';
import { VERDICTS, type Outcome, type RunResult } from './results';

export const REPORT_FORMAT = 'soakwright-report';
export const REPORT_VERSION = 1;

/** Stands in every report. */
export const CAUTION =
  'A plan, not a certificate. Verify on a thermocoupled trial; codes, standards and licensed practice govern.';

const time = (meaning: string) => quantity('s', {}, meaning);
const depth = quantity('m', {}, 'depth from the start face');
const temperature = quantity('°C');
const text = z.string();
const count = z.int().nonnegative();

const uncertainty = (of: string) =>
  z.number().nonnegative().nullable().describe(`half the width of the 95 % interval of the ${of}`);

const answerSchema = z
  .strictObject({
    requirement: text.describe('id of the requirement'),
    name: text,
    verdict: z.enum(VERDICTS),
    met: z
      .boolean()
      .nullable()
      .describe('true for met and thin, false for not-met and never-reached, null if it cannot be judged'),
    time_s: time('when it was met, or when it was worst').nullable(),
    stage: text.nullable().describe('id of the stage of time_s'),
    stage_time_s: time('time_s from the start of that stage').nullable(),
    value: z.number().nullable().describe('the figure that decides, in `unit`'),
    limit: z.number().describe('in `unit`'),
    margin: z.number().nullable().describe('positive is good, in `margin_unit`'),
    unit: z.enum(['°C', 'K', 's']),
    margin_unit: z.enum(['K', 's']),
    uncertainty: uncertainty('margin, from grid and step, in `margin_unit`; null where it is not known'),
    value_uncertainty: uncertainty('value, in `unit`'),
    time_uncertainty_s: uncertainty('time_s, where it is the time of a crossing'),
    position_m: depth.nullable(),
  })
  .describe('verdict of a requirement');

const slowestSchema = z
  .strictObject({
    position_m: depth,
    layer: text.describe('id of the layer'),
    stage: text.describe('id of the stage'),
    time_s: time('when'),
  })
  .describe('the place last to close 95 % of its own change in a stage');

const differenceFields = {
  value_K: quantity('K'),
  time_s: time('when'),
  between: z.tuple([depth, depth]).describe('depths of the coldest and the hottest point, m'),
};

const firstSchema = z.strictObject({
  slowest: slowestSchema.nullable(),
  hottest: z.strictObject({ position_m: depth, layer: text, time_s: time('when'), temperature_C: temperature }).nullable(),
  largestDifference: z.strictObject(differenceFields).nullable(),
  largestDifferenceInMaterial: z.strictObject({ ...differenceFields, material: text.describe('id of the material') }).nullable(),
});

const outcomeReasons = [
  'finished',
  'cancelled',
  'step-above-limit',
  'step-too-small',
  'not-converged',
  'not-finite',
  'too-many-steps',
  'invalid-project',
] as const satisfies readonly Outcome['reason'][];

const outcomeSchema = z.strictObject({
  reason: z.enum(outcomeReasons),
  reached_s: time('how far it came'),
  stage: text.nullable(),
  message: text.nullable(),
  remedy: z.strictObject({ step_s: quantity('s'), nodes: count.nullable() }).optional(),
});

export const reportSchema = z
  .strictObject({
    format: z.literal(REPORT_FORMAT),
    version: z.literal(REPORT_VERSION),
    title: text.describe('title of the plan'),
    caution: z.literal(CAUTION),
    outcome: outcomeSchema.describe('how the run ended; "finished" alone is a success'),
    answers: z.array(answerSchema).describe('one a requirement, in the order of the plan'),
    first: firstSchema.describe('answers that come unasked'),
    layers: z
      .array(z.strictObject({ layer: text, name: text, from_m: depth, to_m: depth }))
      .describe('the layers from the start face to the end face; other parts of the report name a layer by its id'),
    stages: z.array(
      z.strictObject({
        stage: text.describe('id of the stage'),
        name: text,
        start_s: time('start'),
        end_s: time('end'),
        slowest: slowestSchema.nullable(),
      }),
    ),
    probes: z
      .array(
        z.strictObject({
          probe: text.describe('id of the probe'),
          name: text,
          position_m: depth,
          time_s: z.array(z.number()).describe('every step, every extreme and every output row; a jump is two at one time'),
          temperature_C: z.array(z.number()),
        }),
      )
      .describe('histories of the probes'),
    energy: z.strictObject({
      basis: z.enum(['J/m²', 'J/m', 'J']).describe('what the heats are per'),
      in_J: z.number().describe('heat through both faces, positive into the part'),
      byFace_J: z.strictObject({ start: z.number(), end: z.number() }),
      generated_J: z.number().describe('heat given off inside, by sources and reactions'),
      stored_J: z.number(),
      closure: z.number().describe('|stored − in − generated| over the sum of what was exchanged'),
      lag_K: quantity('K', {}, 'largest distance between carried heat and the temperatures'),
    }),
    stability: z
      .strictObject({
        explicit_limit_s: quantity('s', {}, 'largest stable step of the explicit scheme on this grid'),
        no_overshoot_s: quantity('s', {}, 'largest step of the explicit scheme without overshoot'),
        set_by: z.strictObject({ layer: text.describe('name of the layer'), position_m: depth }),
      })
      .nullable(),
    solver: z.strictObject({
      scheme: z.enum(['automatic', 'explicit', 'implicit', 'crankNicolson']),
      method: text,
      steps: count,
      rejected: count,
      volumes: count,
      factorisations: count,
      kernels: z.enum(['typescript', 'wasm']),
      wall_s: quantity('s', {}, 'time of the solve on the clock'),
    }),
    refinement: z
      .array(
        z.strictObject({
          of: z.enum(['accuracy', 'grid', 'step']),
          runs: count.describe('runs compared, this one among them'),
          order: z.number().nullable().describe('middle one of the orders of convergence observed'),
        }),
      )
      .nullable()
      .describe('what the uncertainty of the answers was drawn from; null where it is not known'),
    warnings: z.array(z.strictObject({ code: text, message: text, place: text.nullable().describe('place in the plan') })),
  })
  .describe('Soakwright report of one run');
export type Report = z.infer<typeof reportSchema>;

/** The report of a run of a project. */
export function buildReport(project: Project, result: RunResult): Report {
  const { outcome, first, stages, energy, stability, solver, refinement, warnings } = result;
  let edge = 0;
  return {
    format: REPORT_FORMAT,
    version: REPORT_VERSION,
    title: project.title,
    caution: CAUTION,
    outcome,
    answers: result.answers.map(({ spans: _spans, ...answer }) => answer),
    first,
    layers: project.part.layers.map(({ id, name, thickness }) => ({ layer: id, name, from_m: edge, to_m: (edge += thickness) })),
    stages,
    probes: result.probes.map(({ time_s, temperature_C, ...probe }) => ({
      ...probe,
      time_s: [...time_s],
      temperature_C: [...temperature_C],
    })),
    energy,
    stability,
    solver,
    refinement,
    warnings,
  };
}
