/** Volumes, fugacities and departures of real gases against textbooks, steam tables and measurements. */
import { describe, expect, it } from 'vitest';
import { findRoot } from '../../../src/numerics/scalar-root.js';
import { CubicMixture } from '../../../src/properties/equation-of-state/cubic-mixture.js';
import type { CubicKind } from '../../../src/properties/equation-of-state/cubic-root.js';
import type { SpeciesRecord } from '../../../src/properties/species-record.js';
import { gasConstant } from '../../../src/quantities/constants.js';
import {
  criticalRecord,
  cubicKinds,
  cubicOf,
  evaluated,
  libraryRecords,
  zeroInteraction,
} from './fluid-fixtures.js';

const [bar, atmosphere] = [1e5, 101325];

interface PureState {
  /** Z */
  readonly compressibility: number;
  /** cm³/mol */
  readonly volume: number;
  /** J/mol */
  readonly residualEnthalpy: number;
  /** J/(mol K) */
  readonly residualEntropy: number;
  readonly fugacityCoefficient: number;
}

function pureState(kind: CubicKind, record: SpeciesRecord, temperature: number, pressure: number): PureState {
  const state = evaluated(cubicOf(kind, [record]), [1], temperature, pressure);
  const logFugacity = state.logFugacityCoefficients[0]!;
  return {
    compressibility: (pressure * state.molarVolume) / (gasConstant * temperature),
    volume: state.molarVolume * 1e6,
    residualEnthalpy: state.residualEnthalpy,
    residualEntropy: state.residualEnthalpy / temperature - gasConstant * logFugacity,
    fugacityCoefficient: Math.exp(logFugacity),
  };
}

const expectWithin = (found: number, published: number, relative: number): void => {
  expect(Math.abs(found / published - 1), `${found} against ${published}`).toBeLessThan(relative);
};

describe('the same equations evaluated elsewhere: n-butane in Smith, Van Ness & Abbott, Introduction to Chemical Engineering Thermodynamics', () => {
  // Tc 425.1 K, pc 37.96 bar, omega 0.200 as there. Tables from memory; they use Ω of five digits: 0.1 % in Z.
  const butane = criticalRecord('n_C4H10', 425.1, 37.96 * bar, 0.2);

  it.each([
    ['peng_robinson', 0.6907, -4988, -7.426],
    ['soave_redlich_kwong', 0.7222, -4824, -7.413],
  ] as const)('%s at 500 K, 50 bar: Z %f, H^R %f J/mol, S^R %f J/(mol K)', (kind, Z, enthalpy, entropy) => {
    const state = pureState(kind, butane, 500, 50 * bar);
    expectWithin(state.compressibility, Z, 1e-3);
    expectWithin(state.residualEnthalpy, enthalpy, 1e-3);
    expectWithin(state.residualEntropy, entropy, 1e-3);
  });

  it.each([
    ['peng_robinson', 2486, 112.6],
    ['soave_redlich_kwong', 2520, 127.8],
  ] as const)('%s at 350 K, 9.4573 bar: vapour %f, liquid %f cm³/mol', (kind, vapour, liquid) => {
    const pressure = 9.4573 * bar;
    expectWithin(pureState(kind, butane, 350, pressure).volume, vapour, 1e-3);
    const mixture = new CubicMixture(kind, [butane], zeroInteraction(1));
    mixture.mix(Float64Array.of(1), 350);
    const Z = mixture.compressibilityFactor(pressure, 'liquid');
    expectWithin(((Z * gasConstant * 350) / pressure) * 1e6, liquid, 1e-3);
  });
});

