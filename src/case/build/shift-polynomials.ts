import { createSpeciesThermochemistry, referenceTemperature } from '../../properties/thermochemistry.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { gasConstant } from '../../quantities/constants.js';

/**
 * A record whose NASA polynomials give another heat of formation or entropy at 298.15 K: the integration constants of all ranges are moved by
 * the difference, heat capacities stay.
 *
 * @param enthalpyOfFormation - J/mol; undefined leaves it
 * @param standardEntropy - J/(mol K); undefined leaves it
 */
export function shiftPolynomials(
  record: SpeciesRecord,
  enthalpyOfFormation: number | undefined,
  standardEntropy: number | undefined,
): SpeciesRecord {
  const { heatCapacity } = record;
  if (heatCapacity?.kind !== 'nasa') return record;
  const before = createSpeciesThermochemistry(record);
  const enthalpyShift =
    enthalpyOfFormation === undefined ? 0 : enthalpyOfFormation - before.enthalpy(referenceTemperature);
  const entropyShift =
    standardEntropy === undefined ? 0 : standardEntropy - before.entropy(referenceTemperature);
  if (enthalpyShift === 0 && entropyShift === 0) return record;
  return {
    ...record,
    heatCapacity: {
      ...heatCapacity,
      ranges: heatCapacity.ranges.map((range) => ({
        ...range,
        enthalpyConstant: range.enthalpyConstant + enthalpyShift / gasConstant,
        entropyConstant: range.entropyConstant + entropyShift / gasConstant,
      })),
    },
  };
}
