/** One species of a case or a species file: of a library, its own record, or one that changes a library's. */
import type * as z from 'zod';
import type { Assumption } from '../../bed/reactor-specification.js';
import { didYouMean } from '../../diagnostics/nearest-name.js';
import { molarMassOf, parseChemicalFormula } from '../../properties/chemical-formula.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { locate, plainValue, problemAt, reportAt, type CaseContext } from '../case-context.js';
import { readKeys, type SectionReading } from '../read-section.js';
import { describeValue } from '../schema/leaves.js';
import { speciesRecordSchema } from '../schema/species-schema.js';
import { buildHeatCapacity, compareWithPolynomial } from './build-heat-capacity.js';
import { shiftPolynomials } from './shift-polynomials.js';
import type { SpeciesLibraries } from './species-source.js';
import { toProperty } from './to-property.js';

/** Given and computed molar masses may differ by this much before it is worth a word. */
const molarMassTolerance = 1e-3;

/** What every record of one file is built with. */
export interface RecordBuilder {
  readonly context: CaseContext;
  readonly libraries: SpeciesLibraries;
  readonly origin: string;
  readonly assumptions: Assumption[];
}

/** The record of one species of the section `species`; undefined with a problem reported where it is at fault. */
export function buildSpeciesRecord(builder: RecordBuilder, id: string): SpeciesRecord | undefined {
  const { context } = builder;
  const path = ['species', id];
  const { node } = locate(context.root, path);
  if (node.kind === 'map') return ownRecord(builder, id);
  if (node.kind === 'scalar' && node.value === 'library') return libraryRecord(builder, id, id, path);
  problemAt(context, path, {
    code: 'wrong_value',
    found: describeValue(plainValue(node)),
    expected: '`library`, or a record such as `{formula: C8H10, molar_mass: 106.17 g/mol}`',
  });
  return undefined;
}

/** @param wanted - id in the library; `id` is that of the case */
function libraryRecord(
  { context, libraries, assumptions }: RecordBuilder,
  id: string,
  wanted: string,
  path: readonly string[],
): SpeciesRecord | undefined {
  const found = libraries.find(wanted);
  if (found) {
    const { record, library, hides } = found;
    const name = wanted === id ? id : `${id}, as ${wanted},`;
    assumptions.push({
      about: `species.${id}`,
      statement: `data of ${name} from ${library}${hides === undefined ? '' : `, not those of ${hides}`}`,
      source: record.source,
    });
    // A file's own assumptions are about its own id.
    const about = `species.${wanted}`;
    for (const made of found.assumptions) {
      assumptions.push({
        about: `species.${id}${made.about.slice(about.length)}`,
        statement: `in ${library}, ${made.statement}`,
        source: made.source,
      });
    }
    return { ...record, id };
  }
  const mend = didYouMean(wanted, libraries.ids);
  problemAt(context, path, {
    code: 'unknown_name',
    found: `\`${wanted}\`, which the species library does not hold`,
    expected: 'an id of the library, or an own record with `formula` or `molar_mass`',
    ...(mend !== undefined && { mend }),
  });
  return undefined;
}

function ownRecord(builder: RecordBuilder, id: string): SpeciesRecord | undefined {
  const { context, origin, assumptions } = builder;
  const path = ['species', id];
  const reading = readKeys(context, path, speciesRecordSchema);
  if (!reading) return undefined;
  const { values, isGiven } = reading;
  const { formula, heat_of_formation, entropy, heat_capacity } = values;
  const base =
    values.from === undefined
      ? undefined
      : libraryRecord(builder, id, values.from === 'library' ? id : values.from, [...path, 'from']);
  const elements =
    formula === undefined
      ? base?.elements
      : parseChemicalFormula(formula, reportAt(context, [...path, 'formula']));
  const ownMass = resolveMolarMass(
    context,
    id,
    { formula, elements: formula === undefined ? undefined : elements, given: values.molar_mass },
    assumptions,
  );
  const molarMass = ownMass ?? base?.molarMass;
  if (molarMass === undefined && !isGiven('molar_mass') && !isGiven('formula') && !isGiven('from')) {
    problemAt(context, path, {
      code: 'missing_property',
      found: `no \`molar_mass\` and no \`formula\` of ${id}`,
      expected: 'one of them: the mass balance needs the molar mass',
    });
  }
  const heatCapacity = heat_capacity && buildHeatCapacity(context, path, heat_capacity);
  compareWithPolynomial(context, path, heatCapacity, { enthalpy: heat_of_formation, entropy });
  const isSound =
    reading.isSound &&
    !(formula !== undefined && !elements) &&
    !(heat_capacity && !heatCapacity) &&
    !(isGiven('from') && !base) &&
    isPairWhole(context, path, values, base);
  if (!isSound || molarMass === undefined) return undefined;
  const record: SpeciesRecord = {
    ...(base && heatCapacity?.kind === 'nasa' ? withoutAnchors(base) : base),
    ...ownFields(values, base),
    id,
    molarMass,
    ...(elements && { elements }),
    ...(heatCapacity && { heatCapacity }),
    source: base ? `${origin}, the rest from: ${base.source}` : origin,
  };
  if (base) noteChanges(builder, id, heatCapacity?.kind === 'nasa');
  // Polynomials carry heat of formation and entropy inside them; an own polynomial has its own.
  return heatCapacity ? record : shiftPolynomials(record, heat_of_formation, entropy);
}

