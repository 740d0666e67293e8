/** Small checked plans for tests. */
import { checkProject, newProject, type Project, type Requirement, type Stage } from '../../solver/model';

export interface PlanParts {
  /** Thickness of each layer, m; all of one material unless `materials` names them ('a', 'b', ...). */
  layers?: readonly number[];
  materials?: readonly string[];
  /** Contact resistance after each layer, m²·K/W. */
  contacts?: readonly number[];
  /** Length of each stage, s. */
  stages?: readonly number[];
  /** Exposures of all stages; default: insulated. */
  exposures?: Stage['exposures'];
  probes?: Project['probes'];
  requirements?: Requirement[];
  initial?: number;
  settings?: Partial<Project['settings']>;
}

/** A plan with ids l1, l2, … for layers, s1, s2, … for stages and a, b, … for materials. Throws where the plan has a problem. */
export function plan(parts: PlanParts = {}): Project {
  const base = newProject();
  const layers = parts.layers ?? [0.1];
  const materials = parts.materials ?? layers.map(() => 'a');
  const exposures = parts.exposures ?? { start: { kind: 'insulated' }, end: { kind: 'insulated' } };
  const document = {
    ...base,
    title: 'Test plan',
    materials: [...new Set(materials)].map((id) => ({
      id,
      name: `Material ${id}`,
      conductivity: 40,
      density: 8000,
      heatCapacity: 500,
    })),
    part: {
      ...base.part,
      layers: layers.map((thickness, i) => ({
        id: `l${i + 1}`,
        name: `Layer ${i + 1}`,
        material: materials[i],
        thickness,
        contact: parts.contacts?.[i] ?? 0,
      })),
    },
    initial: { temperature: parts.initial ?? 20 },
    cycle: {
      ...base.cycle,
      stages: (parts.stages ?? [100]).map((after, i) => ({ id: `s${i + 1}`, name: `Stage ${i + 1}`, end: { after }, exposures })),
    },
    probes: parts.probes ?? [{ id: 'p', name: 'Probe', at: { face: 'start' } }],
    requirements: parts.requirements ?? [],
    settings: { ...base.settings, ...parts.settings },
  };
  const read = checkProject(document);
  if (read.kind !== 'project') throw new Error(JSON.stringify(read));
  return read.project;
}

/** A requirement with id r and name 'It'. */
export const requirement = (
  must: Requirement['must'],
  counts: Requirement['counts'] = { kind: 'cycle' },
  of: Requirement['of'] = { probe: 'p' },
): Requirement => ({ id: 'r', name: 'It', of, must, counts });
