/** Lets changes of one file happen one after the other: two at once would lose one. */
export function inTurns(): <T>(change: () => Promise<T>) => Promise<T> {
  let last: Promise<unknown> = Promise.resolve();
  return (change) => {
    const result = last.then(change);
    last = result.catch(() => undefined);
    return result;
  };
}
