import { describe, expect, it } from 'vitest';
import { layCycle, type Exposure, type Project } from '../../../solver/model';
import { planWarnings } from '../../../solver/planning/warnings';
import { plan, requirement } from '../../support/plan';

const gas: Exposure = { kind: 'film', coefficient: 20, surroundings: 500 };
const warningsOf = (project: Project) => planWarnings(project, layCycle(project));
const held = (duration: number) => ({ kind: 'heldFor', sense: 'atLeast', limit: 100, duration }) as const;

describe('warnings of a plan', () => {
  it('are none for a plan that can be met', () => {
    const project = plan({
      stages: [100, 100],
      exposures: { start: gas, end: gas },
      requirements: [
        { ...requirement({ kind: 'reaches', sense: 'atLeast', limit: 500 }), id: 'r1', name: 'One' },
        { ...requirement(held(100), { kind: 'stage', stage: 's2' }), id: 'r2', name: 'Two' },
        { ...requirement(held(150), { kind: 'stageEnd', stage: 's2' }), id: 'r3', name: 'Three' },
        { ...requirement(held(20), { kind: 'within', time: 100, from: 's2' }), id: 'r4', name: 'Four' },
      ],
    });
    expect(warningsOf(project)).toEqual([]);
  });

  it('name a probe or a requirement that shares its name, at the later one', () => {
    const at = { face: 'start' } as const;
    const project = plan({
      probes: [
        { id: 'p', name: 'Core', at },
        { id: 'q', name: 'Core', at },
        { id: 'r', name: '', at },
        { id: 's', name: '', at },
      ],
    });
    expect(warningsOf(project)).toEqual([
      { code: 'probe-name-twice', message: 'Another probe is named "Core" too.', place: 'probes[1].name' },
    ]);
  });

  it('say that a limit is hotter or colder than anything the part meets', () => {
    const above = requirement({ kind: 'reaches', sense: 'atLeast', limit: 540 });
    const below = requirement({ kind: 'reaches', sense: 'atMost', limit: 10 });
    const exposures = { start: gas, end: { kind: 'insulated' } as const };
    expect(warningsOf(plan({ exposures, requirements: [above] }))).toEqual([
      {
        code: 'limit-out-of-reach',
        message: '"It" cannot be met: nothing in the plan is hotter than 500 °C, the limit is 540 °C.',
        place: 'requirements[0].must.limit',
      },
    ]);
    expect(warningsOf(plan({ exposures, requirements: [below] }))[0].message).toContain('colder than 20 °C');
    const heated = { start: gas, end: { kind: 'flux', flux: 1000 } as const };
    expect(warningsOf(plan({ exposures: heated, requirements: [above] }))).toEqual([]);
    expect(warningsOf(plan({ exposures: heated, requirements: [below] }))).toHaveLength(1);
  });

  it('say that a time allowed runs on after the end of the cycle, and that a hold does not fit', () => {
    const late = requirement({ kind: 'reaches', sense: 'atLeast', limit: 100 }, { kind: 'within', time: 150, from: 's2' });
    const exposures = { start: gas, end: gas };
    const [warning] = warningsOf(plan({ stages: [3600, 100], exposures, requirements: [late] }));
    expect(warning.code).toBe('window-beyond-cycle');
    expect(warning.message).toBe('"It" allows 2 min 30 s, but the cycle ends 1 min 40 s after the time begins to count.');
    for (const counts of [
      { kind: 'cycle' },
      { kind: 'stage', stage: 's1' },
      { kind: 'within', time: 60 },
      { kind: 'stageEnd', stage: 's1' },
    ] as const) {
      const asked = requirement(held(3701), counts);
      const codes = warningsOf(plan({ stages: [3600, 100], exposures, requirements: [asked] })).map(({ code }) => code);
      expect(codes).toEqual(['hold-longer-than-window']);
    }
  });
});
