/** Faults in what estimates are made from, each with its code and place; one fault, one message. */
import { describe, expect, it } from 'vitest';
import { readCase } from '../../src/case/read-case.js';
import { CaseError } from '../../src/diagnostics/case-error.js';

const good = `bedwright: 1
species: {CO: library, O2: library, CO2: library, N2: library}
reactions: [{name: burn, equation: CO + 0.5 O2 -> CO2, rate: k * c.CO, per: pellet_volume, constants: {k: 90 1/s}}]
feed: {temperature: 500 K, pressure: 1.5 bar, velocity: 1 m/s, mole_fractions: {CO: 1 %, O2: 20 %, N2: balance}}
fluid: {equation_of_state: peng_robinson}
pellet:
  shape: {sphere: {diameter: 3 mm}}
  density: 1500 kg/m^3
  porosity: 0.5
  tortuosity: 3
  pore_radius: 8 nm
  film: estimate
bed: {tube_diameter: 60 mm, length: 1 m, void_fraction: 0.4, pressure_drop: ergun}
heat: {mode: adiabatic}
`;
const own = '{formula: CO, heat_of_formation: -110.5 kJ/mol, heat_capacity: 29 J/(mol K)}';

function problemsOf(text: string): string[] {
  try {
    return readCase(text, 'case.yaml').warnings.map(({ code, path }) => `warning ${code} ${path}`);
  } catch (error) {
    if (!(error instanceof CaseError)) throw error;
    return error.problems.map(({ code, path, severity }) =>
      severity === 'warning' ? `warning ${code} ${path}` : `${code} ${path}`,
    );
  }
}

