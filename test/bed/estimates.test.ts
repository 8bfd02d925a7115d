/** Estimated properties in a run: that they reach the equations, and what a run does where a gas stops being one. */
import { describe, expect, it } from 'vitest';
import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import type { RunResult, SpeciesTransport, TransportReport } from '../../src/bed/run-result.js';
import { solveReactor } from '../../src/bed/solve-reactor.js';
import { readCase } from '../../src/case/read-case.js';
import { CaseError } from '../../src/diagnostics/case-error.js';
import { constant } from '../pellet/given-transport.js';

/** A trace of ethylene in so much nitrogen, at one temperature, that nothing changes along the bed but the trace itself. */
const traceBed = (change: (text: string) => string = String): ReactorSpecification =>
  readCase(
    change(`bedwright: 1
species: {C2H4: library, C2H6: library, H2: library, N2: library}
reactions:
  - name: saturation
    equation: C2H4 + H2 -> C2H6
    rate: k * c.C2H4
    per: pellet_volume
    constants: {k: {value: 35 1/s, at: 420 K, activation_energy: 50 kJ/mol}}
feed:
  temperature: 420 K
  pressure: 12 bar
  velocity: 0.8 m/s
  mole_fractions: {C2H4: 0.1 ppm, H2: 5 ppm, N2: balance}
fluid: {pressure_correction: false}
pellet:
  shape: {sphere: {diameter: 4 mm}}
  density: 1300 kg/m^3
  porosity: 0.5
  tortuosity: 3
  pore_radius: 9 nm
  film: estimate
bed: {tube_diameter: 60 mm, length: 1.2 m, void_fraction: 0.39, pressure_drop: none}
heat: {mode: isothermal}
numerics: {tolerance: 1e-8}
`),
    'trace.yaml',
  ).specification;

const place = (result: RunResult, label: TransportReport['label']): TransportReport =>
  result.transport.find((entry) => entry.label === label)!;
const speciesAt = (result: RunResult, index: number): SpeciesTransport =>
  place(result, 'inlet').species.find(({ speciesIndex }) => speciesIndex === index)!;

describe('estimates where nothing changes along the bed', () => {
  const specification = traceBed();
  const estimated = solveReactor(specification);

  it('give what the same numbers typed give', () => {
    const values = (of: (entry: SpeciesTransport) => number): ReturnType<typeof constant>[] =>
      specification.species.map((_record, i) => constant(i === 3 ? Infinity : of(speciesAt(estimated, i))));
    const typed = solveReactor({
      ...specification,
      pellet: {
        ...specification.pellet,
        transport: {
          effectiveDiffusivities: values((entry) => entry.effectiveDiffusivity!),
          thermalConductivity: constant(Infinity),
          film: {
            kind: 'given',
            massTransfer: values((entry) => entry.filmMassTransfer!),
            heatTransfer: constant(Infinity),
          },
        },
      },
    });
    expect(estimated.conversions[0]!.value).toBeGreaterThan(0.5);
    expect(estimated.conversions[0]!.value / typed.conversions[0]!.value - 1).toBeCloseTo(0, 6);
  });

  it('the first-order pellet and bed in closed form with diffusivities by hand: Fuller, Knudsen, Bosanquet, Wakao–Funazkri', () => {
    // Fuller et al.: 1.43e-7 T^1.75/(p √M (v_A^⅓ + v_B^⅓)²), volumes 41.04 and 18.5.
    const [temperature, pressureBar] = [420, 12];
    const pairMass = 2 / (1 / 28.054 + 1 / 28.014);
    const molecular =
      (1.43e-7 * temperature ** 1.75) /
      (pressureBar * Math.sqrt(pairMass) * (Math.cbrt(41.04) + Math.cbrt(18.5)) ** 2);
    const knudsen = 97 * 9e-9 * Math.sqrt(temperature / 28.054);
    const effective = (0.5 / 3) * (1 / (1 / molecular + 1 / knudsen));
    const { effectiveDiffusivity, filmMassTransfer, diffusivity } = speciesAt(estimated, 0);
    // 97.0 of the Knudsen formula and the masses are rounded.
    expect(Math.abs(diffusivity! / molecular - 1)).toBeLessThan(1e-4);
    expect(Math.abs(effectiveDiffusivity! / effective - 1)).toBeLessThan(5e-4);
    const { viscosity, density } = place(estimated, 'inlet');
    const reynolds = (density * 0.8 * 4e-3) / viscosity!;
    const schmidt = viscosity! / (density * diffusivity!);
    const sherwood = 2 + 1.1 * Math.cbrt(schmidt) * reynolds ** 0.6;
    expect(filmMassTransfer! / ((sherwood * diffusivity!) / 4e-3)).toBeCloseTo(1, 9);
    // Thiele (1939) on the radius with the film in series; plug flow of a trace.
    const modulus = 2e-3 * Math.sqrt(35 / effectiveDiffusivity!);
    const inner = (3 / modulus ** 2) * (modulus / Math.tanh(modulus) - 1);
    const overall = 1 / (1 / inner + (35 * 2e-3) / (3 * filmMassTransfer!));
    const conversion = 1 - Math.exp((-35 * overall * 0.61 * 1.2) / 0.8);
    expect(estimated.conversions[0]!.value / conversion - 1).toBeCloseTo(0, 6);
  });

  it('every estimate stands among the assumptions with its source', () => {
    for (const about of [
      'fluid.viscosity',
      'fluid.diffusivity',
      'pellet.effective_diffusivity',
      'pellet.film',
    ]) {
      const found = specification.assumptions.filter((entry) => entry.about === about);
      expect(found.length, about).toBeGreaterThan(0);
      for (const { source } of found) expect(source).toMatch(/\(\d{4}\)/);
    }
  });

  it('ratios of fluxes need a single reaction and change the diffusivity of what is not dilute', () => {
    const dense = (mixing: string): number => {
      const bed = traceBed((text) =>
        text
          .replace('C2H4: 0.1 ppm, H2: 5 ppm', 'C2H4: 20 %, H2: 60 %')
          .replace('false}', `false, diffusivity_mixing: ${mixing}}`),
      );
      return speciesAt(solveReactor({ ...bed, bed: { ...bed.bed, length: 1e-4 } }), 0).diffusivity!;
    };
    const [wilke, ratios] = [dense('wilke'), dense('flux_ratios')];
    expect(Math.abs(ratios / wilke - 1)).toBeGreaterThan(0.05);
  });
});

