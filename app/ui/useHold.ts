import { shallowRef, type ShallowRef } from 'vue';

/** What is being held, with the state it had when it was taken: moves are counted from there. */
export interface Hold<T> {
  readonly held: Readonly<ShallowRef<T | null>>;
  /** The state when taken; `make` is asked only at the first move. */
  take(make: () => T): T;
  letGo(): void;
}

export function useHold<T>(): Hold<T> {
  const held = shallowRef<T | null>(null);
  return {
    held,
    take: (make) => (held.value ??= make()),
    letGo: () => void (held.value = null),
  };
}