describe('a case with every property estimated', () => {
  it('is without fault', () => {
    expect(problemsOf(good)).toEqual([]);
  });

  it.each([
    [
      'a mixing rule that needs one reaction, with two',
      'reactions: [',
      'reactions: [{name: x, equation: CO + 0.5 O2 -> CO2, rate: k * c.CO, per: pellet_volume, constants: {k: 1 1/s}}, ',
      'fluid: {equation_of_state: peng_robinson',
      'fluid: {equation_of_state: peng_robinson, diffusivity_mixing: flux_ratios',
      ['inconsistent fluid.diffusivity_mixing'],
    ],
    [
      'interaction of an ideal gas',
      'peng_robinson}',
      'ideal, binary_interaction: {CO: {N2: 0.1}}}',
      '',
      '',
      ['inconsistent fluid.binary_interaction'],
    ],
    [
      'interaction with no species',
      'peng_robinson}',
      'peng_robinson, binary_interaction: {CO: {N3: 0.1}}}',
      '',
      '',
      ['unknown_name fluid.binary_interaction.CO.N3'],
    ],
    [
      'interaction given twice',
      'peng_robinson}',
      'peng_robinson, binary_interaction: {CO: {N2: 0.1}, N2: {CO: 0.1}}}',
      '',
      '',
      ['inconsistent fluid.binary_interaction.N2.CO'],
    ],
    [
      'interaction with itself',
      'peng_robinson}',
      'peng_robinson, binary_interaction: {CO: {CO: 0.1}}}',
      '',
      '',
      ['inconsistent fluid.binary_interaction.CO.CO'],
    ],
    [
      'an unknown equation',
      'peng_robinson}',
      'peng_robinsen}',
      '',
      '',
      ['wrong_value fluid.equation_of_state'],
    ],
    [
      'a correction that is neither true nor false',
      'peng_robinson}',
      'peng_robinson, pressure_correction: yes}',
      '',
      '',
      ['wrong_type fluid.pressure_correction'],
    ],
    ['no porosity', '  porosity: 0.5\n', '', '', '', ['missing_property pellet', 'missing_property pellet']],
    ['no tortuosity', '  tortuosity: 3\n', '', '', '', ['missing_property pellet']],
    ['tortuosity below one', 'tortuosity: 3', 'tortuosity: 0.3', '', '', ['out_of_range pellet.tortuosity']],
    ['a porosity in no fraction', 'porosity: 0.5', 'porosity: 1.5', '', '', ['out_of_range pellet.porosity']],
    [
      'pores in two ways',
      'pore_radius: 8 nm',
      'pore_radius: 8 nm\n  pores: [{radius: 5 nm, fraction: 1}]',
      '',
      '',
      ['inconsistent pellet.pores'],
    ],
    [
      'fractions of pores that do not sum to one',
      'pore_radius: 8 nm',
      'pores: [{radius: 5 nm, fraction: 0.6}, {radius: 400 nm, fraction: 0.3}]',
      '',
      '',
      ['fraction_sum pellet.pores'],
    ],
    [
      'pores without radius',
      'pore_radius: 8 nm',
      'pores: [{fraction: 1}]',
      '',
      '',
      ['missing_key pellet.pores[0]'],
    ],
    [
      'random pores of one size',
      'tortuosity: 3\n  pore_radius: 8 nm',
      'pore_radius: 8 nm\n  pore_model: random_pore',
      '',
      '',
      ['inconsistent pellet.pore_model'],
    ],
    [
      'random pores with a tortuosity',
      'pore_radius: 8 nm',
      'pores: [{radius: 5 nm, fraction: 0.6}, {radius: 400 nm, fraction: 0.4}]\n  pore_model: random_pore',
      '',
      '',
      ['inconsistent pellet.tortuosity'],
    ],
    [
      'pores that no molecule enters',
      'pore_radius: 8 nm',
      'pore_radius: 0.1 nm',
      '',
      '',
      [
        'inconsistent pellet.pore_radius',
        'inconsistent pellet.pore_radius',
        'inconsistent pellet.pore_radius',
      ],
    ],
    [
      'pores of the size of molecules',
      'pore_radius: 8 nm',
      'pore_radius: 0.3 nm',
      '',
      '',
      ['warning out_of_range pellet.pore_radius'],
    ],
    [
      'an unknown film correlation',
      'film: estimate',
      'film: {correlation: wakao}',
      '',
      '',
      ['wrong_value pellet.film.correlation'],
    ],
    [
      'a film in two ways',
      'film: estimate',
      'film: {correlation: gnielinski, heat_transfer: 100 W/(m^2 K)}',
      '',
      '',
      ['inconsistent pellet.film'],
    ],
    [
      'a species without critical data',
      'CO: library',
      `CO: ${own}`,
      '',
      '',
      ['missing_property species.CO', 'missing_property species.CO', 'missing_property species.CO'],
    ],
    [
      'a species without diffusion volume alone',
      'CO: library',
      'CO: {formula: CO, heat_of_formation: -110.5 kJ/mol, heat_capacity: 29 J/(mol K), critical_temperature: 133 K, critical_pressure: 35 bar, critical_volume: 93 cm^3/mol, acentric_factor: 0.05}',
      '',
      '',
      ['missing_property species.CO'],
    ],
    [
      'a feed colder than the data',
      'temperature: 500 K',
      'temperature: 150 K',
      '',
      '',
      ['out_of_range feed.temperature'],
    ],
  ])('%s', (_what, search, replacement, alsoSearch, alsoReplacement, expected) => {
    expect(good).toContain(search);
    const text = good.replace(search, replacement);
    const changed = alsoSearch === '' ? text : text.replace(alsoSearch, alsoReplacement);
    expect(problemsOf(changed)).toEqual(expected);
  });

  it('asks for nothing that it has no use for', () => {
    // Own species without any transport data in a bed whose properties are all given.
    const text = good
      .replace('CO: library', `CO: ${own}`)
      .replace('fluid: {equation_of_state: peng_robinson}', 'fluid: {viscosity: 2.6e-5 Pa s}')
      .replace(
        '  porosity: 0.5\n  tortuosity: 3\n  pore_radius: 8 nm\n  film: estimate',
        '  thermal_conductivity: 0.3 W/(m K)\n  effective_diffusivity: 1e-6 m^2/s\n  film: none',
      );
    expect(problemsOf(text)).toEqual([]);
  });

  it('formulas stand wherever a property does', () => {
    const text = good
      .replace(
        'fluid: {equation_of_state: peng_robinson}',
        'fluid: {viscosity: 1.8e-5 Pa s * (T / 300 K)^0.7, thermal_conductivity: 26 mW/(m K) * (T / 300 K)^0.8, diffusivity: {CO: 0.2 cm^2/s * (T / 300 K)^1.75 * (1 bar / P)}}',
      )
      .replace(
        'film: estimate',
        'film: {mass_transfer: 0.1 m/s * (T / 500 K), heat_transfer: 200 W/(m^2 K) * (T / 500 K)^0.5}',
      )
      .replace('  porosity: 0.5', '  thermal_conductivity: 0.3 W/(m K) * (T / 500 K)^0.2\n  porosity: 0.5');
    expect(problemsOf(text)).toEqual([]);
  });
});
