import { describe, expect, it } from 'vitest';
import { solveReactor } from '../../src/bed/solve-reactor.js';
import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import { createBalances } from '../../src/bed/balances.js';
import { createReactorModel } from '../../src/bed/reactor-model.js';
import { parseFormula } from '../../src/expressions/parse-formula.js';
import type { CheckedFormula } from '../../src/expressions/expression.js';
import { findLibrarySpecies } from '../../src/properties/species/library.js';
import { gasConstant } from '../../src/quantities/constants.js';
import type { Dimension } from '../../src/quantities/dimension.js';
import { readReference } from '../reference/read-reference.js';
import { cooledOxidation } from './cooled-oxidation.js';
import { givenTransport } from '../pellet/given-transport.js';

interface CooledBedReference {
  readonly values: {
    readonly exit_flows_mol_s: readonly number[];
    readonly exit_temperature_K: number;
    readonly exit_pressure_Pa: number;
    readonly peak_temperature_K: number;
    readonly peak_position_m: number;
    readonly peak_pellet_surface_temperature_K: number;
    readonly heat_removed_W: number;
    readonly effectiveness_inlet: readonly (number | null)[];
  };
}

const relative = (obtained: number, expected: number): number => Math.abs(obtained / expected - 1);

describe('cooled tube with three reactions, against an independent solution with SciPy (test/reference/cooled-bed.py)', () => {
  const { values } = readReference('cooled-bed.json') as CooledBedReference;
  const result = solveReactor(cooledOxidation());

  it('exit flows, temperature and pressure at default tolerance', () => {
    expect(result.status).toBe('complete');
    values.exit_flows_mol_s.forEach((flow, i) =>
      expect(relative(result.outlet.molarFlows[i]!, flow)).toBeLessThan(1e-5),
    );
    expect(relative(result.outlet.temperature, values.exit_temperature_K)).toBeLessThan(1e-6);
    expect(relative(result.outlet.pressure, values.exit_pressure_Pa)).toBeLessThan(1e-7);
    expect(relative(result.heatRemoved!, values.heat_removed_W)).toBeLessThan(1e-5);
  });

  it('peak temperature and its position', () => {
    expect(relative(result.peak.temperature, values.peak_temperature_K)).toBeLessThan(1e-5);
    expect(relative(result.peak.position, values.peak_position_m)).toBeLessThan(1e-5);
  });

  it('effectiveness at the inlet; none for a reaction whose fuel is not there yet', () => {
    values.effectiveness_inlet.forEach((expected, j) => {
      const obtained = result.effectiveness[j]!.inlet;
      if (expected === null) expect(obtained).toBeNull();
      else expect(relative(obtained!, expected)).toBeLessThan(1e-7);
    });
  });

  it('temperature inside the hottest pellet', () => {
    const hottest = result.pellets.find(({ label }) => label === 'hottest')!;
    expect(relative(hottest.temperatures.at(-1)!, values.peak_pellet_surface_temperature_K)).toBeLessThan(
      1e-6,
    );
  });

  it('the default answers are within 1e-5 of converged ones, all along the bed', () => {
    const converged = solveReactor(cooledOxidation({ numerics: { tolerance: 1e-9 } }));
    result.profile.positions.forEach((_z, row) => {
      expect(relative(result.profile.temperatures[row]!, converged.profile.temperatures[row]!)).toBeLessThan(
        1e-5,
      );
      const fed = result.profile.molarFlows[0]![0]!;
      const off = Math.abs(result.profile.molarFlows[0]![row]! - converged.profile.molarFlows[0]![row]!);
      expect(off / fed).toBeLessThan(1e-5);
    });
  });

  it('mass, elements and energy close', () => {
    // The reference's molar masses are printed to six digits and do not close better than this.
    expect(result.balances.mass).toBeLessThan(1e-6);
    expect(result.balances.energy).toBeLessThan(1e-12);
  });

  it('flows are of the whole reactor: a thousand tubes give a thousand times as much, and nothing else changes', () => {
    const one = cooledOxidation();
    const many = solveReactor({
      ...one,
      feed: { ...one.feed, molarFlows: one.feed.molarFlows.map((flow) => flow * 1000) },
      bed: { ...one.bed, tubes: 1000 },
    });
    expect(relative(many.outlet.molarFlows[1]!, 1000 * result.outlet.molarFlows[1]!)).toBeLessThan(1e-9);
    expect(relative(many.peak.temperature, result.peak.temperature)).toBeLessThan(1e-12);
    expect(relative(many.catalystMass, 1000 * result.catalystMass)).toBeLessThan(1e-12);
    expect(relative(many.heatRemoved!, 1000 * result.heatRemoved!)).toBeLessThan(1e-9);
  });

  it('reordering reactions permutes the answer and changes nothing else', () => {
    const one = cooledOxidation();
    const permuted = solveReactor({
      ...one,
      reactions: [one.reactions[2]!, one.reactions[0]!, one.reactions[1]!],
    });
    result.outlet.molarFlows.forEach((flow, i) =>
      expect(relative(permuted.outlet.molarFlows[i]!, flow)).toBeLessThan(2e-6),
    );
    expect(Math.abs(permuted.peak.temperature - result.peak.temperature)).toBeLessThan(1e-3);
  });

  it('the Jacobian of the balances agrees with differences', () => {
    const model = createReactorModel(cooledOxidation({ numerics: { tolerance: 1e-9 } }));
    const { problem, initialState, unpack, conditions } = createBalances(model);
    const state = Float64Array.from(initialState);
    // Somewhere inside the bed: a third of A converted, some heat given away, some pressure lost.
    state.set([5e-5, 8e-6, 2e-6, 60]);
    state[4] = 1.5e5 ** 2;
    unpack(state);
    model.pellet.reviewResolution(conditions);
    const size = problem.size;
    const exact = new Float64Array(size * size);
    expect(problem.evaluateJacobian(0, state, exact)).toBe(true);
    for (let v = 0; v < size; v++) {
      const step = Math.abs(state[v]!) * 1e-4;
      const sides = [1, -1].map((sign) => {
        const moved = state.slice();
        moved[v]! += sign * step;
        const derivative = new Float64Array(size);
        expect(problem.evaluate(0, moved, derivative)).toBe(true);
        return derivative;
      });
      for (let i = 0; i < size; i++) {
        const difference = (sides[0]![i]! - sides[1]![i]!) / (2 * step);
        const scale = Math.abs(difference) + Math.abs(sides[0]![i]! / state[v]!) * 1e-3;
        if (scale > 0) expect(Math.abs(exact[i * size + v]! - difference) / scale).toBeLessThan(2e-5);
      }
    }
  });
});

