/** The functions and constants that an expression may use. Angles in radians. */
export const FUNCTIONS: Readonly<
  Record<string, { arguments: [least: number, most: number]; apply: (...x: number[]) => number }>
> = {
  abs: { arguments: [1, 1], apply: Math.abs },
  sqrt: { arguments: [1, 1], apply: Math.sqrt },
  cbrt: { arguments: [1, 1], apply: Math.cbrt },
  exp: { arguments: [1, 1], apply: Math.exp },
  log: { arguments: [1, 1], apply: Math.log },
  log10: { arguments: [1, 1], apply: Math.log10 },
  sin: { arguments: [1, 1], apply: Math.sin },
  cos: { arguments: [1, 1], apply: Math.cos },
  tan: { arguments: [1, 1], apply: Math.tan },
  tanh: { arguments: [1, 1], apply: Math.tanh },
  atan: { arguments: [1, 1], apply: Math.atan },
  min: { arguments: [1, 8], apply: Math.min },
  max: { arguments: [1, 8], apply: Math.max },
  pow: { arguments: [2, 2], apply: Math.pow },
};

export const CONSTANTS: Readonly<Record<string, number>> = { pi: Math.PI, e: Math.E };
