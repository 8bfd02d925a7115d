import { firstOrderEffectiveness } from '../../src/pellet/closed-form-effectiveness.js';
import { createPelletModel } from '../../src/pellet/create-pellet-model.js';
import type { PelletModel } from '../../src/pellet/pellet-model.js';
import { gasConstant } from '../../src/quantities/constants.js';
import { bulkOf, powerLaw, singlePellet, type HandLaw } from '../pellet/single-pellet.js';
import type { PublishedRow } from './published-row.js';

const shapeExponents = { slab: 0, cylinder: 1, sphere: 2 } as const;
type Shape = keyof typeof shapeExponents;

interface SimplePellet {
  readonly shapeExponent: number;
  /** V/S, m */
  readonly diffusionLength: number;
  readonly diffusivity: number;
  readonly law: HandLaw;
  readonly surfaceConcentration: number;
  readonly temperature?: number;
  readonly heat?: { readonly heatOfReaction: number; readonly thermalConductivity: number };
}

/** A -> B without film, solved in full, refined until the model is content. */
function solvePellet(simple: SimplePellet): { model: PelletModel; effectiveness: number } {
  const { temperature = 500, heat, surfaceConcentration, diffusivity } = simple;
  const model = createPelletModel(
    singlePellet({
      shapeExponent: simple.shapeExponent,
      diffusionLength: simple.diffusionLength,
      diffusivities: [diffusivity, diffusivity],
      stoichiometry: [[-1, 1]],
      laws: [simple.law],
      ...(heat && { heats: [heat.heatOfReaction], thermalConductivity: heat.thermalConductivity }),
    }),
  );
  const bulk = bulkOf([surfaceConcentration, 0], temperature, [heat?.heatOfReaction ?? 0]);
  model.solve(bulk);
  for (let review = 0; review < 10 && model.reviewResolution(bulk) === 'raised'; review++) model.solve(bulk);
  const status = model.solve(bulk);
  if (status !== 'converged') throw new Error(`pellet: ${status}`);
  const surfaceRate = simple.law([surfaceConcentration, 0], temperature).rate;
  return { model, effectiveness: model.averageRates[0]! / surfaceRate };
}

/** First order: V/S in m, k in 1/s, De in m²/s. */
function firstOrder(
  shape: Shape,
  diffusionLength: number,
  k: number,
  diffusivity: number,
  concentration = 1,
): ReturnType<typeof solvePellet> {
  return solvePellet({
    shapeExponent: shapeExponents[shape],
    diffusionLength,
    diffusivity,
    law: powerLaw(k, 1, 2),
    surfaceConcentration: concentration,
  });
}

const length = 1e-3;
const diffusivity = 1e-6;

/** k c^n at a modulus √(k c^(n-1)/De) times a length of the body, over its V/S. */
function ofOrder(shape: Shape, order: number, modulus: number, lengthOverDiffusionLength: number): number {
  const concentration = 10;
  const phi = modulus / lengthOverDiffusionLength;
  const k = ((phi / length) ** 2 * diffusivity) / concentration ** (order - 1);
  return solvePellet({
    shapeExponent: shapeExponents[shape],
    diffusionLength: length,
    diffusivity,
    law: powerLaw(k, order, 2),
    surfaceConcentration: concentration,
  }).effectiveness;
}

const closedForm =
  'Closed forms of Thiele (1939) and Aris (1957), Ind. Eng. Chem. 31, 916 and Chem. Eng. Sci. 6, 262';
const moduli = [0.1, 0.2, 0.5, 0.8, 1, 1.5, 2, 3, 5, 10];
const closedFormValues: Readonly<Record<Shape, readonly number[]>> = {
  slab: [0.99668, 0.98688, 0.92423, 0.83005, 0.76159, 0.60343, 0.48201, 0.33168, 0.19998, 0.1],
  cylinder: [0.99503, 0.98052, 0.89278, 0.77487, 0.69777, 0.53999, 0.43176, 0.30412, 0.18972, 0.09747],
  sphere: [0.99405, 0.97679, 0.87625, 0.74991, 0.67164, 0.51868, 0.41667, 0.2963, 0.18667, 0.09667],
};

const closedFormRows = (Object.keys(closedFormValues) as Shape[]).flatMap((shape) =>
  closedFormValues[shape].map((expected, index): PublishedRow => ({
    id: `eta-closed-forms ${shape} modulus ${moduli[index]!}`,
    source: closedForm,
    status: 'recomputed',
    inputs: `first order, (V/S) sqrt(k/De) = ${moduli[index]!}`,
    expected,
    unit: '1',
    tolerance: { absolute: 1e-5, reason: 'five digits written down' },
    obtain: () =>
      firstOrder(shape, length, (moduli[index]! / length) ** 2 * diffusivity, diffusivity).effectiveness,
  })),
);

const printed = (absolute: number): { absolute: number; reason: string } => ({
  absolute,
  reason: 'last printed digit',
});

