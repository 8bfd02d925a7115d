/** Whole texts as a user sees them: place, what was found, what was expected, how to mend it, the line and the caret. */
import { describe, expect, it } from 'vitest';
import { formatCaseError } from '../../src/diagnostics/format-problem.js';
import { refusalOf, smallCase, withEdits } from '../case/case-texts.js';

const shown = (...edits: readonly (readonly [string, string])[]): string =>
  formatCaseError(refusalOf(withEdits(smallCase, ...edits)));

const golden: readonly (readonly [name: string, search: string, replacement: string, text: string])[] = [
  [
    'a bare number',
    'diameter: 3 mm',
    'diameter: 3',
    `case.yaml:18:30  pellet.shape.sphere.diameter
  found 3, a bare number; expected a length with its unit, for example \`4 mm\`
  units that fit: m, mm, cm, inch, ft
  18 |   shape: {sphere: {diameter: 3}}
     |                              ^`,
  ],
  [
    'a unit of another dimension',
    'length: 1.5 m',
    'length: 1.5 kg',
    `case.yaml:23:15  bed.length
  found \`kg\`, which is a mass (kg); expected a length, for example \`4 mm\`
  units that fit: m, mm, cm, inch, ft
  23 |   length: 1.5 kg
     |               ^^`,
  ],
  [
    'a key with a slip',
    'tube_diameter: 40 mm',
    'tube_diametre: 40 mm',
    `case.yaml:21:1  bed
  found no \`tube_diameter\` in \`bed\`; expected a length, for example \`4 mm\`
  21 | bed:
     | ^^^

case.yaml:22:3  bed.tube_diametre
  found the key \`tube_diametre\`, which means nothing here; expected one of tube_diameter, tubes, length, void_fraction, pressure_drop, zones
  did you mean \`tube_diameter\`?
  22 |   tube_diametre: 40 mm
     |   ^^^^^^^^^^^^^`,
  ],
  [
    'a negative length',
    'length: 1.5 m',
    'length: -1.5 m',
    `case.yaml:23:11  bed.length
  found \`-1.5 m\`; expected a length above 0
  23 |   length: -1.5 m
     |           ^^^^^^`,
  ],
  [
    'a temperature in the wrong scale',
    'temperature: 500 K',
    'temperature: 5000 degC',
    `case.yaml:13:16  feed.temperature
  found \`5000 degC\`; expected a temperature below 5000 K
  13 |   temperature: 5000 degC
     |                ^^^^^^^^^`,
  ],
  [
    'an equation that does not balance',
    'equation: A -> B',
    'equation: A -> B + N2',
    `case.yaml:8:15  reactions[0].equation
  found \`A -> B + N2\`, which does not balance: 2 N too many on the right; expected the same atoms on both sides
  check the coefficients and the formulas of the species
  8 |     equation: A -> B + N2
    |               ^^^^^^^^^^^`,
  ],
  [
    'a law of the wrong basis',
    '    per: pellet_volume\n',
    '',
    `case.yaml:9:11  reactions[0].rate
  found a rate in m^-3 s^-1 mol; expected amount per time per catalyst mass, as mol/(kg s) (kg^-1 s^-1 mol)
  say what volume it refers to: \`per: pellet_volume\` or \`per: bed_volume\`
  9 |     rate: k * c.A
    |           ^^^^^^^`,
  ],
  [
    'an unknown species in a law',
    'rate: k * c.A',
    'rate: k * c.AA',
    `case.yaml:9:17  reactions[0].rate
  found \`AA\`, which is no species of this case; expected one of A, B, N2
  did you mean \`A\`?
  9 |     rate: k * c.AA
    |                 ^^`,
  ],
  [
    'fractions that leave a rest',
    'N2: balance',
    'N2: 70 %',
    `case.yaml:16:3  feed.mole_fractions
  found fractions that sum to 0.95; expected 1
  write \`balance\` for the species that makes up the rest
  16 |   mole_fractions: {A: 25 %, N2: 70 %}
     |   ^^^^^^^^^^^^^^`,
  ],
  [
    'two flows',
    'molar_flow: 3 mol/s',
    'molar_flow: 3 mol/s\n  velocity: 1 m/s',
    `case.yaml:16:13  feed.velocity
  found \`molar_flow\` and \`velocity\`; expected exactly one of molar_flow, mass_flow, mass_flux, velocity, volumetric_flow, space_velocity (or \`molar_flows\` of every species)
  16 |   velocity: 1 m/s
     |             ^^^^^`,
  ],
  [
    'what this version cannot do',
    'void_fraction: 0.4',
    'void_fraction: estimate',
    `case.yaml:24:18  bed.void_fraction
  found \`estimate\`, which belongs to the case format; expected something this version can do: not supported yet
  remove it, or give the value itself where one can be given
  24 |   void_fraction: estimate
     |                  ^^^^^^^^`,
  ],
  [
    'a property that the mode of heat asks for',
    '{mode: isothermal}',
    '{mode: cooled}',
    `case.yaml:3:3  species.A
  found no \`heat_of_formation\` of A; expected it, since reaction \`turn\` has no \`heat\` and the bed is not isothermal
  add it, or give the reaction its \`heat\`
  3 |   A: {formula: C2H4O2}
    |   ^`,
  ],
  [
    'a tab',
    '  length: 1.5 m',
    '\tlength: 1.5 m',
    `case.yaml:23:1
  found a tab as indentation; expected spaces
  replace the tab by two spaces
  23 | →length: 1.5 m
     | ^`,
  ],
];

describe('messages in full', () => {
  it.each(golden)('%s', (_name, search, replacement, text) => {
    const blocks = shown([search, replacement]).split('\n\n');
    expect(blocks.slice(0, text.split('\n\n').length).join('\n\n')).toBe(text);
  });
});
