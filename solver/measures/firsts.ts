/** First answers drawn from the field at every step: the hottest point and the largest differences of the whole run. */
import type { FirstAnswers, Part } from '../model';
import type { FieldOverStep, FieldQuantity } from './field';
import type { Quarters } from './quarters';

/** A record must be broken by more than rounding, K, so that a plateau has it at its first instant. */
const ROUNDING_K = 1e-9;

export class Firsts {
  private readonly part: Pick<Part, 'layers'>;
  private readonly layerAt: (depth: number) => number;
  private hottest: FirstAnswers['hottest'] = null;
  private difference: FirstAnswers['largestDifference'] = null;
  private inMaterial: FirstAnswers['largestDifferenceInMaterial'] = null;

  /** `layerAt`: index of the layer that holds a depth. */
  constructor(part: Pick<Part, 'layers'>, layerAt: (depth: number) => number) {
    this.part = part;
    this.layerAt = layerAt;
  }

  observe(quarters: Quarters, field: FieldOverStep): void {
    const hottest = highest(field, 'hottest', this.hottest?.temperature_C ?? -Infinity);
    if (hottest !== null) {
      const { position, value } = field.extremesAt(hottest).hottest;
      this.hottest = {
        position_m: position,
        layer: this.part.layers[this.layerAt(position)].id,
        time_s: quarters.time(hottest),
        temperature_C: value,
      };
    }
    const part = highest(field, 'part', this.difference?.value_K ?? 0);
    if (part !== null) {
      const { coldest, hottest } = field.extremesAt(part);
      this.difference = {
        value_K: hottest.value - coldest.value,
        time_s: quarters.time(part),
        between: [coldest.position, hottest.position],
      };
    }
    const material = highest(field, 'material', this.inMaterial?.value_K ?? 0);
    if (material !== null) {
      const { coldestInPiece, hottestInPiece, piece } = field.extremesAt(material);
      this.inMaterial = {
        value_K: hottestInPiece.value - coldestInPiece.value,
        time_s: quarters.time(material),
        between: [coldestInPiece.position, hottestInPiece.position],
        material: piece.material,
      };
    }
  }

  answers(): Omit<FirstAnswers, 'slowest'> {
    return { hottest: this.hottest, largestDifference: this.difference, largestDifferenceInMaterial: this.inMaterial };
  }
}

/** The fraction at which a quantity is highest in the step, if it is above `best` there; null otherwise. */
function highest(field: FieldOverStep, quantity: FieldQuantity, best: number): number | null {
  const rough = field.rough(quantity);
  if (rough.bounds()[1] <= best + ROUNDING_K) return null;
  let fraction: number | null = null;
  let top = best;
  for (const sample of (rough.monotone ? rough : field.course(quantity)).samples()) {
    if (sample.value > top + ROUNDING_K) {
      top = sample.value;
      fraction = sample.fraction;
    }
  }
  return fraction;
}
