/**
 * Nonlinear sets of the NIST Statistical Reference Datasets (public domain), certified to 11 digits.
 * Misra1a, DanWood, Rat42, BoxBOD: READ. The others: from memory; agreement of a least-squares minimum with a remembered one
 * to ten digits cannot be chance, so they still test the fitter.
 */
export interface NistSet {
  readonly name: string;
  readonly status: "READ" | "from memory";
  readonly x: readonly number[];
  readonly y: readonly number[];
  readonly starts: readonly (readonly number[])[];
  readonly certified: readonly number[];
  readonly deviations: readonly number[] | null;
  readonly residualSumOfSquares: number | null;
  readonly model: (p: readonly number[], x: number) => number;
  readonly derivatives: (p: readonly number[], x: number) => number[];
}

const misra = {
  x: [77.6, 114.9, 141.1, 190.8, 239.9, 289, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760],
  y: [10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.4, 75.47, 81.78],
};

export const nistSets: readonly NistSet[] = [
  {
    name: "Misra1a",
    status: "READ",
    ...misra,
    starts: [
      [500, 0.0001],
      [250, 0.0005],
    ],
    certified: [2.3894212918e2, 5.5015643181e-4],
    deviations: [2.7070075241, 7.2668688436e-6],
    residualSumOfSquares: 1.2455138894e-1,
    model: ([a, b], x) => a! * (1 - Math.exp(-b! * x)),
    derivatives: ([a, b], x) => [-Math.expm1(-b! * x), a! * x * Math.exp(-b! * x)],
  },
  {
    name: "DanWood",
    status: "READ",
    x: [1.309, 1.471, 1.49, 1.565, 1.611, 1.68],
    y: [2.138, 3.421, 3.597, 4.34, 4.882, 5.66],
    starts: [
      [1, 5],
      [0.7, 4],
    ],
    certified: [7.6886226176e-1, 3.8604055871],
    deviations: [1.828197386e-2, 5.1726610913e-2],
    residualSumOfSquares: 4.3173084083e-3,
    model: ([a, b], x) => a! * x ** b!,
    derivatives: ([a, b], x) => [x ** b!, a! * x ** b! * Math.log(x)],
  },
  {
    name: "Rat42",
    status: "READ",
    x: [9, 14, 21, 28, 42, 57, 63, 70, 79],
    y: [8.93, 10.8, 18.59, 22.33, 39.35, 56.11, 61.73, 64.62, 67.08],
    starts: [
      [100, 1, 0.1],
      [75, 2.5, 0.07],
    ],
    certified: [7.2462237576e1, 2.6180768402, 6.7359200066e-2],
    deviations: [1.7340283401, 8.8295217536e-2, 3.4465663377e-3],
    residualSumOfSquares: 8.0565229338,
    model: ([a, b, c], x) => a! / (1 + Math.exp(b! - c! * x)),
    derivatives: ([a, b, c], x) => {
      const e = Math.exp(b! - c! * x);
      return [1 / (1 + e), (-a! * e) / (1 + e) ** 2, (a! * x * e) / (1 + e) ** 2];
    },
  },
  {
    name: "BoxBOD",
    status: "READ",
    x: [1, 2, 3, 5, 7, 10],
    y: [109, 149, 149, 191, 213, 224],
    starts: [
      [1, 1],
      [100, 0.75],
    ],
    certified: [2.1380940889e2, 5.4723748542e-1],
    deviations: [1.2354515176e1, 1.0455993237e-1],
    residualSumOfSquares: 1.1680088766e3,
    model: ([a, b], x) => a! * (1 - Math.exp(-b! * x)),
    derivatives: ([a, b], x) => [-Math.expm1(-b! * x), a! * x * Math.exp(-b! * x)],
  },
  {
    name: "Misra1b",
    status: "from memory",
    ...misra,
    starts: [
      [500, 0.0001],
      [300, 0.0002],
    ],
    certified: [3.3799746163e2, 3.9039091287e-4],
    deviations: null,
    residualSumOfSquares: null,
    model: ([a, b], x) => a! * (1 - (1 + (b! * x) / 2) ** -2),
    derivatives: ([a, b], x) => [1 - (1 + (b! * x) / 2) ** -2, a! * x * (1 + (b! * x) / 2) ** -3],
  },
  {
    name: "Misra1c",
    status: "from memory",
    ...misra,
    starts: [
      [500, 0.0001],
      [600, 0.0002],
    ],
    certified: [6.3642725809e2, 2.0813627256e-4],
    deviations: null,
    residualSumOfSquares: null,
    model: ([a, b], x) => a! * (1 - (1 + 2 * b! * x) ** -0.5),
    derivatives: ([a, b], x) => [1 - (1 + 2 * b! * x) ** -0.5, a! * x * (1 + 2 * b! * x) ** -1.5],
  },
  {
    name: "MGH09",
    status: "from memory",
    x: [4, 2, 1, 0.5, 0.25, 0.167, 0.125, 0.1, 0.0833, 0.0714, 0.0625],
    y: [0.1957, 0.1947, 0.1735, 0.16, 0.0844, 0.0627, 0.0456, 0.0342, 0.0323, 0.0235, 0.0246],
    starts: [
      [25, 39, 41.5, 39],
      [0.25, 0.39, 0.415, 0.39],
    ],
    certified: [1.9280693458e-1, 1.9128232873e-1, 1.2305650693e-1, 1.3606233068e-1],
    deviations: null,
    residualSumOfSquares: null,
    model: ([a, b, c, d], x) => (a! * (x * x + b! * x)) / (x * x + c! * x + d!),
    derivatives: ([a, b, c, d], x) => {
      const [up, down] = [x * x + b! * x, x * x + c! * x + d!];
      return [up / down, (a! * x) / down, (-a! * up * x) / down ** 2, (-a! * up) / down ** 2];
    },
  },
  {
    name: "MGH10",
    status: "from memory",
    x: Array.from({ length: 16 }, (_, i) => 50 + 5 * i),
    y: [34780, 28610, 23650, 19630, 16370, 13720, 11540, 9744, 8261, 7030, 6005, 5147, 4427, 3820, 3307, 2872],
    starts: [
      [2, 400000, 25000],
      [0.02, 4000, 250],
    ],
    certified: [5.609636471e-3, 6.1813463463e3, 3.4522363462e2],
    deviations: null,
    residualSumOfSquares: null,
    model: ([a, b, c], x) => a! * Math.exp(b! / (x + c!)),
    derivatives: ([a, b, c], x) => {
      const e = Math.exp(b! / (x + c!));
      return [e, (a! * e) / (x + c!), (-a! * e * b!) / (x + c!) ** 2];
    },
  },
  {
    name: "Rat43",
    status: "from memory",
    x: Array.from({ length: 15 }, (_, i) => i + 1),
    y: [
      16.08, 33.83, 65.8, 97.2, 191.55, 326.2, 386.87, 520.53, 590.03, 651.92, 724.93, 699.56, 689.96, 637.56, 717.41,
    ],
    starts: [
      [100, 10, 1, 1],
      [700, 5, 0.75, 1.3],
    ],
    certified: [6.996415127e2, 5.2771253025, 7.5962938329e-1, 1.2792483859],
    deviations: null,
    residualSumOfSquares: 8.786404908e3,
    model: ([a, b, c, d], x) => a! / (1 + Math.exp(b! - c! * x)) ** (1 / d!),
    derivatives: ([a, b, c, d], x) => {
      const e = Math.exp(b! - c! * x);
      const f = a! / (1 + e) ** (1 / d!);
      const slope = (-f * e) / (d! * (1 + e));
      return [f / a!, slope, -x * slope, (f * Math.log1p(e)) / d! ** 2];
    },
  },
  {
    name: "MGH17",
    status: "from memory",
    x: Array.from({ length: 33 }, (_, i) => 10 * i),
    y: [
      0.844, 0.908, 0.932, 0.936, 0.925, 0.908, 0.881, 0.85, 0.818, 0.784, 0.751, 0.718, 0.685, 0.658, 0.628, 0.603,
      0.58, 0.558, 0.538, 0.522, 0.506, 0.49, 0.478, 0.467, 0.457, 0.448, 0.438, 0.431, 0.424, 0.42, 0.414, 0.411,
      0.406,
    ],
    starts: [
      [50, 150, -100, 1, 2],
      [0.5, 1.5, -1, 0.01, 0.02],
    ],
    certified: [3.7541005211e-1, 1.9358469127, -1.4646871366, 1.286753464e-2, 2.2122699662e-2],
    deviations: null,
    residualSumOfSquares: 5.4648946975e-5,
    model: ([a, b, c, d, e], x) => a! + b! * Math.exp(-x * d!) + c! * Math.exp(-x * e!),
    derivatives: ([, b, c, d, e], x) => {
      const [first, second] = [Math.exp(-x * d!), Math.exp(-x * e!)];
      return [1, first, second, -x * b! * first, -x * c! * second];
    },
  },
  {
    name: "Lanczos2",
    status: "from memory",
    // the three exponentials of the description, rounded to six digits as the data are
    x: Array.from({ length: 24 }, (_, i) => 0.05 * i),
    y: Array.from({ length: 24 }, (_, i) =>
      Number(
        (0.0951 * Math.exp(-0.05 * i) + 0.8607 * Math.exp(-0.15 * i) + 1.5576 * Math.exp(-0.25 * i)).toPrecision(6),
      ),
    ),
    starts: [
      [1.2, 0.3, 5.6, 5.5, 6.5, 7.6],
      [0.5, 0.7, 3.6, 4.2, 4, 6.3],
    ],
    certified: [9.6251029939e-2, 1.0057332849, 8.6424689056e-1, 3.0078283915, 1.5529016879, 5.00287981],
    deviations: null,
    residualSumOfSquares: 2.2299428125e-11,
    model: ([a, b, c, d, e, f], x) => a! * Math.exp(-b! * x) + c! * Math.exp(-d! * x) + e! * Math.exp(-f! * x),
    derivatives: ([a, b, c, d, e, f], x) => {
      const [first, second, third] = [Math.exp(-b! * x), Math.exp(-d! * x), Math.exp(-f! * x)];
      return [first, -x * a! * first, second, -x * c! * second, third, -x * e! * third];
    },
  },
];
