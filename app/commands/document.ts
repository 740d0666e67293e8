import type { Command } from './command';
import { writeAt } from './edit';

export const setTitle = (title: string): Command => ({
  name: `Title to ${title}`,
  apply: (project) => writeAt(project, ['title'], title),
});

export const setNotes = (notes: string): Command => ({
  name: 'Notes',
  apply: (project) => writeAt(project, ['notes'], notes),
});