describe('other methods and measurements, to the accuracy of two-parameter cubic equations', () => {
  it('n-butane at 500 K, 50 bar: tables of measured properties give Z 0.7060, H^R -4760 J/mol, S^R -7.170 J/(mol K)', () => {
    // Smith, Van Ness & Abbott, the same table (from memory). 3 % in volume, 5 % in departures (common experience).
    const [record] = libraryRecords(['n_C4H10']);
    for (const kind of cubicKinds) {
      const state = pureState(kind, record!, 500, 50 * bar);
      expectWithin(state.compressibility, 0.706, 0.03);
      expectWithin(state.residualEnthalpy, -4760, 0.05);
      expectWithin(state.residualEntropy, -7.17, 0.05);
    }
  });

  // NIST Chemistry WebBook, fluid properties (from memory); hydrogen at 15 °C, 70 MPa: 40.2 kg/m³, the density of the vehicle-tank standards.
  it.each([
    ['N2', 300, 10e6, 1.004, 0.03],
    ['CH4', 300, 10e6, 0.848, 0.03],
    ['H2', 300, 10e6, 1.06, 0.03],
    ['H2', 288.15, 70e6, 1.465, 0.05],
    ['CO2', 300, 1e6, 0.948, 0.01],
  ] as const)(
    'compressibility factor of %s at %f K, %f Pa is %f',
    (id, temperature, pressure, Z, tolerance) => {
      // Common experience: 1 to 3 % for gases, 5 % at liquid-like densities; departures from ideal at 10 bar are small.
      const [record] = libraryRecords([id]);
      for (const kind of cubicKinds) {
        expectWithin(pureState(kind, record!, temperature, pressure).compressibility, Z, tolerance);
      }
    },
  );

  // Steam tables (IAPWS-IF97; from memory): volume in cm³/g, enthalpy in kJ/kg, that of steam at 400 °C and vanishing pressure being 3280.
  it.each([
    [40, 73.43, 3214.5],
    [100, 26.44, 3097.4],
  ])('steam at 400 °C, %f bar: %f cm³/g, %f kJ/kg', (pressure, volume, enthalpy) => {
    const [water] = libraryRecords(['H2O']);
    const gramsPerMole = water!.molarMass * 1000;
    for (const kind of cubicKinds) {
      const state = pureState(kind, water!, 673.15, pressure * bar);
      expectWithin(state.volume, volume * gramsPerMole, 0.03);
      // Enthalpy departures of polar gases: 10 % (common experience).
      expectWithin(state.residualEnthalpy, (enthalpy - 3280) * gramsPerMole, 0.1);
    }
  });

  it('1-butene at 200 °C, 70 bar: Z 0.512, H^R -8485 J/mol, S^R -14.18 J/(mol K), φ 0.638 by corresponding states', () => {
    // Smith, Van Ness & Abbott, examples by the Lee-Kesler tables; Tc 420.0 K, pc 40.43 bar, omega 0.191 (from memory). Close above the critical
    // point, volumes of cubic equations are good to 10 %, the rest to 5 % (common experience).
    const butene = criticalRecord('1_C4H8', 420, 40.43 * bar, 0.191);
    for (const kind of cubicKinds) {
      const state = pureState(kind, butene, 473.15, 70 * bar);
      expectWithin(state.compressibility, 0.512, 0.1);
      expectWithin(state.residualEnthalpy, -8485, 0.05);
      expectWithin(state.residualEntropy, -14.18, 0.05);
      expectWithin(state.fugacityCoefficient, 0.638, 0.05);
    }
  });

  it('methyl ethyl ketone and toluene, equimolar, 50 °C, 25 kPa: φ 0.987 and 0.983 by second virial coefficients', () => {
    // Smith, Van Ness & Abbott, example with the Pitzer correlation (from memory). Virial coefficients so found are good to some 10 % for
    // slightly polar vapours, cubic equations' to some 20 %: 30 % of 1 - φ.
    const records = [
      criticalRecord('ketone', 535.5, 41.5 * bar, 0.323),
      criticalRecord('toluene', 591.8, 41.06 * bar, 0.262),
    ];
    for (const kind of cubicKinds) {
      const state = evaluated(cubicOf(kind, records), [0.5, 0.5], 323.15, 25e3);
      [0.987, 0.983].forEach((published, i) => {
        expectWithin(1 - Math.exp(state.logFugacityCoefficients[i]!), 1 - published, 0.3);
      });
    }
  });
});

describe('ammonia synthesis', () => {
  const records = libraryRecords(['N2', 'H2', 'NH3']);

  /** Fugacity coefficients of the pure gases; T in K, P in atm. @source Dyson & Simon (1968), Ind. Eng. Chem. Fundam. 7, 605, after Cooper and Newton */
  const publishedCoefficients = (T: number, P: number): number[] => [
    0.93431737 + 0.3101804e-3 * T + 0.295896e-3 * P - 0.2707279e-6 * T ** 2 + 0.4775207e-6 * P ** 2,
    Math.exp(
      Math.exp(-3.8402 * T ** 0.125 + 0.541) * P -
        Math.exp(-0.1263 * T ** 0.5 - 15.98) * P ** 2 +
        300 * Math.exp(-0.011901 * T - 5.941) * (Math.exp(-P / 300) - 1),
    ),
    0.1438996 + 0.2028538e-2 * T - 0.4487672e-3 * P - 0.1142945e-5 * T ** 2 + 0.2761216e-6 * P ** 2,
  ];

  it.each([
    [673.15, 100],
    [723.15, 100],
    [723.15, 300],
  ])(
    'fugacity coefficients of the pure gases at %f K, %f atm by Peng and Robinson',
    (temperature, pressure) => {
      publishedCoefficients(temperature, pressure).forEach((published, i) => {
        const found = pureState('peng_robinson', records[i]!, temperature, pressure * atmosphere);
        // 2 % of the equation (common experience), 2 % of generalized charts behind the published fits.
        expectWithin(found.fugacityCoefficient, published, 0.04);
      });
    },
  );

  it.each([
    [100, 16.36],
    [300, 35.5],
  ])(
    'at 450 °C and %f atm a 3:1 mixture holds %f percent of ammonia at equilibrium',
    (pressure, measured) => {
      // Measured by Larson & Dodge (1923) and Larson (1924), J. Am. Chem. Soc. (from memory); constant of Gillespie & Beattie (1930), atm⁻¹.
      const temperature = 723.15;
      const constant =
        10 **
        (-2.691122 * Math.log10(temperature) -
          5.519265e-5 * temperature +
          1.848863e-7 * temperature ** 2 +
          2001.6 / temperature +
          2.6899);
      const percent = (coefficients: (moleFractions: readonly number[]) => ArrayLike<number>): number => {
        const excess = (y: number): number => {
          const fractions = [(1 - y) / 4, (3 * (1 - y)) / 4, y];
          const logs = coefficients(fractions);
          const [n, h, a] = fractions.map((one, i) => one * Math.exp(logs[i]!) * pressure);
          return a! / (n! ** 0.5 * h! ** 1.5) - constant;
        };
        return 100 * findRoot(excess, 1e-6, 0.9, 1e-12).root;
      };
      const ideal = percent(() => [0, 0, 0]);
      for (const kind of cubicKinds) {
        const equation = cubicOf(kind, records);
        const found = percent(
          (fractions) =>
            evaluated(equation, fractions, temperature, pressure * atmosphere).logFugacityCoefficients,
        );
        // 2 % in each coefficient, 1 + 1/2 + 3/2 of them, is 6 % in their ratio and, by the slope of equilibrium, up to 2.5 % in ammonia; 1 % of
        // the constant and the measurement each.
        expectWithin(found, measured, 0.045);
        expect(Math.abs(found - measured)).toBeLessThan(Math.abs(ideal - measured) / 2);
      }
    },
  );
});
