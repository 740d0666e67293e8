/** Edits of the part as a whole: its kind and its bore. */
import type { FaceId, Part, Project } from '../../solver/model';
import { FACES, isSolid, partThickness } from '../../solver/model';
import type { Command, Entered } from './command';
import { enterAt } from './edit';

export const PART_KINDS: Record<Part['kind'], string> = { wall: 'plane wall', cylinder: 'cylinder', sphere: 'sphere' };

type Shape = Pick<Part, 'kind' | 'innerRadius'>;

/** What a face is called that has no name of its own. */
export function faceKind(part: Shape, face: FaceId): string {
  if (part.kind === 'wall') return face === 'start' ? 'start face' : 'end face';
  if (face === 'end') return 'outer face';
  return isSolid(part) ? 'centre' : 'inner face';
}

const capital = (text: string): string => text[0].toUpperCase() + text.slice(1);

/** Faces still called by their kind are called by that of the new shape. */
function renamed(part: Part, shape: Shape): Part {
  const next = { ...part, ...shape };
  const faces = { ...part.faces };
  for (const face of FACES) {
    if (faces[face].name === capital(faceKind(part, face))) faces[face] = { name: capital(faceKind(next, face)) };
  }
  return { ...next, faces };
}

/** A solid cylinder or sphere has no start face: nothing may be met there. */
function withPart(project: Project, part: Part): Project {
  if (!isSolid(part)) return { ...project, part };
  const start = { kind: 'insulated' } as const;
  const stages = project.cycle.stages.map((stage) => ({ ...stage, exposures: { ...stage.exposures, start } }));
  const { initial } = project;
  return {
    ...project,
    part,
    cycle: { ...project.cycle, stages },
    initial: 'steady' in initial ? { steady: { ...initial.steady, start } } : initial,
  };
}

/** A wall, a cylinder or a sphere. Round parts begin hollow, with a bore as wide as they are thick, so that no face is lost. */
export const setPartKind = (kind: Part['kind']): Command => ({
  name: `Part: ${PART_KINDS[kind]}`,
  apply: (project) => {
    const { part } = project;
    if (part.kind === kind) return project;
    const radius = part.kind === 'wall' ? Number(partThickness(part).toPrecision(6)) : part.innerRadius;
    return withPart(project, renamed(part, { kind, innerRadius: kind === 'wall' ? 0 : radius }));
  },
});

/** Radius of the bore, m; 0: solid, and what the inner face met is dropped. */
export const setInnerRadius = (entered: Entered): Command => ({
  name: `Inner radius to ${entered.text}`,
  apply: (project) => {
    const { part } = project;
    if (part.kind === 'wall') return project;
    const shaped = withPart(project, renamed(part, { kind: part.kind, innerRadius: entered.value }));
    return enterAt(shaped, ['part', 'innerRadius'], entered);
  },
});
