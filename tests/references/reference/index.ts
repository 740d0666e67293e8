/** Door of the reference: answers of a plan by an independent solver. */
export { reference, runAt, type Extrapolated } from './reference';
export type { ReferenceAnswer } from './watch';
