import { evaluateAt, ratesAt, readFormula } from './evaluate-formula.js';
import type { PublishedRow } from './published-row.js';

const xuFroment = 'Xu & Froment (1989), AIChE J. 35, 88, Tables 5 and 6';

/** Constant as printed, its unit, and the printed value at the reference temperature. */
const reformingConstants = [
  [
    'k1',
    '4.225e15 kmol bar^0.5/(kg h) * exp(-240.1 kJ/mol / (R*T))',
    'kmol bar^0.5/(kg h)',
    648,
    1.842e-4,
    0.02,
  ],
  ['k2', '1.955e6 kmol/(kg h bar) * exp(-67.13 kJ/mol / (R*T))', 'kmol/(kg h bar)', 648, 7.558, 0.005],
  [
    'k3',
    '1.02e15 kmol bar^0.5/(kg h) * exp(-243.9 kJ/mol / (R*T))',
    'kmol bar^0.5/(kg h)',
    648,
    2.193e-5,
    0.02,
  ],
  ['K_CO', '8.23e-5 bar^-1 * exp(70.65 kJ/mol / (R*T))', 'bar^-1', 648, 40.91, 0.005],
  ['K_H2', '6.12e-9 bar^-1 * exp(82.9 kJ/mol / (R*T))', 'bar^-1', 648, 0.0296, 0.01],
  ['K_CH4', '6.65e-4 bar^-1 * exp(38.28 kJ/mol / (R*T))', 'bar^-1', 823, 0.1791, 0.005],
  ['K_H2O', '1.77e5 * exp(-88.68 kJ/mol / (R*T))', '', 823, 0.4152, 0.005],
] as const;

const reformingRows = reformingConstants.map(
  ([name, text, unit, temperature, expected, relative]): PublishedRow => ({
    id: `xu-froment-params ${name} at ${temperature} K`,
    source: xuFroment,
    status: 'memory',
    inputs: text,
    expected,
    unit: unit === '' ? '1' : unit,
    tolerance: {
      relative,
      reason:
        relative > 0.01
          ? 'activation energy printed to 0.1 kJ/mol'
          : 'constants printed to three or four digits',
    },
    obtain: () => evaluateAt(unit === '' ? text : `${text} / (1 ${unit})`, temperature),
  }),
);

const vandenBussche = 'Vanden Bussche & Froment (1996), J. Catal. 161, 1';

const methanolConstants = (
  [
    [493.2, 4.2125e-5, 0.0066963],
    [523.15, 1.8563e-5, 0.0116537],
    [550, 9.606e-6, 0.0181932],
  ] as const
).flatMap(([T, first, third]): PublishedRow[] => [
  {
    id: `methanol-VBF-K synthesis ${T} K`,
    source: vandenBussche,
    status: 'recomputed',
    inputs: `log10 K1 = 3066/T - 10.592, ${T} K`,
    expected: first,
    unit: 'bar^-2',
    tolerance: { relative: 1e-4, reason: 'digits written down' },
    obtain: () => evaluateAt('10^(3066 K / T - 10.592) * 1 bar^-2 / (1 bar^-2)', T),
  },
  {
    id: `methanol-VBF-K reverse shift ${T} K`,
    source: vandenBussche,
    status: 'recomputed',
    inputs: `log10 (1/K3) = -2073/T + 2.029, ${T} K`,
    expected: third,
    unit: '1',
    tolerance: { relative: 1e-4, reason: 'digits written down' },
    obtain: () => evaluateAt('10^(-2073 K / T + 2.029)', T),
  },
]);

/** Species of the laws below, in this order. */
export const methanolSpecies = ['CO', 'CO2', 'H2', 'H2O', 'methanol', 'N2'] as const;

const denominator =
  '(1 + 3453.38*p.H2O/p.H2 + 0.499 bar^-0.5*exp(17197 J/mol/(R*T))*sqrt(p.H2) + 6.62e-11 bar^-1*exp(124119 J/mol/(R*T))*p.H2O)';