const perTime: Dimension = [0, 0, -1, 0, 0];

function lawOf(text: string, ids: readonly string[], k: number, dimension: Dimension): CheckedFormula {
  return parseFormula(
    text,
    {
      constants: new Map([['k', { expression: { kind: 'number', value: k }, dimension }]]),
      speciesIds: ids,
      allowsTemperature: true,
      allowsPressure: true,
    },
    (fault) => {
      throw new Error(fault.found);
    },
  )!;
}

/** A → B in an inert gas, first order per pellet volume. */
function simpleBed(change: Partial<ReactorSpecification> = {}): ReactorSpecification {
  const one = cooledOxidation();
  return {
    ...one,
    species: [
      { id: 'A', molarMass: 0.06, elements: { C: 2, H: 4, O: 2 }, source: 'invented' },
      { id: 'B', molarMass: 0.06, elements: { C: 2, H: 4, O: 2 }, source: 'invented' },
    ],
    reactions: [
      {
        name: 'change',
        equation: 'A -> B',
        isReversible: false,
        stoichiometry: [-1, 1],
        rate: lawOf('k * c.A', ['A', 'B'], 2, perTime),
        basis: 'pellet_volume',
        heat: { value: -5e4 },
      },
    ],
    feed: { temperature: 500, pressure: 2e5, molarFlows: [0.04, 0] },
    pellet: {
      ...one.pellet,
      method: { kind: 'intrinsic' },
      transport: givenTransport({ diffusivities: [5e-7, 5e-7] }),
    },
    bed: { tubeDiameter: 0.04, tubes: 1, length: 1.5, voidFraction: 0.4, pressureDrop: { kind: 'none' } },
    heat: { mode: 'isothermal' },
    ...change,
  };
}

