/** Ids and names of new items. */

const LETTERS = 'abcdefghijkmnpqrstuvwxyz23456789';

/** A short random id such as "layer-k3f9q2m7"; random, so that an id is not used again after its item was removed. */
export function newId(kind: string): string {
  const draw = crypto.getRandomValues(new Uint8Array(8));
  return `${kind}-${[...draw].map((byte) => LETTERS[byte % LETTERS.length]).join('')}`;
}

/** A name that is free in the list: "Heat", then "Heat 2", "Heat 3". */
export function freeName(list: readonly { name: string }[], wanted: string): string {
  const taken = new Set(list.map((item) => item.name));
  if (!taken.has(wanted)) return wanted;
  const stem = wanted.replace(/ \d+$/, '');
  let number = 2;
  while (taken.has(`${stem} ${number}`)) number++;
  return `${stem} ${number}`;
}
