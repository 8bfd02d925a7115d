/**
 * Unit symbols the case file may use. Factors turn one unit into SI; those marked exact by definition are written as the definition.
 *
 * @source NIST SP 811 (2008), Appendix B; CODATA 2018 for the gas constant behind normal cubic metres
 */
import { nearestName } from '../diagnostics/nearest-name.js';
import { gasConstant, standardAtmosphere, zeroCelsius } from './constants.js';
import { dimensionless, sameDimension, type Dimension } from './dimension.js';

/** A unit symbol with what it is worth. */
export interface Unit {
  readonly symbol: string;
  /** One unit in SI. */
  readonly factor: number;
  readonly dimension: Dimension;
  /** SI prefixes may stand before the symbol. */
  readonly takesPrefix: boolean;
  /** Set for temperature scales with an offset: kelvin = (value + offset) * factor. They stand alone only. */
  readonly offset?: number;
}

const mass: Dimension = [1, 0, 0, 0, 0];
const length: Dimension = [0, 1, 0, 0, 0];
const time: Dimension = [0, 0, 1, 0, 0];
const amount: Dimension = [0, 0, 0, 1, 0];
const temperature: Dimension = [0, 0, 0, 0, 1];
const volume: Dimension = [0, 3, 0, 0, 0];
const force: Dimension = [1, 1, -2, 0, 0];
const pressure: Dimension = [1, -1, -2, 0, 0];
const energy: Dimension = [1, 2, -2, 0, 0];
const power: Dimension = [1, 2, -3, 0, 0];
const dynamicViscosity: Dimension = [1, -1, -1, 0, 0];

const pound = 0.45359237;
const foot = 0.3048;
const inch = 0.0254;
const standardGravity = 9.80665;
const poundForce = pound * standardGravity;

type Row = readonly [
  symbols: string,
  factor: number,
  dimension: Dimension,
  takesPrefix?: 'prefix' | undefined,
  offset?: number,
];

const rows: readonly Row[] = [
  ['kg', 1, mass],
  ['g', 1e-3, mass, 'prefix'],
  ['t', 1000, mass],
  ['lb', pound, mass],
  ['m', 1, length, 'prefix'],
  ['angstrom Å', 1e-10, length],
  ['ft', foot, length],
  ['inch in', inch, length],
  ['s', 1, time, 'prefix'],
  ['min', 60, time],
  ['h hr', 3600, time],
  ['d day', 86400, time],
  // Julian year, as used for service life.
  ['a year', 365.25 * 86400, time],
  ['mol', 1, amount, 'prefix'],
  ['lbmol', pound * 1000, amount],
  // Amount of ideal gas in a cubic metre at 0 degC and 1 atm.
  ['Nm3', standardAtmosphere / (gasConstant * zeroCelsius), amount],
  ['K', 1, temperature, 'prefix'],
  ['degC °C', 1, temperature, undefined, zeroCelsius],
  ['degF °F', 5 / 9, temperature, undefined, 459.67],
  ['degR', 5 / 9, temperature],
  ['L l', 1e-3, volume, 'prefix'],
  ['cc', 1e-6, volume],
  ['N', 1, force, 'prefix'],
  ['lbf', poundForce, force],
  ['Pa', 1, pressure, 'prefix'],
  ['bar', 1e5, pressure, 'prefix'],
  ['atm', standardAtmosphere, pressure],
  ['at', 98066.5, pressure],
  ['torr Torr', standardAtmosphere / 760, pressure],
  // Conventional millimetre of mercury.
  ['mmHg', 133.322387415, pressure],
  ['psi', poundForce / inch ** 2, pressure],
  ['J', 1, energy, 'prefix'],
  // Thermochemical calorie: what published rate constants and heats use.
  ['cal', 4.184, energy, 'prefix'],
  // International Table.
  ['Btu BTU', 1055.05585262, energy],
  ['Wh', 3600, energy, 'prefix'],
  ['W', 1, power, 'prefix'],
  ['P poise', 0.1, dynamicViscosity, 'prefix'],
  ['%', 0.01, dimensionless],
  ['ppm', 1e-6, dimensionless],
  ['ppb', 1e-9, dimensionless],
];

