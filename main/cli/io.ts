/** All that a command touches of the world, so that tests can hand it another one. */
export interface Io {
  readonly version: string;
  /** Results, to standard output. */
  print(text: string): void;
  /** Remarks and failures, to standard error. */
  remark(text: string): void;
  /** Results may be coloured. */
  readonly colour: boolean;
  /** Remarks go to a terminal, where a line can be written over. */
  readonly terminal: boolean;
  /** Text of a file, or of standard input for "-". Throws what the file system says. */
  readInput(file: string): Promise<string>;
  /** Writes a file whole into a folder, which is made if need be. Throws what the file system says. */
  writeInto(folder: string, name: string, text: string): Promise<void>;
  /** Aborted when the person interrupts. */
  readonly signal: AbortSignal;
}

export const STANDARD_INPUT = '-';
