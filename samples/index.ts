/** Doors of the samples: their list, and the text of each, loaded when it is opened. */
import { samples } from './list';

export { samples, type Sample } from './list';

const files = import.meta.glob<string>('./*.soak', { query: '?raw', import: 'default' });

/** The text of a sample's file. Throws RangeError for an id that is not in the list. */
export async function openSample(id: string): Promise<string> {
  if (!samples.some((sample) => sample.id === id)) throw new RangeError(`there is no sample "${id}"`);
  return await files[`./${id}.soak`]();
}