describe('where a gas stops being one', () => {
  /** Methanol from carbon monoxide and hydrogen at 80 bar in a tube that is cooled far too cold. */
  const coldTube = (coolant: string, feed = '240 degC'): string => `bedwright: 1
species: {CO: library, H2: library, methanol: library}
reactions:
  - name: synthesis
    equation: CO + 2 H2 -> methanol
    rate: k * p.CO
    constants: {k: 3e-3 mol/(kg s bar)}
feed: {temperature: ${feed}, pressure: 80 bar, mass_flux: 2 kg/(m^2 s), mole_fractions: {CO: 0.06, H2: balance}}
fluid: {equation_of_state: peng_robinson}
pellet: {shape: {sphere: {diameter: 5 mm}}, density: 1700 kg/m^3, method: intrinsic}
bed: {tube_diameter: 40 mm, length: 8 m, void_fraction: 0.4, pressure_drop: ergun}
heat: {mode: cooled, overall_coefficient: 400 W/(m^2 K), coolant: {temperature: ${coolant}}}
`;

  it('the run stops at the dew point and says so', () => {
    const result = solveReactor(readCase(coldTube('60 degC'), 'cold.yaml').specification);
    expect(result.status).toBe('stopped');
    expect(result.stop!.reason).toBe('condensation');
    expect(result.stop!.position).toBeGreaterThan(0);
    expect(result.events.some(({ kind }) => kind === 'condensation')).toBe(true);
  });

  it('a warm tube goes through', () => {
    const result = solveReactor(readCase(coldTube('250 degC'), 'warm.yaml').specification);
    expect(result.status).toBe('complete');
  });

  it('a feed below its dew point is refused, with the dew point named', () => {
    const wet = coldTube('60 degC', '40 degC').replace('CO: 0.06,', 'CO: 0.06, methanol: 0.1,');
    let problems: CaseError['problems'] = [];
    try {
      readCase(wet, 'wet.yaml');
    } catch (error) {
      if (!(error instanceof CaseError)) throw error;
      ({ problems } = error);
    }
    const errors = problems.filter(({ severity }) => severity === 'error');
    expect(errors).toHaveLength(1);
    expect(errors[0]!.path).toBe('feed.temperature');
    expect(errors[0]!.expected).toMatch(/dew point, \d+\.\d K/);
  });
});

describe('ranges along the bed', () => {
  it('a film correlation outside its Reynolds numbers is a warning that names them', () => {
    const bed = traceBed((text) => text.replace('velocity: 0.8 m/s', 'velocity: 0.5 mm/s'));
    const { warnings } = solveReactor(bed);
    expect(warnings.some((text) => text.includes('Wakao–Funazkri') && text.includes('3 to 10000'))).toBe(
      true,
    );
    expect(solveReactor(traceBed()).warnings.some((text) => text.includes('Wakao'))).toBe(false);
  });
});