/** The two rate laws with the constants as printed; mol/(kg s). */
export const methanolLaws: Readonly<Record<'synthesis' | 'reverseShift', string>> = {
  synthesis:
    `1.07 mol/(kg s bar^2)*exp(36696 J/mol/(R*T))*p.CO2*p.H2` +
    `*(1 - p.H2O*p.methanol/(p.H2^3*p.CO2*10^(3066 K/T - 10.592)*1 bar^-2))/${denominator}^3`,
  reverseShift:
    `1.22e10 mol/(kg s bar)*exp(-94765 J/mol/(R*T))*p.CO2` +
    `*(1 - 10^(2073 K/T - 2.029)*p.H2O*p.CO/(p.CO2*p.H2))/${denominator}`,
};

/** 50 bar: CO 4, CO2 3, H2 82, inert 11 mol %. */
const methanolFeed = [2e5, 1.5e5, 41e5, 0, 0, 5.5e5];

const methanolRates = (
  [
    ['synthesis', 0.052609],
    ['reverseShift', 0.0079],
  ] as const
).map(([name, expected], index): PublishedRow => ({
  id: `methanol-VBF rate ${name}`,
  source: `${vandenBussche}, eqs. for both rates`,
  status: 'recomputed',
  inputs: '493.2 K, 50 bar, 4 CO, 3 CO2, 82 H2, 11 inert mol %',
  expected,
  unit: 'mol/(kg s)',
  tolerance:
    index === 0
      ? {
          relative: 1e-3,
          reason: 'gas constant of 8.314 in the recomputation: 6e-5 of exponents that sum to 10',
        }
      : { relative: 6.5e-3, reason: 'two digits written down' },
  obtain: () => {
    const laws = Object.values(methanolLaws).map((text) =>
      readFormula(text, { speciesIds: [...methanolSpecies] }),
    );
    return ratesAt(laws, methanolFeed, 493.2)[index]!;
  },
}));

const sulphur: PublishedRow = {
  id: 'so2-k 1260 degR',
  source:
    'Eklund (1956), as in Fogler, Example 8-10 (3rd ed.): k = 3600 exp(-176008/T - 110.1 ln T + 912.8), T in degrees Rankine',
  status: 'recomputed',
  inputs: '1260 degR',
  expected: 0.0091917,
  unit: 'lbmol/(lb h atm)',
  tolerance: { relative: 1e-4, reason: 'digits written down' },
  obtain: () => evaluateAt('3600*exp(-176008/(1.8*T/1 K) - 110.1*log(1.8*T/1 K) + 912.8)', 700),
};

/** Coefficients of T, Z: 1, T, Z, T^2, Z^2, T^3, Z^3. */
const ammoniaPolynomials = [
  [
    150,
    [-17.5391, 0.0769785, 6.90055, -0.000108279, -26.4247, 4.92765e-8, 38.9373],
    [
      [653, 0.1, 0.7423],
      [700, 0.1, 0.6557],
      [750, 0.2, 0.711],
    ],
  ],
  [
    225,
    [-8.21255, 0.0377415, 6.19011, -5.35457e-5, -20.8696, 2.37914e-8, 27.884],
    [
      [700, 0.1, 0.5677],
      [750, 0.2, 0.6374],
    ],
  ],
  [
    300,
    [-4.67573, 0.0235487, 4.68735, -3.46331e-5, -11.2803, 1.54088e-8, 10.4663],
    [
      [700, 0.1, 0.4898],
      [750, 0.2, 0.5753],
    ],
  ],
] as const;

const ammoniaRows = ammoniaPolynomials.flatMap(([atmospheres, b, points]) =>
  points.map(([temperature, conversion, expected]): PublishedRow => ({
    id: `ammonia-eta ${atmospheres} atm ${temperature} K Z ${conversion}`,
    source: 'Dyson & Simon (1968), Ind. Eng. Chem. Fundam. 7, 605, Table I, eq. 39',
    status: 'recomputed',
    inputs: `b = ${b.join(', ')}`,
    expected,
    unit: '1',
    tolerance: { relative: 1e-3, reason: 'digits written down, after cancellation among the terms' },
    obtain: () => {
      const [T, Z] = ['(T/1 K)', String(conversion)];
      const text = `${b[0]} + ${b[1]}*${T} + ${b[2]}*${Z} + (${b[3]})*${T}^2 + (${b[4]})*${Z}^2 + ${b[5]}*${T}^3 + ${b[6]}*${Z}^3`;
      return evaluateAt(text, temperature);
    },
  })),
);

export const kineticsRows: readonly PublishedRow[] = [
  ...reformingRows,
  ...methanolConstants,
  ...methanolRates,
  sulphur,
  ...ammoniaRows,
];
