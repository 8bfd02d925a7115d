/** What a case comes to in SI; expectations are worked out here from the text, by hand or by the definitions named beside them. */
import { describe, expect, it } from 'vitest';
import { readCase } from '../../src/case/read-case.js';
import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import { caseText, labels, refusalOf, smallCase, withEdits } from './case-texts.js';

const read = (text: string): ReactorSpecification => readCase(text, 'case.yaml').specification;
const small = (...edits: readonly (readonly [string, string])[]): ReactorSpecification =>
  read(withEdits(smallCase, ...edits));
const warningsOf = (text: string): string[] => labels(readCase(text, 'case.yaml').warnings);

/** J/(mol K), CODATA 2018, exact by the SI of 2019. */
const R = 8.314462618;
const section = (Math.PI / 4) * 0.04 ** 2;
const total = ({ feed }: ReactorSpecification): number =>
  feed.molarFlows.reduce((sum, flow) => sum + flow, 0);

/** Value of a property that is given as a number. */
function numberOf(property: { readonly kind: string; readonly value?: number }): number {
  if (property.kind !== 'constant') throw new Error(`${property.kind} where a number was expected`);
  return property.value!;
}

describe('feed: every way to give the flow comes to mol/s of the whole reactor', () => {
  const flow = (entry: string, ...more: readonly (readonly [string, string])[]): number =>
    total(small(['molar_flow: 3 mol/s', entry], ...more));
  // IUPAC abridged atomic weights 2021: C 12.011, H 1.008, O 15.999, N 14.007.
  const meanMass = 0.25 * (2 * 12.011 + 4 * 1.008 + 2 * 15.999) + 0.75 * 2 * 14.007;

  it('molar_flow, split by mole fractions in the order of the species', () => {
    const { feed } = small();
    expect(feed).toMatchObject({ temperature: 500, pressure: 2e5 });
    expect(feed.molarFlows).toEqual([0.75, 0, 2.25]);
  });

  it('molar_flow in normal cubic metres: 22.41396954 L/mol at 0 degC and 1 atm (CODATA 2018)', () => {
    expect(flow('molar_flow: 450 Nm3/h')).toBeCloseTo(450 / 3600 / 22.41396954e-3, 8);
  });

  it('mass_flow', () => {
    expect(flow('mass_flow: 3.6 kg/h')).toBeCloseTo(1 / meanMass, 8);
  });

  it('mass_flux over the cross-section of all tubes', () => {
    const one = flow('mass_flux: 1.5 kg/(m^2 s)');
    expect(one / ((1500 * section) / meanMass)).toBeCloseTo(1, 4);
    expect(flow('mass_flux: 1.5 kg/(m^2 s)', ['length: 1.5 m', 'length: 1.5 m\n  tubes: 700'])).toBeCloseTo(
      700 * one,
      10,
    );
  });

  it('velocity: superficial, at feed conditions', () => {
    expect(flow('velocity: 80 cm/s')).toBeCloseTo((0.8 * section * 2e5) / (R * 500), 12);
  });

  it('volumetric_flow at feed conditions', () => {
    expect(flow('volumetric_flow: 36 m^3/h')).toBeCloseTo((0.01 * 2e5) / (R * 500), 12);
  });

  it('space_velocity: volumetric flow at feed conditions over bed volume, voids included', () => {
    expect(flow('space_velocity: 3600 1/h')).toBeCloseTo((section * 1.5 * 2e5) / (R * 500), 12);
  });

  it('molar_flows of each species; the others are not fed', () => {
    const { feed } = small([
      'molar_flow: 3 mol/s\n  mole_fractions: {A: 25 %, N2: balance}',
      'molar_flows: {N2: 3.6 kmol/h, A: 0.5 mol/s}',
    ]);
    expect(feed.molarFlows).toEqual([0.5, 0, 1]);
  });

  it('mass fractions are turned into mole fractions', () => {
    const { feed } = small([
      'mole_fractions: {A: 25 %, N2: balance}',
      'mass_fractions: {A: 0.3, N2: balance}',
    ]);
    const [a, n] = [0.3 / 60.052, 0.7 / 28.014];
    expect(feed.molarFlows[0]).toBeCloseTo((3 * a) / (a + n), 5);
    expect(feed.molarFlows[2]).toBeCloseTo((3 * n) / (a + n), 5);
  });

  it('fractions that sum to one but for rounding in the sixth place are brought to one', () => {
    const { feed } = small(['A: 25 %, N2: balance', 'A: 0.2500005, N2: 0.75']);
    expect(feed.molarFlows[0]! + feed.molarFlows[2]!).toBeCloseTo(3, 14);
  });
});

