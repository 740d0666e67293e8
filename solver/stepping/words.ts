/** Figures in messages: three digits, in the unit people would say. */

export const seconds = (value: number): string => `${figure(value)} s`;

export const depth = (metres: number): string => (metres < 1 ? `${figure(metres * 1000)} mm` : `${figure(metres)} m`);

export const figure = (value: number): string => String(Number(value.toPrecision(3)));

/** The largest figure of two digits that is not above a value: what one would type instead. */
export function roundedDown(value: number): number {
  const unit = 10 ** (Math.floor(Math.log10(value)) - 1);
  // A whole number of units may come out a hair above the value.
  const floor = Number((Math.floor((value / unit) * (1 + 1e-12)) * unit).toPrecision(2));
  return floor > value ? Number((floor - unit).toPrecision(2)) : floor;
}

/** "layer Shell", but not "layer Layer 1". */
export const layerNamed = (name: string): string => (/^layer\b/i.test(name) ? name : `layer ${name}`);