describe('closed forms', () => {
  it.each([0.5, 1, 5])(
    'isothermal first order without mole change, modulus %f: exit conversion',
    (modulus) => {
      const diffusivity = 5e-7;
      const k = 2;
      const length = modulus * Math.sqrt(diffusivity / k);
      const base = simpleBed();
      const result = solveReactor({
        ...base,
        pellet: {
          ...base.pellet,
          method: { kind: 'full' },
          geometry: { ...base.pellet.geometry, diffusionLength: length, shapeExponent: 2 },
        },
      });
      const eta = (1 / Math.tanh(3 * modulus) - 1 / (3 * modulus)) / modulus;
      const velocity = (0.04 * gasConstant * 500) / 2e5 / ((Math.PI / 4) * 0.04 ** 2);
      const exact = 1 - Math.exp((-eta * k * 0.6 * 1.5) / velocity);
      expect(Math.abs(result.conversions[0]!.value - exact)).toBeLessThan(1e-7);
    },
  );

  it('Ergun without reaction, isothermal ideal gas: P falls as the square root of a line', () => {
    const base = simpleBed();
    const result = solveReactor({
      ...base,
      reactions: [{ ...base.reactions[0]!, rate: lawOf('k * c.A', ['A', 'B'], 0, perTime) }],
      fluid: { ...base.fluid, viscosity: { kind: 'constant', value: 2e-5 } },
      feed: { ...base.feed, molarFlows: [0.12, 0] },
      bed: {
        ...base.bed,
        pressureDrop: { kind: 'two_term', viscous: 150, inertial: 1.75, source: 'Ergun (1952)' },
      },
    });
    const G = (0.12 * 0.06) / ((Math.PI / 4) * 0.04 ** 2);
    const d = 4e-3;
    const group = (150 * 2e-5 * 0.6 ** 2 * G) / (d ** 2 * 0.4 ** 3) + (1.75 * 0.6 * G ** 2) / (d * 0.4 ** 3);
    const exact = Math.sqrt(4e10 - (2 * group * gasConstant * 500 * 1.5) / 0.06);
    expect(exact).toBeLessThan(1.9e5);
    expect(relative(result.outlet.pressure, exact)).toBeLessThan(1e-7);
    expect(result.conversions[0]!.value).toBe(0);
  });

  it('isothermal first order with mole change A → 3 B (Levenspiel, 3rd ed., eq. 5.21): (1+ε) ln 1/(1-X) - ε X = k τ', () => {
    const base = simpleBed();
    const result = solveReactor({
      ...base,
      species: [base.species[0]!, { id: 'B', molarMass: 0.02, source: 'invented' }],
      reactions: [{ ...base.reactions[0]!, stoichiometry: [-1, 3] }],
      numerics: { tolerance: 1e-8 },
    });
    const X = result.conversions[0]!.value;
    const velocity = (0.04 * gasConstant * 500) / 2e5 / ((Math.PI / 4) * 0.04 ** 2);
    expect(relative(3 * Math.log(1 / (1 - X)) - 2 * X, (2 * 0.6 * 1.5) / velocity)).toBeLessThan(1e-7);
  });

  it('adiabatic temperature rise: outlet temperature from conversion, to rounding', () => {
    const result = solveReactor(
      simpleBed({
        heat: { mode: 'adiabatic' },
        fluid: {
          ...simpleBed().fluid,
          heatCapacity: { kind: 'given', per: 'amount', property: { kind: 'constant', value: 120 } },
        },
      }),
    );
    const X = result.conversions[0]!.value;
    expect(X).toBeGreaterThan(0.3);
    expect(relative(result.outlet.temperature, 500 + (5e4 * X) / 120)).toBeLessThan(1e-12);
    expect(result.balances.energy).toBeLessThan(1e-12);
    expect(result.heatRemoved).toBe(0);
  });

  it('heat given to the coolant is the integral of the wall flux', () => {
    const specification = cooledOxidation({
      output: { points: 2001, pelletPositions: [], selectivities: [] },
    });
    const { profile, heatRemoved } = solveReactor(specification);
    const flux = profile.temperatures.map((T) => 110 * Math.PI * 0.0254 * (T - 625));
    // Simpson's rule over the profile.
    let sum = 0;
    const h = profile.positions[1]!;
    for (let k = 0; k + 2 < flux.length; k += 2)
      sum += (h / 3) * (flux[k]! + 4 * flux[k + 1]! + flux[k + 2]!);
    expect(relative(heatRemoved!, sum)).toBeLessThan(1e-5);
  });
});