describe('sections', () => {
  it('pellet shapes: diffusion length is volume over surface', () => {
    const geometry = (shape: string): ReactorSpecification['pellet']['geometry'] =>
      small(['{sphere: {diameter: 3 mm}}', shape]).pellet.geometry;
    expect(geometry('{sphere: {diameter: 3 mm}}')).toMatchObject({ diffusionLength: 5e-4, shapeExponent: 2 });
    expect(geometry('{slab: {thickness: 3 mm}}')).toMatchObject({
      diffusionLength: 1.5e-3,
      shapeExponent: 0,
    });
    expect(geometry('{cylinder: {diameter: 3 mm, length: long}}')).toMatchObject({
      diffusionLength: 7.5e-4,
      shapeExponent: 1,
    });
  });

  it('pellet methods', () => {
    const method = (text: string): unknown => small(['method: intrinsic', text]).pellet.method;
    expect(method('method: intrinsic')).toEqual({ kind: 'intrinsic' });
    expect(method('method: {fixed: {effectiveness: 0.4}}')).toEqual({ kind: 'fixed', effectiveness: [0.4] });
    expect(method('method: {fixed: {effectiveness: {turn: 40 %}}}')).toEqual({
      kind: 'fixed',
      effectiveness: [0.4],
    });
    const resolved = 'effective_diffusivity: 5e-7 m^2/s\n  film: none';
    expect(method(`method: thiele\n  ${resolved}`)).toEqual({ kind: 'thiele' });
    expect(method(resolved)).toEqual({ kind: 'full' });
  });

  it('one diffusivity or film coefficient for all, or one for each; inert species need none', () => {
    const pellet = (text: string): ReactorSpecification['pellet'] =>
      small(['method: intrinsic', text]).pellet;
    const one = pellet('effective_diffusivity: 0.005 cm^2/s\n  film: {mass_transfer: 7 cm/s}');
    expect(one.transport.effectiveDiffusivities).toHaveLength(3);
    for (const property of one.transport.effectiveDiffusivities) {
      expect(numberOf(property)).toBeCloseTo(5e-7, 20);
    }
    const { film } = one.transport;
    if (film.kind !== 'given') throw new Error('the film is given');
    expect(film.massTransfer).toHaveLength(3);
    for (const property of film.massTransfer) expect(numberOf(property)).toBeCloseTo(0.07, 16);
    const each = pellet('effective_diffusivity: {A: 1e-6 m^2/s, B: 2e-6 m^2/s}\n  film: none');
    expect(each.transport.effectiveDiffusivities.map(numberOf)).toEqual([1e-6, 2e-6, Infinity]);
    expect(each.transport.film).toEqual({ kind: 'none' });
  });

  it('the pellet of an isothermal bed is isothermal, whatever conductivity stands there', () => {
    const { pellet, assumptions } = small([
      'method: intrinsic',
      'effective_diffusivity: 5e-7 m^2/s\n  thermal_conductivity: 0.3 W/(m K)\n  film: {mass_transfer: 1 m/s, heat_transfer: 9 W/(m^2 K)}',
    ]);
    expect(numberOf(pellet.transport.thermalConductivity)).toBe(Infinity);
    expect(pellet.transport.film).toMatchObject({ heatTransfer: { kind: 'constant', value: Infinity } });
    expect(assumptions.some(({ about, source }) => about === 'pellet' && source === 'case: heat.mode')).toBe(
      true,
    );
  });

  it('pressure drop: after Ergun (1952) 150 and 1.75, own constants, or none', () => {
    const drop = (text: string): unknown =>
      small(
        ['pressure_drop: none', `pressure_drop: ${text}`],
        ['pellet:', 'fluid: {viscosity: 0.03 cP}\npellet:'],
      ).bed.pressureDrop;
    expect(drop('ergun')).toMatchObject({ kind: 'two_term', viscous: 150, inertial: 1.75 });
    expect(drop('{viscous: 180, inertial: 1.8}')).toMatchObject({
      kind: 'two_term',
      viscous: 180,
      inertial: 1.8,
    });
    expect(drop('none')).toEqual({ kind: 'none' });
  });

  it('heat modes', () => {
    const fluid = 'fluid: {heat_capacity: 1 kJ/(kg K)}\nheat:';
    const heat = (text: string): unknown =>
      small(
        ['constants: {k: 2 1/s}', 'constants: {k: 2 1/s}\n    heat: -10 kJ/mol'],
        ['heat: {mode: isothermal}', `${fluid} ${text}`],
      ).heat;
    expect(heat('{mode: adiabatic}')).toEqual({ mode: 'adiabatic' });
    expect(
      heat('{mode: cooled, overall_coefficient: 0.1 kW/(m^2 K), coolant: {temperature: 200 degC}}'),
    ).toEqual({ mode: 'cooled', overallCoefficient: 100, coolantTemperature: 473.15 });
  });

  it('heat capacity of the fluid: per mass or per amount by its unit, a formula, or from the species', () => {
    const capacity = (text: string): unknown =>
      small(['pellet:', `fluid: {heat_capacity: ${text}}\npellet:`]).fluid.heatCapacity;
    expect(capacity('1.06 kJ/(kg K)')).toEqual({
      kind: 'given',
      per: 'mass',
      property: { kind: 'constant', value: 1060 },
    });
    expect(capacity('7 cal/(mol K)')).toMatchObject({ per: 'amount', property: { value: 7 * 4.184 } });
    expect(capacity('30 J/(mol K) + 0.01 J/(mol K^2) * T')).toMatchObject({
      per: 'amount',
      property: { kind: 'formula' },
    });
    expect(capacity('estimate')).toEqual({ kind: 'species' });
    expect(small().fluid.heatCapacity).toEqual({ kind: 'species' });
  });

  it('limits, targets and output', () => {
    const { limits, targets, output } = small([
      'heat: {mode: isothermal}',
      'heat: {mode: isothermal}\nlimits: {temperature: 300 degC, pressure_drop: 500 mbar}\ntargets: {conversion: {A: 90 %}}\noutput: {points: 11, pellet_positions: [50 cm], selectivity: [{of: B, from: A}]}',
    ]);
    expect(limits.temperature).toBeCloseTo(573.15, 12);
    expect(limits.pressureDrop).toBeCloseTo(5e4, 9);
    expect(targets).toEqual([{ speciesIndex: 0, conversion: 0.9 }]);
    expect(output).toEqual({
      points: 11,
      pelletPositions: [0.5],
      selectivities: [{ productIndex: 1, reactantIndex: 0, productPerReactant: 1 }],
    });
  });

  it('a title may be a number, notes may be long, and both may be left out', () => {
    expect(read(`title: 2024\nnotes: ${'x'.repeat(5000)}\n${smallCase}`)).toMatchObject({ title: '2024' });
    expect(small()).toMatchObject({ title: 'untitled case', notes: '' });
  });

  it('`start: cold` is the only start and may be said', () => {
    expect(read(`start: cold\n${smallCase}`)).toEqual(small());
  });
});

