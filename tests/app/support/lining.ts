/** A plan for the app's tests: three layers, three stages, every kind of exposure, probes and requirements. */
import { checkProject, newProject, type Project } from '../../../solver/model';

const fixed = {
  kind: 'film' as const,
  coefficient: 10,
  surroundings: 25,
};

export function lining(change: (project: Project) => Project = (project) => project): Project {
  const base = newProject();
  const project: Project = {
    ...base,
    title: 'Test lining',
    materials: [
      { id: 'brick', name: 'Brick', conductivity: 1.5, density: 2200, heatCapacity: 900, source: 'data sheet' },
      { id: 'steel', name: 'Steel', conductivity: 45, density: 7850, heatCapacity: 500 },
      { id: 'spare', name: 'Spare', conductivity: 1, density: 1000, heatCapacity: 1000 },
    ],
    part: {
      kind: 'wall',
      innerRadius: 0,
      layers: [
        { id: 'l1', name: 'Lining', material: 'brick', thickness: 0.15, contact: 0 },
        { id: 'l2', name: 'Backing', material: 'brick', thickness: 0.075, contact: 0.004 },
        { id: 'l3', name: 'Shell', material: 'steel', thickness: 0.012, contact: 0 },
      ],
      faces: { start: { name: 'Hot face' }, end: { name: 'Cold face' } },
    },
    initial: { temperature: 25 },
    cycle: {
      setPoint: { name: 'Gas', start: 25 },
      stages: [
        {
          id: 'heat',
          name: 'Heat',
          end: { whenScheduleDone: true },
          setPoint: { segments: [{ to: 525, rate: 100 / 3600 }, { hold: 3600 }] },
          exposures: {
            start: { kind: 'film', coefficient: 45, surroundings: { follow: 'setPoint', offset: 0 } },
            end: fixed,
          },
        },
        {
          id: 'soak',
          name: 'Soak',
          end: { after: 7200 },
          exposures: {
            start: { kind: 'temperature', temperature: { start: 500, segments: [{ to: 550, duration: 3600 }] } },
            end: fixed,
          },
        },
        { id: 'rest', name: 'Rest', end: { after: 3600 }, exposures: { start: { kind: 'insulated' }, end: fixed } },
      ],
    },
    probes: [
      { id: 'p1', name: 'Face', at: { face: 'start' } },
      { id: 'p2', name: 'Middle', at: { layer: 'l2', fraction: 0.5 } },
      { id: 'p3', name: 'Behind', at: { interface: 'l2', side: 'after' } },
      { id: 'p4', name: 'Deep', at: { depth: 0.2 } },
    ],
    requirements: [
      {
        id: 'r1',
        name: 'Lining hot',
        of: { point: 'coldest' },
        must: { kind: 'heldFor', sense: 'atLeast', limit: 108, duration: 3600 },
        counts: { kind: 'cycle' },
      },
      {
        id: 'r2',
        name: 'Middle below',
        of: { probe: 'p2' },
        must: { kind: 'staysBelow', limit: 400 },
        counts: { kind: 'stage', stage: 'soak' },
      },
      {
        id: 'r3',
        name: '',
        of: { difference: 'material' },
        must: { kind: 'staysBelow', limit: 200 },
        counts: { kind: 'within', time: 7200, from: 'heat' },
      },
    ],
  };
  const read = checkProject(change(project));
  if (read.kind !== 'project') throw new Error(JSON.stringify(read));
  return read.project;
}

/** Makes an attempt to change it an error. */
export function frozen<T>(value: T): T {
  if (typeof value === 'object' && value !== null && !Object.isFrozen(value)) {
    Object.freeze(value);
    Object.values(value).forEach(frozen);
  }
  return value;
}