describe('species thermochemistry in the bed', () => {
  const ids = ['CO', 'H2O', 'CO2', 'H2'];
  function shiftBed(k: number): ReactorSpecification {
    const base = simpleBed();
    return {
      ...base,
      species: ids.map((id) => findLibrarySpecies(id)!),
      reactions: [
        {
          name: 'shift',
          equation: 'CO + H2O <=> CO2 + H2',
          isReversible: true,
          stoichiometry: [-1, -1, 1, 1],
          rate: parseFormula(
            'k * (p.CO - p.CO2 * p.H2 / (p.H2O * K_eq))',
            {
              constants: new Map([
                ['k', { expression: { kind: 'number', value: k }, dimension: [-2, 1, 1, 1, 0] }],
              ]),
              speciesIds: ids,
              allowsTemperature: true,
              allowsPressure: true,
              equilibriumReaction: 0,
            },
            (fault) => {
              throw new Error(fault.found);
            },
          )!,
          basis: 'catalyst_mass',
        },
      ],
      feed: { temperature: 620, pressure: 2e6, molarFlows: [0.1, 0.3, 0.02, 0.2] },
      fluid: { ...base.fluid, heatCapacity: { kind: 'species' } },
      pellet: {
        ...base.pellet,
        transport: givenTransport({ diffusivities: ids.map(() => 1e-6), thermalConductivity: 0.35 }),
      },
      heat: { mode: 'adiabatic' },
    };
  }

  it('a long adiabatic shift bed ends at equilibrium and conserves the enthalpy of the NASA polynomials', () => {
    const result = solveReactor(shiftBed(1e-3));
    const { temperature, molarFlows } = result.outlet;
    const [co, water, carbonDioxide, hydrogen] = molarFlows as [number, number, number, number];
    const quotient = (carbonDioxide * hydrogen) / (co * water);
    // Moe (1962), Chem. Eng. Prog. 58(3), 33, a published fit: within its scatter of 13 % between 600 and 1000 K.
    expect(relative(quotient, Math.exp(4577.8 / temperature - 4.33))).toBeLessThan(0.13);
    expect(result.balances.energy).toBeLessThan(1e-12);
    expect(Object.values(result.balances.elements).every((off) => off < 1e-14)).toBe(true);
  });

  it('a bed fed at equilibrium does nothing', () => {
    const first = solveReactor(shiftBed(1e-2));
    const base = shiftBed(1e-2);
    const second = solveReactor({
      ...base,
      feed: { ...base.feed, temperature: first.outlet.temperature, molarFlows: first.outlet.molarFlows },
    });
    expect(Math.abs(second.outlet.temperature - first.outlet.temperature)).toBeLessThan(1e-6);
    expect(relative(second.outlet.molarFlows[0]!, first.outlet.molarFlows[0]!)).toBeLessThan(1e-6);
  });
});