describe('species', () => {
  const speciesA = (record: string): ReactorSpecification['species'][number] =>
    small(['A: {formula: C2H4O2}', `A: ${record}`]).species[0]!;

  it('molar mass from the formula: acetic acid 60.052 g/mol (CRC Handbook, 97th ed.)', () => {
    expect(speciesA('{formula: C2H4O2}').molarMass).toBeCloseTo(0.060052, 6);
    expect(speciesA('{formula: C2H4O2}').elements).toEqual({ C: 2, H: 4, O: 2 });
  });

  it('a given molar mass is kept; one that disagrees with the formula is a warning', () => {
    expect(speciesA('{formula: C2H4O2, molar_mass: 60.05 kg/kmol}').molarMass).toBeCloseTo(0.06005, 15);
    const edit = (mass: string): string[] =>
      warningsOf(withEdits(smallCase, ['A: {formula: C2H4O2}', `A: {formula: C2H4O2, molar_mass: ${mass}}`]));
    expect(edit('60.1 g/mol')).toEqual([]);
    expect(edit('61 g/mol')).toEqual(['inconsistent species.A.molar_mass']);
  });

  it('without a formula the elements cannot be balanced: a warning, and masses are compared', () => {
    const edit = (mass: string): string =>
      withEdits(smallCase, ['A: {formula: C2H4O2}', `A: {molar_mass: ${mass}}`]);
    expect(warningsOf(edit('60 g/mol'))).toEqual(['missing_property reactions[0].equation']);
    expect(labels(refusalOf(edit('66 g/mol')).problems)).toContain('element_balance reactions[0].equation');
  });

  it('a species with no part in the case is a warning', () => {
    expect(warningsOf(withEdits(smallCase, ['N2: library', 'N2: library\n  CH4: library']))).toEqual([
      'inconsistent species.CH4',
    ]);
  });

  it('own data in SI', () => {
    expect(
      speciesA(
        '{formula: C2H4O2, heat_of_formation: -103.4 kcal/mol, entropy: 283.5 J/(mol K), heat_capacity: 63.4 J/mol/K}',
      ),
    ).toMatchObject({ standardEntropy: 283.5, heatCapacity: { kind: 'constant', value: 63.4 } });
    expect(speciesA('{formula: C2H4O2, heat_of_formation: -103.4 kcal/mol}').enthalpyOfFormation).toBeCloseTo(
      -103400 * 4.184,
      6,
    );
  });
});