const textbookRows: readonly PublishedRow[] = [
  {
    id: 'eta-cr-10-12 slab',
    source: 'Coulson & Richardson, Chemical Engineering vol. 1, 6th ed., Example 10.12, p. 643',
    status: 'checked',
    inputs: 'k 0.0005 1/s, De 2e-9 m2/s, slab 8 mm',
    expected: 0.482,
    unit: '1',
    tolerance: printed(5e-4),
    obtain: () => firstOrder('slab', 0.004, 0.0005, 2e-9).effectiveness,
  },
  {
    id: 'eta-cr-10-12 sphere',
    source: 'Coulson & Richardson, Chemical Engineering vol. 1, 6th ed., Example 10.12, p. 643',
    status: 'checked',
    inputs: 'k 0.0005 1/s, De 2e-9 m2/s, sphere 10 mm',
    expected: 0.736,
    unit: '1',
    tolerance: printed(5e-4),
    obtain: () => firstOrder('sphere', 0.01 / 6, 0.0005, 2e-9).effectiveness,
  },
  {
    id: 'eta-cr-10-13 effectiveness',
    source: 'Coulson & Richardson, vol. 1, 6th ed., Example 10.13, p. 644',
    status: 'checked',
    inputs: 'k 14.4 1/s, De 1e-5 m2/s, slab half thickness 2.5 mm',
    expected: 0.332,
    unit: '1',
    tolerance: printed(5e-4),
    obtain: () => firstOrder('slab', 0.0025, 14.4, 1e-5).effectiveness,
  },
  {
    id: 'eta-cr-10-13 concentration at 1.25 mm',
    source: 'Coulson & Richardson, vol. 1, 6th ed., Example 10.13, p. 644',
    status: 'checked',
    inputs: 'k 14.4 1/s, De 1e-5 m2/s, slab half thickness 2.5 mm, surface 0.15 kmol/m3',
    expected: 0.035,
    unit: 'kmol/m3',
    tolerance: printed(5e-4),
    obtain: () => {
      const { model } = firstOrder('slab', 0.0025, 14.4, 1e-5, 150);
      return model.interior(Float64Array.of(0.5)).concentrations[0]![0]! / 1000;
    },
  },
  {
    id: 'eta-cutlip-sphere',
    source:
      'Cutlip & Shacham, Problem Solving in Chemical and Biochemical Engineering, 2nd ed. 2008 (inputs); answer from memory',
    status: 'memory',
    inputs: 'R 0.5 cm, De 0.1 cm2/s, k 6.4 1/s, surface 0.2 mol/cm3',
    expected: 0.563,
    unit: '1',
    tolerance: printed(5e-4),
    obtain: () => firstOrder('sphere', 0.005 / 3, 6.4, 1e-5, 2e5).effectiveness,
  },
  {
    id: 'eta-rawlings-pellet',
    source:
      'Rawlings & Ekerdt, Chemical Reactor Analysis and Design Fundamentals, ch. 7, first fixed-bed example',
    status: 'memory',
    inputs: 'R 0.3 cm, k 2.6 1/s, De 0.007 cm2/s',
    expected: 0.429,
    unit: '1',
    tolerance: printed(5e-4),
    obtain: () => firstOrder('sphere', 0.001, 2.6, 7e-7).effectiveness,
  },
  ...(
    [
      [16.456, 0.17122, 'the printed 0.182 is the asymptote 3/phi'],
      [1.6456, 0.85612, 'printed 0.856'],
    ] as const
  ).map(([phi, expected, note]): PublishedRow => ({
    id: `weisz-prater-two-sizes phi ${phi}`,
    source: `Fogler, Elements of Chemical Reaction Engineering, 4th ed., Example 12-2; ${note}`,
    status: 'recomputed',
    inputs: `sphere, R sqrt(k/De) = ${phi}`,
    expected,
    unit: '1',
    tolerance: { absolute: 1e-5, reason: 'five digits written down' },
    obtain: () =>
      firstOrder('sphere', length, (phi / (3 * length)) ** 2 * diffusivity, diffusivity).effectiveness,
  })),
];

const orderSource = 'Generalised modulus of Petersen, Bischoff and Aris (1965); exact values by shooting';
const slabOrders = [
  [0.5, [0.95937, 0.84985, 0.56821]],
  [2, [0.86587, 0.65252, 0.39001, 0.16297]],
  [3, [0.81876, 0.58346, 0.33807, 0.14093]],
] as const;
const sphereOrders = [
  [0.5, [0.96746, 0.76173]],
  [2, [0.8915, 0.57029, 0.34337]],
  [3, [0.85254, 0.50935, 0.30065]],
] as const;
function orderRow(
  shape: Shape,
  order: number,
  modulus: number,
  lengths: number,
  expected: number,
): PublishedRow {
  return {
    id: `eta-nth-order ${shape} n ${order} phi ${modulus}`,
    source: orderSource,
    status: 'recomputed',
    inputs: `order ${order}, ${shape === 'slab' ? 'half thickness' : 'radius'} times sqrt(k c^(n-1)/De) = ${modulus}`,
    expected,
    unit: '1',
    tolerance: { absolute: 2e-5, reason: 'five digits written down, shooting at 1e-8' },
    obtain: () => ofOrder(shape, order, modulus, lengths),
  };
}

