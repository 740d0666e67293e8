import { evaluatorOf, type Curve } from '../model';
import { tableAt } from './films';

/** Value of a property at a temperature, °C. Throws RangeError for an expression that the reader refuses. */
export function curveAt(curve: Curve, temperature: number): number {
  if (typeof curve === 'number') return curve;
  return 'table' in curve ? tableAt(curve.table, temperature) : evaluatorOf(curve.expression, ['T'])([temperature]);
}