describe('NASA polynomials of own records', () => {
  // Nitrogen, seven-constant form, 200 to 6000 K: Burcat & Ruscic (2005), ANL-05/20 (from memory, rounded to seven digits).
  const low = '[3.531005, -1.236610e-4, -5.029994e-7, 2.435306e-9, -1.408812e-12, -1046.976, 2.967474]';
  const high = '[2.952576, 1.396900e-3, -4.926317e-7, 7.860104e-11, -4.607552e-15, -923.9486, 5.871892]';
  const withRanges = (first: string, second: string, more = ''): string =>
    withEdits(smallCase, [
      'N2: library',
      `N2: {formula: N2, heat_capacity: {nasa: [{from: 200 K, to: 1000 K, coefficients: ${first}}, ${second}]}${more}}`,
    ]);
  const second = `{from: 1000 K, to: 6000 K, coefficients: ${high}}`;

  it('are taken over with their integration constants, and meet at their break', () => {
    const { specification, warnings } = readCase(withRanges(low, second), 'case.yaml');
    expect(warnings).toEqual([]);
    const { heatCapacity } = specification.species[2]!;
    expect(heatCapacity).toMatchObject({
      kind: 'nasa',
      exponents: [0, 1, 2, 3, 4],
      ranges: [
        { lowest: 200, highest: 1000, enthalpyConstant: -1046.976, entropyConstant: 2.967474 },
        { lowest: 1000 },
      ],
    });
  });

  it('a mistyped coefficient shows as a jump', () => {
    const slip = low.replace('-1.236610e-4', '1.236610e-4');
    expect(warningsOf(withRanges(slip, second))).toEqual(['inconsistent species.N2.heat_capacity.nasa[1]']);
  });

  it('entropy beside them is compared: nitrogen has 191.6 J/(mol K) (CODATA key values, 1989)', () => {
    expect(
      warningsOf(withRanges(low, second, ', entropy: 191.6 J/(mol K), heat_of_formation: 0 J/mol')),
    ).toEqual([]);
    expect(
      warningsOf(withRanges(low, second, ', entropy: 205.1 J/(mol K), heat_of_formation: 10 kJ/mol')),
    ).toEqual(['inconsistent species.N2.heat_of_formation', 'inconsistent species.N2.entropy']);
  });

  it('ranges must follow one another and be of one form', () => {
    const nine = '[0, 0, 3.5, 0, 0, 0, 0, -1043, 3]';
    const refused = (...ranges: [string, string]): string[] =>
      labels(refusalOf(withRanges(...ranges)).problems);
    expect(refused(low, `{from: 1100 K, to: 6000 K, coefficients: ${high}}`)).toEqual([
      'inconsistent species.N2.heat_capacity.nasa[1].from',
    ]);
    expect(refused(low, `{from: 1000 K, to: 6000 K, coefficients: ${nine}}`)).toEqual([
      'inconsistent species.N2.heat_capacity.nasa[1].coefficients',
    ]);
    expect(refused(low, '{from: 1000 K, to: 6000 K, coefficients: [3.5, 1]}')).toEqual([
      'wrong_value species.N2.heat_capacity.nasa[1].coefficients',
    ]);
    expect(refused(low, `{from: 6000 K, to: 1000 K, coefficients: ${high}}`)).toEqual([
      'out_of_range species.N2.heat_capacity.nasa[1]',
    ]);
  });
});

