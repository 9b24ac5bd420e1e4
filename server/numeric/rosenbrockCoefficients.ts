/**
 * Coefficients of a Rosenbrock method in the form that needs no product with the Jacobian:
 *
 *   (I/(h gamma) - J) u_i = f(t + nodes_i h, y + sum_j<i a_ij u_j) + sum_j<i (c_ij/h) u_j + slopes_i h f_t
 *   y(t + h) = y + sum a_sj u_j + u_s, with u_s itself as the estimate of the error
 *   y(t + theta h) = (1 - theta) y0 + theta (y1 + (1 - theta)(p_1 + theta (p_2 + theta p_3))),
 *   p_k = sum_j h_kj u_j
 *
 * Triangles are stored by rows with `stages` columns.
 *
 * @see Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.7
 */
export interface RosenbrockCoefficients {
  readonly stages: number;
  /** Order of the result, of the embedded result and of the dense output. */
  readonly order: number;
  readonly embeddedOrder: number;
  readonly denseOrder: number;
  readonly gamma: number;
  readonly a: Float64Array;
  readonly c: Float64Array;
  readonly nodes: Float64Array;
  readonly slopes: Float64Array;
  /** Three rows. */
  readonly h: Float64Array;
}

function rows(...values: number[][]): Float64Array {
  const columns = 8;
  const table = new Float64Array(values.length * columns);
  values.forEach((row, i) => {
    table.set(row, i * columns);
  });
  return table;
}

const LAST = [
  -7.502846399306121, 2.561846144803919, -11.627539656261098, -0.18268767659942256, 0.030198172008377946,
];

/**
 * Rodas5P: eight stages, order 5 with an embedded result of order 4 and dense output of order 4,
 * L-stable and stiffly accurate (so is the embedded result); about order 4 is left on the problem of
 * Prothero & Robinson, whatever its stiffness.
 *
 * @see Steinebach 2023, Construction of Rosenbrock-Wanner method Rodas5P and numerical benchmarks within
 * the Julia Differential Equations package, BIT Numer. Math. 63:27. Figures from memory; every order
 * condition of the three results is verified to 1e-13 by the tests, which leaves them no freedom to be wrong
 * in what the order rests on.
 */
export const RODAS5P: RosenbrockCoefficients = {
  stages: 8,
  order: 5,
  embeddedOrder: 4,
  denseOrder: 4,
  gamma: 0.21193756319429014,
  a: rows(
    [],
    [3.0],
    [2.849394379747939, 0.45842242204463923],
    [-6.954028509809101, 2.489845061869568, -10.358996098473584],
    [2.8029986275628964, 0.5072464736228206, -0.3988312541770524, -0.04721187230404641],
    LAST,
    [...LAST, 1],
    [...LAST, 1, 1],
  ),
  c: rows(
    [],
    [-14.155112264123755],
    [-17.97296035885952, -2.859693295451294],
    [147.12150275711716, -1.41221402718213, 71.68940251302358],
    [165.43517024871676, -0.4592823456491126, 42.90938336958603, -5.961986721573306],
    [24.854864614690072, -3.0009227002832186, 47.4931110020768, 5.5814197821558125, -0.6610691825249471],
    [
      30.91273214028599, -3.1208243349937974, 77.79954646070892, 34.28646028294783, -19.097331116725623,
      -28.087943162872662,
    ],
    [
      37.80277123390563, -3.2571969029072276, 112.26918849496327, 66.9347231244047, -40.06618937091002,
      -54.66780262877968, -9.48861652309627,
    ],
  ),
  nodes: Float64Array.of(
    0,
    0.6358126895828704,
    0.4095798393397535,
    0.9769306725060716,
    0.4288403609558664,
    1,
    1,
    1,
  ),
  slopes: Float64Array.of(
    0.21193756319429014,
    -0.42387512638858027,
    -0.3384627126235924,
    1.8046452872882734,
    2.325825639765069,
    0,
    0,
    0,
  ),
  h: rows(
    [
      25.948786856663858, -2.5579724845846235, 10.433815404888879, -2.3679251022685204, 0.524948541321073,
      1.1241088310450404, 0.4272876194431874, -0.17202221070155493,
    ],
    [
      -9.91568850695171, -0.9689944594115154, 3.0438037242978453, -24.495224566215796, 20.176138334709044,
      15.98066361424651, -6.789040303419874, -6.710236069923372,
    ],
    [
      11.419903575922262, 2.8879645146136994, 72.92137995996029, 80.12511834622643, -52.072871366152654,
      -59.78993625266729, -0.15582684282751913, 4.883087185713722,
    ],
  ),
};
