/**
 * Coefficients of RODAS5P in the transformed form of a Rosenbrock method (rosenbrock.ts has the equations).
 *
 * Eight stages, order 5 with an embedded solution of order 4, L-stable, stiffly accurate, of full order on differential-algebraic
 * problems of index 1, dense output of order 4.
 * Source: G. Steinebach, Construction of Rosenbrock–Wanner method Rodas5P and numerical benchmarks within the Julia differential
 * equations package, BIT Numerical Mathematics 63 (2023) 27. Transformed form: E. Hairer & G. Wanner, Solving Ordinary
 * Differential Equations II, section IV.7, equation (7.25).
 */

/** The diagonal of every stage, γ. */
export const GAMMA = 0.21193756319429014;

const sixth = [-7.502846399306121, 2.561846144803919, -11.627539656261098, -0.18268767659942256, 0.030198172008377946];

/** a[i][j]: weight of stage j in the point at which stage i is evaluated. Stages 7 and 8 add the stage before to its point. */
export const POINTS: readonly (readonly number[])[] = [
  [],
  [3],
  [2.849394379747939, 0.45842242204463923],
  [-6.954028509809101, 2.489845061869568, -10.358996098473584],
  [2.8029986275628964, 0.5072464736228206, -0.3988312541770524, -0.04721187230404641],
  sixth,
  [...sixth, 1],
  [...sixth, 1, 1],
];

/** c[i][j]: weight of stage j on the right-hand side of stage i. */
export const COUPLING: readonly (readonly number[])[] = [
  [],
  [-14.155112264123755],
  [-17.97296035885952, -2.859693295451294],
  [147.12150275711716, -1.41221402718213, 71.68940251302358],
  [165.43517024871676, -0.4592823456491126, 42.90938336958603, -5.961986721573306],
  [24.854864614690072, -3.0009227002832186, 47.4931110020768, 5.5814197821558125, -0.6610691825249471],
  [30.91273214028599, -3.1208243349937974, 77.79954646070892, 34.28646028294783, -19.097331116725623, -28.087943162872662],
  [
    37.80277123390563, -3.2571969029072276, 112.26918849496327, 66.9347231244047, -40.06618937091002, -54.66780262877968,
    -9.48861652309627,
  ],
];

/** Time of every stage as a part of the step. */
export const TIMES: readonly number[] = [
  0, 0.6358126895828704, 0.4095798393397535, 0.9769306725060716, 0.4288403609558664, 1, 1, 1,
];

/** Weight of the time derivative in every stage. */
export const TIME_SLOPES: readonly number[] = [
  0.21193756319429014, -0.42387512638858027, -0.3384627126235924, 1.8046452872882734, 2.325825639765069, 0, 0, 0,
];

/**
 * Dense output: y(x) = (1 − x) y0 + x (y1 + (1 − x)(k1 + x (k2 + x k3))), x the fraction of the step, k[m] = Σ over stages of row m
 * times the stage.
 */
export const DENSE: readonly (readonly number[])[] = [
  [
    25.948786856663858, -2.5579724845846235, 10.433815404888879, -2.3679251022685204, 0.524948541321073, 1.1241088310450404,
    0.4272876194431874, -0.17202221070155493,
  ],
  [
    -9.91568850695171, -0.9689944594115154, 3.0438037242978453, -24.495224566215796, 20.176138334709044, 15.98066361424651,
    -6.789040303419874, -6.710236069923372,
  ],
  [
    11.419903575922262, 2.8879645146136994, 72.92137995996029, 80.12511834622643, -52.072871366152654, -59.78993625266729,
    -0.15582684282751913, 4.883087185713722,
  ],
];