describe('events and ends', () => {
  it('targets and limits are found where the profile crosses them', () => {
    const one = cooledOxidation();
    const result = solveReactor({
      ...one,
      limits: { temperature: 660, pressureDrop: 2e4 },
      targets: [{ speciesIndex: 0, conversion: 0.5 }],
      output: { ...one.output, points: 3001 },
    });
    const at = (kind: string): number => result.events.find((event) => event.kind === kind)!.position;
    const { positions, temperatures, pressures, molarFlows } = result.profile;
    const nearest = (position: number): number => positions.findIndex((z) => z >= position);
    expect(Math.abs(temperatures[nearest(at('temperature_limit_crossed'))]! - 660)).toBeLessThan(0.3);
    expect(Math.abs(pressures[nearest(at('pressure_drop_limit_crossed'))]! - 1.4e5)).toBeLessThan(30);
    expect(
      Math.abs(molarFlows[0]![nearest(at('target_conversion_reached'))]! / molarFlows[0]![0]! - 0.5),
    ).toBeLessThan(1e-3);
    expect(result.warnings[0]).toMatch(/above the limit you set/);
  });

  it('pressure used up ends the run at its position and keeps what was computed', () => {
    const one = cooledOxidation();
    const result = solveReactor({
      ...one,
      feed: { ...one.feed, molarFlows: one.feed.molarFlows.map((flow) => 4 * flow) },
    });
    expect(result.status).toBe('stopped');
    expect(result.stop!.reason).toBe('pressure_used_up');
    expect(result.stop!.position).toBeLessThan(3);
    expect(result.profile.positions.at(-1)).toBe(result.stop!.position);
    expect(relative(result.outlet.pressure, 0.01 * 1.6e5)).toBeLessThan(1e-6);
    expect(result.profile.temperatures.every((T) => Number.isFinite(T))).toBe(true);
  });

  it('a law that does not vanish with its reactant ends the run where the reactant is gone', () => {
    const base = simpleBed();
    const rate = lawOf('k', ['A', 'B'], 40, [0, -3, -1, 1, 0]);
    const result = solveReactor({ ...base, reactions: [{ ...base.reactions[0]!, rate }] });
    expect(result.stop!.reason).toBe('reactant_overdrawn');
    // F = A (1-ε) k z
    const exact = 0.04 / ((Math.PI / 4) * 0.04 ** 2 * 0.6 * 40);
    expect(relative(result.stop!.position, exact)).toBeLessThan(1e-4);
  });

  it('species data left behind end the run', () => {
    const base = simpleBed();
    const record = findLibrarySpecies('N2')!;
    const result = solveReactor({
      ...base,
      species: [
        { ...record, id: 'A', elements: { N: 2 } },
        { ...record, id: 'B', elements: { N: 2 } },
      ],
      reactions: [{ ...base.reactions[0]!, heat: { value: 9e4 } }],
      fluid: { ...base.fluid, heatCapacity: { kind: 'species' } },
      heat: { mode: 'adiabatic' },
    });
    expect(result.stop!.reason).toBe('property_range_left');
    expect(result.outlet.temperature).toBeCloseTo(200, 4);
  });

  it('a pellet that runs away numerically is still finite or says so', () => {
    const one = cooledOxidation();
    const result = solveReactor({
      ...one,
      feed: { ...one.feed, temperature: 640 },
      heat: { mode: 'cooled', overallCoefficient: 110, coolantTemperature: 640 },
    });
    expect(['complete', 'stopped']).toContain(result.status);
    expect(Number.isFinite(result.peak.temperature)).toBe(true);
    expect(result.peak.temperature).toBeGreaterThan(800);
  });

  it('a pellet past its ignition ends the run with a reason and bounded work', () => {
    const one = cooledOxidation();
    const total = one.feed.molarFlows.reduce((sum, flow) => sum + flow, 0);
    const fractions = [0.03, 0, 0.208, 0, 0, 0.762];
    const result = solveReactor({
      ...one,
      feed: { ...one.feed, molarFlows: fractions.map((y) => y * total) },
    });
    expect(result.stop!.reason).toBe('no_pellet_state');
    expect(result.stop!.position).toBeGreaterThan(0.01);
    expect(result.work.pelletIterations).toBeLessThan(40_000);
  });
});

describe('effectiveness', () => {
  it('is undefined where the net rate is not told from zero, and finite everywhere else', () => {
    // Cooled tube: the third reaction has no fuel at the inlet.
    const { effectiveness } = solveReactor(cooledOxidation()).profile;
    expect(Number.isNaN(effectiveness[2]![0]!)).toBe(true);
    for (const column of effectiveness)
      expect(column.slice(1).every((value) => value > 0 && value < 200)).toBe(true);
  });
});