describe('what is needed is asked for where it is needed, and only there', () => {
  const problems = (...edits: readonly (readonly [string, string])[]): string[] =>
    labels(refusalOf(withEdits(smallCase, ...edits)).problems);
  const adiabatic = ['{mode: isothermal}', '{mode: adiabatic}'] as const;

  it('an isothermal bed needs no thermochemistry', () => {
    expect(readCase(smallCase, 'case.yaml').warnings).toEqual([]);
  });

  it('an adiabatic one does, of the species that react or flow', () => {
    expect(problems(adiabatic)).toEqual([
      'missing_property species.A',
      'missing_property species.A',
      'missing_property species.B',
      'missing_property species.B',
    ]);
    const error = refusalOf(withEdits(smallCase, adiabatic));
    expect(error.problems[0]).toMatchObject({
      found: 'no `heat_of_formation` of A',
      expected: 'it, since reaction `turn` has no `heat` and the bed is not isothermal',
    });
  });

  it('with heats given, only the heat capacity of the mixture', () => {
    const heat = ['constants: {k: 2 1/s}', 'constants: {k: 2 1/s}\n    heat: -10 kJ/mol'] as const;
    expect(problems(adiabatic, heat)).toEqual(['missing_property species.A', 'missing_property species.B']);
    const fluid = ['pellet:', 'fluid: {heat_capacity: 1 kJ/(kg K)}\npellet:'] as const;
    expect(readCase(withEdits(smallCase, adiabatic, heat, fluid), 'case.yaml').warnings).toEqual([]);
  });

  it('the full method needs diffusivities and film; conductivity only where the bed is not isothermal', () => {
    expect(problems(['  method: intrinsic\n', ''])).toEqual([
      'missing_property pellet',
      'missing_property pellet',
    ]);
    const found = (text: string): string[] => refusalOf(text).problems.map((problem) => problem.found);
    expect(found(withEdits(smallCase, ['  method: intrinsic\n', '']))).toEqual([
      'no `effective_diffusivity` in `pellet`',
      'no `film` in `pellet`',
    ]);
    const cooled = withEdits(caseText('salt-cooled-oxidation'), [
      '  thermal_conductivity: 0.35 W/(m K)\n',
      '',
    ]);
    expect(found(cooled)).toEqual(['no `thermal_conductivity` in `pellet`']);
    expect(() => readCase(cooled.replace('method: full', 'method: thiele'), 'case.yaml')).not.toThrow();
  });

  it('formulas are tried at the feed', () => {
    const viscosity = (text: string): string =>
      withEdits(smallCase, ['pellet:', `fluid: {viscosity: ${text}}\npellet:`]);
    expect(labels(refusalOf(viscosity('1e-5 Pa s * (1 - T / 400 K)')).problems)).toEqual([
      'out_of_range fluid.viscosity',
    ]);
    expect(labels(refusalOf(viscosity('1e-5 Pa s * log((400 K - T) / 1 K)')).problems)).toEqual([
      'out_of_range fluid.viscosity',
    ]);
    expect(() => read(viscosity('1e-5 Pa s * (T / 400 K)^0.7'))).not.toThrow();
    const capacity = withEdits(smallCase, [
      'A: {formula: C2H4O2}',
      'A: {formula: C2H4O2, heat_capacity: 100 J/(mol K) - 0.3 J/(mol K^2) * T}',
    ]);
    expect(labels(refusalOf(capacity).problems)).toEqual(['out_of_range species.A.heat_capacity']);
  });

  it('a heat capacity of an ideal gas does not hang on the pressure', () => {
    const text = withEdits(smallCase, [
      'A: {formula: C2H4O2}',
      'A: {formula: C2H4O2, heat_capacity: 100 J/(mol K) * P / 1 bar}',
    ]);
    expect(refusalOf(text).problems[0]).toMatchObject({
      path: 'species.A.heat_capacity',
      found: 'the pressure `P`',
      expected: 'a formula in `T` alone',
    });
  });
});