const orderRows: readonly PublishedRow[] = [
  ...slabOrders.flatMap(([order, values]) =>
    values.map((expected, index) => orderRow('slab', order, [0.5, 1, 2, 5][index]!, 1, expected)),
  ),
  ...sphereOrders.flatMap(([order, values]) =>
    values.map((expected, index) => orderRow('sphere', order, [1, 3, 6][index]!, 3, expected)),
  ),
];

/** gamma = E/(R T), beta = (-dH) De c/(lambda T), phi = R sqrt(k/De), all at the surface. */
const weiszHicks = [
  [20, 0.2, [0.1, 0.5, 1, 2, 3, 5], [1.002, 1.0555, 1.355, 2.1814, 1.7136, 1.1447]],
  [20, 0.1, [0.5, 1, 2, 3, 5, 10], [1.017, 1.0709, 1.1887, 1.0257, 0.7192, 0.3969]],
  [20, -0.8, [0.1, 0.5, 1, 2, 5], [0.9889, 0.8147, 0.6022, 0.3798, 0.1769]],
  [20, 0.4, [0.1, 0.5], [1.0047, 1.157]],
] as const;

function nonIsothermal(gamma: number, beta: number, phi: number): number {
  const [temperature, concentration, thermalConductivity] = [500, 20, 0.2];
  const k = (phi / (3 * length)) ** 2 * diffusivity;
  const energy = gamma * gasConstant * temperature;
  const law: HandLaw = (c, T) => {
    const value = k * Math.exp((-energy / gasConstant) * (1 / T - 1 / temperature));
    return {
      rate: value * c[0]!,
      byConcentration: [value, 0],
      byTemperature: (value * c[0]! * energy) / (gasConstant * T * T),
    };
  };
  return solvePellet({
    shapeExponent: 2,
    diffusionLength: length,
    diffusivity,
    law,
    surfaceConcentration: concentration,
    temperature,
    heat: {
      heatOfReaction: (-beta * thermalConductivity * temperature) / (diffusivity * concentration),
      thermalConductivity,
    },
  }).effectiveness;
}

const nonIsothermalRows = weiszHicks.flatMap(([gamma, beta, phis, values]) =>
  phis.map((phi, index): PublishedRow => ({
    id: `weisz-hicks-sphere gamma ${gamma} beta ${beta} phi ${phi}`,
    source: 'Weisz & Hicks (1962), Chem. Eng. Sci. 17, 265; values by shooting at 1e-10',
    status: 'recomputed',
    inputs: `sphere, first order, gamma ${gamma}, beta ${beta}, R sqrt(k/De) = ${phi}`,
    expected: values[index]!,
    unit: '1',
    tolerance: { absolute: 6e-5, reason: 'four decimals written down' },
    obtain: () => nonIsothermal(gamma, beta, phi),
  })),
);

/** Height over diameter, the shape exponent with the same low-modulus coefficient, effectiveness at V/S moduli 0.5, 1, 2, 5. */
const finiteCylinders = [
  [0.5, 2.6154, [0.8694, 0.66137, 0.41026, 0.18512]],
  [1, 3.1849, [0.86454, 0.65502, 0.40741, 0.18461]],
  [2, 2.3061, [0.87258, 0.66593, 0.41289, 0.18571]],
] as const;

const finiteCylinderRows = finiteCylinders.flatMap(([ratio, exponent, values]) =>
  values.flatMap((expected, index): PublishedRow[] => {
    const modulus = [0.5, 1, 2, 5][index]!;
    const row = (suffix: string, obtain: () => number): PublishedRow => ({
      id: `finite-cylinder-eta H/D ${ratio} modulus ${modulus} ${suffix}`,
      source: 'exact Bessel series of Aris (1957) and Gunn (1967), Chem. Eng. Sci. 22, 1439',
      status: 'recomputed',
      inputs: `first order, H/D ${ratio}, (V/S) sqrt(k/De) = ${modulus}, as a body of shape exponent ${exponent}`,
      expected,
      unit: '1',
      tolerance: {
        relative: 5e-3,
        reason:
          'the one-dimensional body of equal low-modulus coefficient is up to 0.4 % off the true cylinder',
      },
      obtain,
    });
    return [
      row(
        'solved',
        () =>
          solvePellet({
            shapeExponent: exponent,
            diffusionLength: length,
            diffusivity,
            law: powerLaw((modulus / length) ** 2 * diffusivity, 1, 2),
            surfaceConcentration: 1,
          }).effectiveness,
      ),
      row('closed form', () => firstOrderEffectiveness(modulus, exponent).effectiveness),
    ];
  }),
);

export const pelletRows: readonly PublishedRow[] = [
  ...closedFormRows,
  ...textbookRows,
  ...orderRows,
  ...nonIsothermalRows,
  ...finiteCylinderRows,
];
