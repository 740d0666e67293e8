/** The tint of a material in section and tables, by its order in the plan; six, then from the first again. */
import type { Project } from '../../solver/model';

export const tintNumber = (project: Project, material: string): number =>
  (Math.max(
    0,
    project.materials.findIndex((item) => item.id === material),
  ) %
    6) +
  1;

export const tintOf = (project: Project, material: string): string => `var(--m${tintNumber(project, material)})`;