/** Heat of formation and entropy of a library belong to its polynomials; others have their own. */
function withoutAnchors(base: SpeciesRecord): SpeciesRecord {
  const rest: { -readonly [Field in keyof SpeciesRecord]: SpeciesRecord[Field] } = { ...base };
  delete rest.enthalpyOfFormation;
  delete rest.standardEntropy;
  return rest;
}

/** What a record states in place of the library's data, as an assumption. */
function noteChanges(
  { context, origin, assumptions }: RecordBuilder,
  id: string,
  isPolynomial: boolean,
): void {
  const { node } = locate(context.root, ['species', id]);
  const changed = node.kind === 'map' ? [...node.entries.keys()].filter((key) => key !== 'from') : [];
  if (changed.length === 0) return;
  const anchors = isPolynomial ? '; heat of formation and entropy are those of the polynomials' : '';
  assumptions.push({
    about: `species.${id}`,
    statement: `${changed.join(', ')} of ${id} as given, in place of the library’s${anchors}`,
    source: origin,
  });
}

type RecordValues = SectionReading<z.output<typeof speciesRecordSchema>>['values'];

/** The fields that a record states itself, undefined ones left out. */
function ownFields(values: RecordValues, base: SpeciesRecord | undefined): Partial<SpeciesRecord> {
  const collisionDiameter = values.collision_diameter ?? base?.lennardJones?.collisionDiameter;
  const wellDepth = values.well_depth ?? base?.lennardJones?.wellDepth;
  const fields = {
    name: values.name,
    enthalpyOfFormation: values.heat_of_formation,
    standardEntropy: values.entropy,
    criticalTemperature: values.critical_temperature,
    criticalPressure: values.critical_pressure,
    criticalVolume: values.critical_volume,
    acentricFactor: values.acentric_factor,
    dipoleMoment: values.dipole_moment,
    associationFactor: values.association_factor,
    diffusionVolume: values.diffusion_volume,
    viscosity: values.viscosity && toProperty(values.viscosity),
    thermalConductivity: values.thermal_conductivity && toProperty(values.thermal_conductivity),
    lennardJones:
      collisionDiameter !== undefined && wellDepth !== undefined
        ? { collisionDiameter, wellDepth }
        : undefined,
  };
  return Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== undefined));
}

/** Lennard-Jones constants come in pairs; the library may hold the other one. */
function isPairWhole(
  context: CaseContext,
  path: readonly string[],
  values: RecordValues,
  base: SpeciesRecord | undefined,
): boolean {
  const hasDiameter = values.collision_diameter !== undefined;
  if (base?.lennardJones || hasDiameter === (values.well_depth !== undefined)) return true;
  const [given, absent] = hasDiameter
    ? ['collision_diameter', 'well_depth']
    : ['well_depth', 'collision_diameter'];
  problemAt(context, path, {
    code: 'missing_property',
    found: `no \`${absent}\` beside \`${given}\``,
    expected: 'both Lennard-Jones constants or neither',
  });
  return false;
}

/** kg/mol; the given one where there is one, compared with that of the formula. */
function resolveMolarMass(
  context: CaseContext,
  id: string,
  known: {
    readonly formula: string | undefined;
    readonly elements: Readonly<Record<string, number>> | undefined;
    readonly given: number | undefined;
  },
  assumptions: Assumption[],
): number | undefined {
  const { formula, elements, given } = known;
  const computed = elements && molarMassOf(elements);
  if (computed === undefined) return given;
  const words = `${Number((computed * 1000).toPrecision(6))} g/mol`;
  if (given === undefined) {
    assumptions.push({
      about: `species.${id}.molar_mass`,
      statement: `molar mass of ${id} computed from its formula, ${words}`,
      source: 'IUPAC abridged standard atomic weights (2021)',
    });
    return computed;
  }
  if (Math.abs(given / computed - 1) > molarMassTolerance) {
    problemAt(context, ['species', id, 'molar_mass'], {
      code: 'inconsistent',
      severity: 'warning',
      found: `a molar mass that differs from that of \`${formula!}\` (${words})`,
      expected: 'the two to agree; the given one is used, and mass will not close',
    });
  }
  return given;
}
