/** A port: the only thing that protocol code knows of a platform. */
export interface Port {
  post(message: unknown, transfer?: ArrayBuffer[]): void;
  /** Calls the handler for every message; returns what stops it. */
  listen(handler: (message: unknown) => void): () => void;
  close(): void;
}