const prefixes: ReadonlyMap<string, number> = new Map([
  ['G', 1e9],
  ['M', 1e6],
  ['k', 1e3],
  ['h', 1e2],
  ['d', 1e-1],
  ['c', 1e-2],
  ['m', 1e-3],
  ['µ', 1e-6],
  ['μ', 1e-6],
  ['u', 1e-6],
  ['n', 1e-9],
  ['p', 1e-12],
]);

const units: ReadonlyMap<string, Unit> = new Map(
  rows.flatMap(([symbols, factor, dimension, takesPrefix, offset]) =>
    symbols.split(' ').map((symbol): [string, Unit] => [
      symbol,
      {
        symbol,
        factor,
        dimension,
        takesPrefix: takesPrefix === 'prefix',
        ...(offset !== undefined && { offset }),
      },
    ]),
  ),
);

/** Symbols of the table without prefixes, for suggestions and documentation. */
export const unitSymbols: readonly string[] = [...units.keys()];

/** The unit a symbol stands for, prefix included; undefined when there is none. */
export function findUnit(symbol: string): Unit | undefined {
  const plain = units.get(symbol);
  if (plain) return plain;
  const prefix = prefixes.get(symbol.slice(0, 1));
  const base = units.get(symbol.slice(1));
  if (prefix === undefined || !base?.takesPrefix) return undefined;
  return { symbol, factor: prefix * base.factor, dimension: base.dimension, takesPrefix: false };
}

/** Whether a symbol is a gauge pressure (`barg`, `psig`): recognised so that it can be refused with the right words. */
export function isGaugeUnit(symbol: string): boolean {
  return symbol === 'atü' || (symbol.endsWith('g') && isPressureUnit(symbol.slice(0, -1)));
}

/** Whether a symbol is a unit of pressure. */
export function isPressureUnit(symbol: string): boolean {
  const unit = findUnit(symbol);
  return unit !== undefined && sameDimension(unit.dimension, pressure);
}

/** Spellings in common use that are no symbols here, with the symbol that is. */
const otherSpellings: ReadonlyMap<string, string> = new Map(
  Object.entries({
    bara: 'bar',
    psia: 'psi',
    kpa: 'kPa',
    pa: 'Pa',
    ata: 'at',
    kelvin: 'K',
    c: 'degC',
    celsius: 'degC',
    f: 'degF',
    fahrenheit: 'degF',
    rankine: 'degR',
    sec: 's',
    second: 's',
    seconds: 's',
    minute: 'min',
    minutes: 'min',
    hour: 'h',
    hours: 'h',
    days: 'day',
    years: 'year',
    metre: 'm',
    meter: 'm',
    micron: 'um',
    inches: 'inch',
    feet: 'ft',
    mole: 'mol',
    moles: 'mol',
    gmol: 'mol',
    kgmol: 'kmol',
    lbs: 'lb',
    tonne: 't',
    tonnes: 't',
    litre: 'L',
    liter: 'L',
    joule: 'J',
    watt: 'W',
    pascal: 'Pa',
    percent: '%',
  }),
);

/** The symbol that an unknown spelling most likely means, for a message; undefined where none is near. */
export function nearestUnit(symbol: string): string | undefined {
  const lower = symbol.toLowerCase();
  const spelled = otherSpellings.get(lower);
  if (spelled !== undefined) return spelled;
  // A slip of capitals only, prefixes included: `KJ`, `Kg`. Two such readings (`mw`: mW or MW) are left to the reader.
  const sameLetters = [...units.values()].flatMap(({ symbol: base, takesPrefix }) =>
    (takesPrefix ? ['', ...prefixes.keys()] : [''])
      .map((prefix) => prefix + base)
      .filter((candidate) => candidate.toLowerCase() === lower),
  );
  if (sameLetters.length > 0) return sameLetters.length === 1 ? sameLetters[0] : undefined;
  return nearestName(symbol, unitSymbols);
}
