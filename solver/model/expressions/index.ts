/** Doors of expressions: what a person may write, checked and made into a function of numbers. */
export { readExpression, type Compiled, type ReadExpression } from './expression';
export { evaluatorOf } from './evaluator';
export { FUNCTIONS } from './functions';
