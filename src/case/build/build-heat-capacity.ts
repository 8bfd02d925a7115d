/** Heat capacities of own records, and whether their polynomials hold together. */
import { createNasaPolynomial, reducedHeatCapacity } from '../../properties/nasa-polynomial.js';
import type { HeatCapacityData, NasaRange } from '../../properties/species-record.js';
import { createSpeciesThermochemistry, referenceTemperature } from '../../properties/thermochemistry.js';
import { problemAt, type CaseContext, type CasePath } from '../case-context.js';
import type { HeatCapacityInput, NasaInput } from '../schema/species-schema.js';

/** Published polynomials meet at their break to better than 0.1 %; a hundredth betrays a coefficient that was mistyped. */
const alarmingJump = 0.01;
/** J/mol and J/(mol K): tabulated values from different sources differ by about this much. */
const alarmingEnthalpy = 1000;
const alarmingEntropy = 1;

/** K; the ranges of one polynomial must meet this closely, since they are typed in. */
const meetingTolerance = 1e-6;

/**
 * @param path - of the species
 * @returns undefined where the polynomials cannot be used, with a problem reported
 */
export function buildHeatCapacity(
  context: CaseContext,
  path: CasePath,
  input: HeatCapacityInput,
): HeatCapacityData | undefined {
  if (input.kind === 'constant') return { kind: 'constant', value: input.value };
  if (input.kind === 'formula') return { kind: 'formula', formula: input.formula };
  const nasaPath = [...path, 'heat_capacity', 'nasa'];
  const fault = findBrokenRange(input.ranges);
  if (fault) {
    problemAt(context, [...nasaPath, fault.index, fault.key], {
      code: 'inconsistent',
      found: fault.found,
      expected: fault.expected,
    });
    return undefined;
  }
  const isNine = input.ranges[0]!.coefficients.length === 9;
  const data: Extract<HeatCapacityData, { kind: 'nasa' }> = {
    kind: 'nasa',
    exponents: isNine ? [-2, -1, 0, 1, 2, 3, 4] : [0, 1, 2, 3, 4],
    ranges: input.ranges.map((range, index) => toRange(range, input.ranges[index - 1]?.to ?? range.from)),
  };
  warnOfJumps(context, nasaPath, data);
  return data;
}

function findBrokenRange(
  ranges: NasaInput,
): { index: number; key: string; found: string; expected: string } | undefined {
  for (const [index, range] of ranges.entries()) {
    const previous = ranges[index - 1];
    if (!previous) continue;
    const { length } = previous.coefficients;
    if (range.coefficients.length !== length) {
      const found = `${range.coefficients.length} coefficients after ${length} in the range before`;
      return { index, key: 'coefficients', found, expected: 'the same number in all ranges of a species' };
    }
    if (Math.abs(range.from - previous.to) > meetingTolerance) {
      const found = `a range from ${range.from} K after one that ends at ${previous.to} K`;
      return { index, key: 'from', found, expected: 'ranges in rising order that follow one another' };
    }
  }
  return undefined;
}

function toRange({ to, coefficients }: NasaInput[number], from: number): NasaRange {
  const [enthalpyConstant, entropyConstant] = coefficients.slice(-2) as [number, number];
  return {
    lowest: from,
    highest: to,
    coefficients: coefficients.slice(0, -2),
    enthalpyConstant,
    entropyConstant,
  };
}

function warnOfJumps(
  context: CaseContext,
  path: CasePath,
  { exponents, ranges }: Extract<HeatCapacityData, { kind: 'nasa' }>,
): void {
  for (const [index, range] of ranges.entries()) {
    const next = ranges[index + 1];
    if (!next) return;
    const below = reducedHeatCapacity(createNasaPolynomial(exponents, [range]), range.highest);
    const above = reducedHeatCapacity(createNasaPolynomial(exponents, [next]), range.highest);
    const jump = Math.abs(above / below - 1);
    if (jump <= alarmingJump) continue;
    problemAt(context, [...path, index + 1], {
      code: 'inconsistent',
      severity: 'warning',
      found: `a heat capacity that jumps by ${(100 * jump).toPrecision(2)} % at ${range.highest} K`,
      expected: 'polynomials that meet where their ranges do',
      mend: 'check the coefficients of both ranges',
    });
  }
}

/** Polynomials hold heat of formation and entropy themselves: values given beside them are compared, and not used. */
export function compareWithPolynomial(
  context: CaseContext,
  path: CasePath,
  data: HeatCapacityData | undefined,
  given: { readonly enthalpy: number | undefined; readonly entropy: number | undefined },
): void {
  if (data?.kind !== 'nasa' || data.ranges[0]!.lowest > 300) return;
  const thermochemistry = createSpeciesThermochemistry({
    id: '',
    molarMass: 1,
    heatCapacity: data,
    source: '',
  });
  const enthalpy = thermochemistry.enthalpy(referenceTemperature);
  const entropy = thermochemistry.entropy(referenceTemperature);
  if (given.enthalpy !== undefined && !(Math.abs(enthalpy - given.enthalpy) <= alarmingEnthalpy)) {
    warn('heat_of_formation', `${(given.enthalpy / 1000).toPrecision(5)} kJ/mol`, enthalpy / 1000, 'kJ/mol');
  }
  if (given.entropy !== undefined && !(Math.abs(entropy - given.entropy) <= alarmingEntropy)) {
    warn('entropy', `${given.entropy.toPrecision(5)} J/(mol K)`, entropy, 'J/(mol K)');
  }

  function warn(key: string, found: string, computed: number, unit: string): void {
    problemAt(context, [...path, key], {
      code: 'inconsistent',
      severity: 'warning',
      found: `${found}, where the polynomial gives ${computed.toPrecision(5)} ${unit} at 298.15 K`,
      expected: 'the two to agree; the polynomial is used',
    });
  }
}
