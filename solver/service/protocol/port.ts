/** A port: the only thing that protocol code knows of a platform. */
export interface Port {
  post(message: unknown, transfer?: ArrayBuffer[]): void;
  /** Calls the handler for every message; returns what stops it. */
  listen(handler: (message: unknown) => void): () => void;
  close(): void;
}

/** A running solver as seen from outside: its port, and notice of its end. */
export interface Link {
  readonly port: Port;
  /** Called once when the solver has ended by itself; returns what stops listening. */
  onExit(handler: (reason: string) => void): () => void;
  /** Ends it, without notice. */
  kill(): void;
}

/** A clock's one duty here: to call back after `wait_ms`; returns what calls it off. */
export type After = (wait_ms: number, call: () => void) => () => void;
