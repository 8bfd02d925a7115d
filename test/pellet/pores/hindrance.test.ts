import { describe, expect, it } from 'vitest';
import {
  diameterFromCriticalVolume,
  moleculeDiameter,
  renkinFactor,
} from '../../../src/pellet/pores/hindrance.js';

/** Hindered diffusion of spheres averaged over the cross-section, steric share included: Dechadilok & Deen (2006), Ind. Eng. Chem. Res. 45, 6953, eq. 16 (from memory). */
const averagedOverSection = (ratio: number): number =>
  1 +
  (9 / 8) * ratio * Math.log(ratio) -
  1.56034 * ratio +
  0.528155 * ratio ** 2 +
  1.91521 * ratio ** 3 -
  2.81903 * ratio ** 4 +
  0.270788 * ratio ** 5 +
  1.10115 * ratio ** 6 -
  0.435933 * ratio ** 7;

describe('renkinFactor', () => {
  it('agrees with the drag averaged over the cross-section within 10 %, being that on the axis', () => {
    for (const ratio of [0.02, 0.05, 0.1, 0.2, 0.3, 0.4]) {
      expect(Math.abs(renkinFactor(ratio) / averagedOverSection(ratio) - 1), `λ ${ratio}`).toBeLessThan(0.1);
    }
  });

  it('falls from one to nothing', () => {
    const factors = Array.from({ length: 101 }, (_, k) => renkinFactor(k / 100));
    expect(factors[0]).toBe(1);
    expect(factors[100]).toBe(0);
    for (let k = 1; k <= 100; k++) expect(factors[k]).toBeLessThan(factors[k - 1]!);
    expect(renkinFactor(1.5)).toBe(0);
  });
});

describe('diameter of a molecule', () => {
  it.each([
    // Critical volume in cm³/mol, collision diameter in nm from viscosities: Bird, Stewart & Lightfoot (2002), Table E.1 (from memory).
    ['N2', 90.1, 0.3667],
    ['CH4', 98.7, 0.378],
    ['CO2', 94.1, 0.3996],
    ['C6H6', 260, 0.5443],
  ])(
    'of %s from its critical volume comes within 7 %% of the collision diameter',
    (_name, volume, diameter) => {
      expect(Math.abs(diameterFromCriticalVolume(volume * 1e-6) / (diameter * 1e-9) - 1)).toBeLessThan(0.07);
    },
  );

  it('is the collision diameter where there is one, and not known without either', () => {
    const record = { id: 'X', molarMass: 0.03, source: 'own' };
    const lennardJones = { collisionDiameter: 4e-10, wellDepth: 200 };
    expect(moleculeDiameter({ ...record, lennardJones, criticalVolume: 1e-4 })).toBe(4e-10);
    expect(moleculeDiameter({ ...record, criticalVolume: 1e-4 })).toBeCloseTo(0.841e-10 * 100 ** (1 / 3), 20);
    expect(moleculeDiameter(record)).toBeUndefined();
  });
});
