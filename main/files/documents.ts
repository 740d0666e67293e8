/**
 * The files that a person has put into the program's hands, and what each held when it was last read or written here.
 *
 * Only these may be written: a page asks for paths, and the choice of a path is the person's (dialog, drop, list, command line).
 */
import { readText, stampOf, type Stamp } from './read';
import { saveText } from './save';

export interface Documents {
  /** Reads a file that the person chose, and takes it into hand. Throws what the file system says. */
  open(path: string): Promise<string>;
  /** Takes a path that the person chose to save under into hand, whatever lies there. */
  take(path: string): void;
  /** Writes a file in hand, unless somebody else changed it since. Throws RangeError for a path that nobody chose. */
  save(path: string, text: string, options?: { overwriteChanged?: boolean }): Promise<'saved' | 'changed-on-disk'>;
}

export function createDocuments(): Documents {
  /** What each path held; null where it does not matter. */
  const inHand = new Map<string, Stamp | null>();
  return {
    async open(path) {
      const { text, stamp } = await readText(path);
      inHand.set(path, stamp);
      return text;
    },
    take: (path) => void inHand.set(path, null),
    async save(path, text, { overwriteChanged = false } = {}) {
      const known = inHand.get(path);
      if (known === undefined) throw new RangeError(`${path} was not chosen by anybody`);
      if (known !== null && !overwriteChanged) {
        const present = await stampOf(path);
        if (present !== null && present !== known) return 'changed-on-disk';
      }
      inHand.set(path, await saveText(path, text));
      return 'saved';
    },
  };
}
