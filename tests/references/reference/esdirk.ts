/**
 * ESDIRK4(3)6L[2]SA: six stages, the first explicit, one diagonal; order 4 with an embedded order 3, L-stable, stiffly
 * accurate. C. A. Kennedy and M. H. Carpenter, Additive Runge–Kutta schemes for convection–diffusion–reaction equations,
 * Applied Numerical Mathematics 44 (2003) 139–181, the implicit half of ARK4(3)6L[2]SA.
 */
export const GAMMA = 1 / 4;
export const TIMES = [0, 1 / 2, 83 / 250, 31 / 50, 17 / 20, 1];
export const WEIGHTS = [
  [],
  [1 / 4],
  [8611 / 62500, -1743 / 31250],
  [5012029 / 34652500, -654441 / 2922500, 174375 / 388108],
  [15267082809 / 155376265600, -71443401 / 120774400, 730878875 / 902184768, 2285395 / 8070912],
  [82889 / 524892, 0, 15625 / 83664, 69875 / 102672, -2260 / 8211],
];
export const LAST = [...WEIGHTS[5], GAMMA];
export const EMBEDDED = [
  4586570599 / 29645900160,
  0,
  178811875 / 945068544,
  814220225 / 1159782912,
  -3700637 / 11593932,
  61727 / 225920,
];
