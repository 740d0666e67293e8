import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { newProject, projectSchema, reportSchema } from '../../../solver/model';
import { schemaFiles } from '../../../solver/model/schema/generate';
import { acceptsBySchema } from './jsonSchema';
import { command, sampleText } from '../cli/fakeIo';

const folder = new URL('../../../solver/model/schema/', import.meta.url);
const generated = schemaFiles();
const plan = JSON.parse(generated['plan.schema.json']) as Record<string, unknown>;
const report = JSON.parse(generated['run-report.schema.json']) as Record<string, unknown>;

describe('the shipped schemas', () => {
  it.each(Object.entries(generated))('%s is the one that the code gives (npm run schema writes it)', async (name, text) => {
    await expect(text).toMatchFileSnapshot(new URL(name, folder).pathname);
  });

  it('are all there is beside their generator', () => {
    expect(readdirSync(folder).sort()).toEqual(['generate.ts', ...Object.keys(generated)].sort());
  });

  it('name their draft and say what the numbers mean', () => {
    for (const name of Object.keys(generated)) {
      expect(JSON.parse(readFileSync(new URL(name, folder), 'utf8'))).toHaveProperty(
        '$schema',
        'https://json-schema.org/draft/2020-12/schema',
      );
    }
    const text = generated['plan.schema.json'];
    for (const unit of ['W/(m·K)', 'kg/m³', 'J/(kg·K)', 'm²·K/W', 'W/(m²·K)', 'W/m²', '°C', 'K/s']) expect(text).toContain(unit);
    expect(text).toContain('"exclusiveMinimum": -273.15');
  });
});

describe('the schema of a plan', () => {
  it('takes a new plan and every sample', () => {
    const texts = readdirSync(new URL('../../../samples/', import.meta.url)).filter((name) => name.endsWith('.soak'));
    const plans = [newProject(), ...texts.map((name) => JSON.parse(sampleText(name.replace('.soak', ''))) as unknown)];
    expect(plans.length).toBeGreaterThan(5);
    for (const document of plans) expect(acceptsBySchema(plan, document)).toBe(true);
  });

  it('takes a plan that leaves out what has a default, as the program does', () => {
    const { notes: _notes, output: _output, ...rest } = newProject();
    const short = { ...rest, settings: { scheme: 'automatic' } };
    expect(acceptsBySchema(plan, short)).toBe(true);
    expect(projectSchema.safeParse(short).success).toBe(true);
  });

  it.each([
    ['a thickness of zero', (project: Loose) => (project.part.layers[0].thickness = 0)],
    ['a key that is not known', (project: Loose) => (project.part.layers[0].width = 1)],
    ['an exposure of another kind', (project: Loose) => (project.cycle.stages[0].exposures.end = { kind: 'bath' })],
    ['a text for a number', (project: Loose) => (project.initial.temperature = '20')],
    ['no layers', (project: Loose) => (project.part.layers = [])],
    ['another version', (project: Loose) => (project.version = 2)],
  ])('refuses %s, as the program does', (_, spoil) => {
    const spoilt = structuredClone(newProject());
    spoil(spoilt as Loose);
    expect(acceptsBySchema(plan, spoilt)).toBe(false);
    expect(projectSchema.safeParse(spoilt).success).toBe(false);
  });
});

describe('the schema of a report', () => {
  it('takes what run --json prints', async () => {
    const { out } = await command(['run', 'a', '--json'], { files: { a: sampleText('forged-block') } });
    const document = JSON.parse(out) as Record<string, unknown>;
    expect(acceptsBySchema(report, document)).toBe(true);
    expect(reportSchema.safeParse(document).success).toBe(true);
    for (const key of ['answers', 'first', 'probes', 'energy', 'stability', 'solver', 'warnings']) {
      const { [key]: _, ...without } = document;
      expect(acceptsBySchema(report, without)).toBe(false);
    }
  });
});

/** A plan that may be spoilt. */
// eslint-disable-next-line @typescript-eslint/no-explicit-any -- spoiling is what types are there to stop
type Loose = any;
