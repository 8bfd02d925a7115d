import { describe, expect, it } from 'vitest';
import {
  configurationalDiffusivity,
  configurationalMethod,
  observedBand,
} from '../../../src/pellet/pores/configurational.js';

const benzene = 78.11e-3;
const jump = { length: 1e-9, coordination: 4, activationEnergy: 30e3 };

describe('configurationalDiffusivity', () => {
  it('follows Arrhenius, apart from the root of temperature', () => {
    const [cold, hot] = [500, 625].map((temperature) =>
      configurationalDiffusivity(jump, benzene, temperature),
    );
    const slope = Math.log(hot!.value / Math.sqrt(625) / (cold!.value / Math.sqrt(500)));
    expect((slope * 8.314462618) / (1 / 500 - 1 / 625)).toBeCloseTo(30e3, 6);
  });

  it('is mean speed times jump length over neighbours where there is no barrier', () => {
    // Mean speed of a gas of molar mass 8 R T/π is 1 m/s.
    const molarMass = (8 * 8.314462618 * 300) / Math.PI;
    const free = { length: 2e-9, coordination: 5, activationEnergy: 0 };
    expect(configurationalDiffusivity(free, molarMass, 300).value / 4e-10).toBeCloseTo(1, 12);
  });

  it('claims no more than an order of magnitude, and tells whether the value has been seen in zeolites', () => {
    const usual = configurationalDiffusivity(jump, benzene, 500);
    expect(usual.isOrderOfMagnitude).toBe(true);
    expect(usual.isInObservedBand).toBe(true);
    const stuck = configurationalDiffusivity({ ...jump, activationEnergy: 150e3 }, benzene, 500);
    expect(stuck.value).toBeLessThan(observedBand.lower);
    expect(stuck.isInObservedBand).toBe(false);
    expect(configurationalDiffusivity({ ...jump, activationEnergy: 0 }, benzene, 500).isInObservedBand).toBe(
      false,
    );
  });

  it('says in the list of assumptions how little is known', () => {
    expect(configurationalMethod.statement).toMatch(/order of magnitude/);
    expect(configurationalMethod.source).toMatch(/1992/);
  });
});