describe('a fault leaves a hole that silences what follows from it', () => {
  const only = (...edits: readonly (readonly [string, string])[]): string[] =>
    labels(refusalOf(withEdits(caseText('salt-cooled-oxidation'), ...edits)).problems);

  it.each([
    [
      'a species',
      ['A: { name: feed aromatic, formula: C8H10 }', 'A: { name: feed aromatic, formula: C8Hx }'],
      'bad_formula species.A.formula',
    ],
    ['the species section', ['species:\n', 'species: none\nspeciess:\n'], 'wrong_type species'],
    [
      'a constant',
      ["{ value: '0.085 mol/(kg s bar^2)'", "{ value: '0.085 mol/(kg s bax^2)'"],
      'unknown_unit reactions[0].constants.k.value',
    ],
    ['the bed', ['tube_diameter: 25.4 mm', 'tube_diameter: 25.4'], 'missing_unit bed.tube_diameter'],
    ['the feed', ['temperature: 625 K\n', 'temperature: 625\n'], 'missing_unit feed.temperature'],
    ['the mode of heat', ['mode: cooled', 'mode: cold'], 'wrong_value heat.mode'],
    ['the method', ['method: full', 'method: ful'], 'wrong_value pellet.method'],
    ['the name of a reaction', ['name: burn', 'name: burn it'], 'bad_identifier reactions[1].name'],
    ['an equation', ['P + 7.5 O2 -> 8 CO2', 'P + 7.5 O2 = 8 CO2'], 'wrong_value reactions[2].equation'],
  ] as const)('%s', (name, edit, label) => {
    const found = only([edit[0], edit[1]]).filter((entry) => !entry.startsWith('unknown_key speciess'));
    expect(found, name).toEqual([label]);
  });

  it('a constant of the whole case at fault is not reported again by the laws that name it', () => {
    const text = withEdits(
      smallCase,
      ['constants: {k: 2 1/s}\n', ''],
      ['reactions:', 'constants: {k: 2 1/q}\nreactions:'],
      ['    per: pellet_volume\n    ', '    per: pellet_volume\n'],
    );
    expect(labels(refusalOf(text).problems)).toEqual(['unknown_unit constants.k']);
  });

  it('everything else of the same section is still checked', () => {
    expect(
      only(
        ['rate: k * p.P * p.O2', 'rate: k * p.Q * p.O2'],
        ['heat: -3279 kJ/mol', 'heat: -3279'],
        ['P + 7.5 O2', 'P + 7 O2'],
        ['temperature: 625 K\n', 'temperature: 625\n'],
        ['N2: balance', 'N2: 10 %'],
        ['mass_flux: 1.3', 'velocity: 1 m/s\n  mass_flux: 1.3'],
        ['diameter: 4 mm', 'diameter: 4'],
        ['  density: 1800 kg/m^3\n', ''],
        ['overall_coefficient: 110 W/(m^2 K)', 'overall_coefficient: 110'],
        ['  coolant: { temperature: 625 K }\n', ''],
      ).sort(),
    ).toEqual(
      [
        'unknown_name reactions[2].rate',
        'missing_unit reactions[2].heat',
        'element_balance reactions[2].equation',
        'missing_unit feed.temperature',
        'fraction_sum feed.mole_fractions',
        'inconsistent feed.velocity',
        'missing_unit pellet.shape.sphere.diameter',
        'missing_property pellet',
        'missing_unit heat.overall_coefficient',
        'missing_key heat',
      ].sort(),
    );
  });
});

describe('assumptions', () => {
  it('name every default with its source', () => {
    const { assumptions } = small();
    const topics = assumptions.map(({ about }) => about);
    for (const topic of [
      'numerics.tolerance',
      'pellet.activity',
      'bed.tubes',
      'fluid.equation_of_state',
      'fluid.heat_capacity',
      'species.N2',
      'species.A.molar_mass',
    ]) {
      expect(topics).toContain(topic);
    }
    for (const { statement, source } of assumptions) {
      expect(statement).not.toBe('');
      expect(source).not.toBe('');
    }
  });

  it('what the case says is no default', () => {
    const { assumptions } = read(
      `${withEdits(smallCase, ['  method: intrinsic', '  method: intrinsic\n  activity: 0.8'], ['length: 1.5 m', 'length: 1.5 m\n  tubes: 3'])}numerics: {tolerance: 1e-5}\n`,
    );
    const defaults = assumptions.filter(({ source }) => source === 'default').map(({ about }) => about);
    expect(defaults).toEqual(['fluid.equation_of_state']);
  });
});
