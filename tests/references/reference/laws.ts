/** What crosses a face, a contact, or comes from inside, and its slope over temperature; written from the laws again. */
import { courseAt, lineAt, type Contact, type LaidCoefficient, type LaidExposure, type LaidSource } from '../../../solver/model';
import { FLUIDS } from '../../../solver/materials';
import { readExpression } from '../../../solver/model/expressions';
import { tableAt } from './substance';

/** CODATA 2018, W/(m²·K⁴). */
const STEFAN_BOLTZMANN = 5.670374419e-8;
const kelvin = (celsius: number): number => celsius + 273.15;

export type Side = 'before' | 'after';
/** Flux into the part, W/m², and its slope, W/(m²·K), at a temperature of the face. */
export type FaceLaw = (temperature: number) => { flux: number; slope: number };

/** The law of a face at a time; a number: the face is held at that temperature. */
export function faceLawAt(exposure: LaidExposure, time: number, side: Side): FaceLaw | number {
  switch (exposure.kind) {
    case 'insulated':
      return () => ({ flux: 0, slope: 0 });
    case 'temperature':
      return courseAt(exposure.temperature, time, side);
    case 'flux': {
      const flux = courseAt(exposure.flux, time, side);
      return () => ({ flux, slope: 0 });
    }
    case 'film': {
      const coefficient = coefficientAt(exposure.coefficient, time, side);
      const surroundings = courseAt(exposure.surroundings, time, side);
      const { radiation } = exposure;
      const emitted = radiation === null ? 0 : radiation.emissivity * STEFAN_BOLTZMANN;
      const enclosure = radiation === null ? 0 : kelvin(courseAt(radiation.enclosure, time, side));
      return (temperature) => {
        const { value, slope } = coefficient(temperature);
        const absolute = kelvin(temperature);
        return {
          flux: value * (surroundings - temperature) + emitted * (enclosure ** 4 - absolute ** 4),
          slope: slope * (surroundings - temperature) - value - 4 * emitted * absolute ** 3,
        };
      };
    }
  }
}

type Coefficient = (temperature: number) => { value: number; slope: number };

function coefficientAt(coefficient: LaidCoefficient, time: number, side: Side): Coefficient {
  switch (coefficient.kind) {
    case 'course': {
      const value = lineAt(coefficient.course, time, side);
      return () => ({ value, slope: 0 });
    }
    case 'table':
      return differenced((temperature) => tableAt(coefficient.table, temperature));
    case 'expression': {
      const evaluate = reader(coefficient.expression, ['Ts', 't', 'clock']);
      return differenced((temperature) => evaluate([temperature, time - coefficient.stageStart, time]));
    }
    case 'correlation':
      throw new RangeError('the reference knows no correlations');
  }
}

/** A slope by a small central difference: it only steers Newton's method. */
function differenced(value: (temperature: number) => number): Coefficient {
  const by = 1e-4;
  return (temperature) => ({
    value: value(temperature),
    slope: (value(temperature + by) - value(temperature - by)) / (2 * by),
  });
}

const readers = new Map<string, (values: number[]) => number>();
function reader(text: string, variables: readonly string[]): (values: number[]) => number {
  const known = readers.get(text);
  if (known !== undefined) return known;
  const read = readExpression(text, variables);
  if (read.kind === 'refused') throw new RangeError(`${text} ${read.message}`);
  readers.set(text, read.evaluate);
  return read.evaluate;
}

/** Flux across a contact from one side to the other, and its slopes over the temperatures of both. */
export function contactFlux(contact: Contact, from: number, to: number): { flux: number; slopes: [number, number] } {
  if (typeof contact === 'number') {
    return { flux: (from - to) / contact, slopes: [1 / contact, -1 / contact] };
  }
  const by = 1e-3;
  const flux = gapFlux(contact, from, to);
  return {
    flux,
    slopes: [(gapFlux(contact, from + by, to) - flux) / by, (gapFlux(contact, from, to + by) - flux) / by],
  };
}

/** Still air at the mean temperature, and radiation between two grey planes. */
function gapFlux({ gap, emissivities }: Exclude<Contact, number>, from: number, to: number): number {
  const exchanged = STEFAN_BOLTZMANN / (1 / emissivities[0] + 1 / emissivities[1] - 1);
  // The table of air is data, not numerics: the product's own.
  const conducted = (FLUIDS.air.conductivity(0.5 * (from + to)) / gap) * (from - to);
  return conducted + exchanged * (kelvin(from) ** 4 - kelvin(to) ** 4);
}

/** Power of a source at a time, W/m³, over temperature and depth. */
export function powerAt({ power }: LaidSource, time: number, side: Side): (temperature: number, depth: number) => number {
  if (!('expression' in power)) {
    const value = lineAt(power, time, side);
    return () => value;
  }
  const evaluate = reader(power.expression, ['T', 'x', 't', 'clock']);
  return (temperature, depth) => evaluate([temperature, depth, time - power.stageStart, time]);
}
