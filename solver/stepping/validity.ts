/** Film correlations watched while a run goes on: where one is used outside of what it is for, once a face and stage. */
import { CORRELATION_ENTRIES, type CorrelationEntry, type OutOfRange } from '../materials';
import { FACES, placeOf, type FaceId, type LaidCycle, type Warning } from '../model';

/** What one correlation met furthest outside one of its ranges. */
interface Excursion {
  readonly stage: number;
  readonly face: FaceId;
  readonly entry: CorrelationEntry;
  worst: OutOfRange;
}

export class ValidityWatch {
  private readonly cycle: LaidCycle;
  private readonly excursions = new Map<string, Excursion>();

  constructor(cycle: LaidCycle) {
    this.cycle = cycle;
  }

  /** Looks at a stage's correlations; `outOfRange` tells of a face (0 start, 1 end) as it is now. */
  look(stage: number, outOfRange: (face: number) => readonly OutOfRange[]): void {
    FACES.forEach((face, index) => {
      const exposure = this.cycle.stages[stage].exposures[face];
      if (exposure.kind !== 'film' || exposure.coefficient.kind !== 'correlation') return;
      const entry = CORRELATION_ENTRIES[exposure.coefficient.correlation];
      for (const found of outOfRange(index)) {
        const key = `${stage} ${face} ${found.what}`;
        const known = this.excursions.get(key);
        if (known === undefined) this.excursions.set(key, { stage, face, entry, worst: found });
        else if (distance(found) > distance(known.worst)) known.worst = found;
      }
    });
  }

  warnings(): Warning[] {
    return [...this.excursions.values()].map(({ stage, face, entry, worst }) => {
      const { what, value, range } = worst;
      const unit = what === 'film temperature' ? ' °C' : '';
      const name = what === 'film temperature' ? `the ${what}` : what;
      const from = range.from > 0 || unit !== '' ? `from ${figure(range.from)}` : 'up';
      return {
        code: 'correlation-range',
        message:
          `At the ${face} face in stage ${this.cycle.stages[stage].name}, ${name} came to ${figure(value)}${unit}; ` +
          `${entry.describes} (${entry.source}) holds for ${what} ${from} to ${figure(range.to)}${unit}. It was used all the same: ` +
          `the film coefficient is less sure there.`,
        place: placeOf(['cycle', 'stages', stage, 'exposures', face, 'coefficient']),
      };
    });
  }
}

/** Three digits, large numbers with their power of ten. */
function figure(value: number): string {
  return value < 1e6 ? String(Number(value.toPrecision(3))) : value.toExponential(2).replace(/\.?0*e\+/, 'e');
}

/** How far outside a number lies: as a factor for Ra and Re, in K for a temperature. */
function distance({ what, value, range }: OutOfRange): number {
  if (what === 'film temperature') return Math.max(range.from - value, value - range.to);
  return value > range.to ? value / range.to : range.from / Math.max(value, Number.MIN_VALUE);
}
