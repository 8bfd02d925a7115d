import Table from 'cli-table3';
import pc from 'picocolors';
import type { ReactorSpecification } from '../bed/reactor-specification.js';
import type { RunResult } from '../bed/run-result.js';
import { visibleText } from '../diagnostics/format-problem.js';
import { caution } from './caution.js';

type Row = readonly [name: string, value: string];

const zeroCelsius = 273.15;
/** Characters in a line of prose. */
const lineWidth = 100;

/** What a run came to, for a person at a terminal: key figures, events, warnings, and last the caution. */
export function terminalReport(
  result: RunResult,
  specification: ReactorSpecification,
  useColour: boolean,
): string {
  const colour = pc.createColors(useColour);
  const sections = [
    colour.bold(visibleText(specification.title)),
    ...(result.stop
      ? [colour.red(wrap(`Stopped at ${metres(result.stop.position)}: ${result.stop.message}`, lineWidth))]
      : []),
    table(keyFigures(result, specification)),
    ...list('Along the bed', result.events, ({ position, message }) => `${metres(position)}: ${message}`),
    `The assumptions made, ${result.assumptions.length} in number, are listed in summary.json.`,
    ...list('Warnings', result.warnings, visibleText, colour.yellow),
    colour.dim(wrap(caution, lineWidth)),
  ];
  return sections.join('\n\n');
}

/** Rows of name and value. */
export function keyFigures(result: RunResult, specification: ReactorSpecification): readonly Row[] {
  const { speciesIds, reactionNames, outlet, peak } = result;
  const rows: Row[] = [
    [result.stop ? 'temperature where stopped' : 'outlet temperature', temperature(outlet.temperature)],
    [
      result.stop ? 'pressure where stopped' : 'outlet pressure',
      `${significant(outlet.pressure / 1e5, 5)} bar`,
    ],
    ['pressure drop', `${significant(result.pressureDrop / 1e5, 3)} bar`],
  ];
  if (specification.heat.mode !== 'isothermal') {
    rows.push(['peak temperature', `${temperature(peak.temperature)} at ${metres(peak.position)}`]);
  }
  for (const { speciesIndex, value } of result.conversions) {
    rows.push([`conversion of ${speciesIds[speciesIndex]!}`, percent(value)]);
  }
  for (const { productIndex, reactantIndex, selectivity, yield: gained } of result.selectivities) {
    const name = `${speciesIds[productIndex]!} from ${speciesIds[reactantIndex]!}`;
    rows.push([
      `selectivity and yield, ${name}`,
      `${selectivity === null ? 'none' : percent(selectivity)}, ${percent(gained)}`,
    ]);
  }
  for (const { reactionIndex, temperatureApproaches } of result.equilibrium?.approaches ?? []) {
    const approach = temperatureApproaches.at(-1)!;
    if (!Number.isFinite(approach)) continue;
    rows.push([
      `approach to equilibrium, ${reactionNames[reactionIndex]!}`,
      `${approach.toFixed(1).replace(/^-0\.0$/, '0.0')} K`,
    ]);
  }
  const adiabatic = result.equilibrium?.adiabatic;
  if (adiabatic && specification.heat.mode === 'adiabatic') {
    const reached = adiabatic.conversions.map(
      ({ speciesIndex, value }) => `${percent(value)} of ${speciesIds[speciesIndex]!}`,
    );
    rows.push(['adiabatic equilibrium', [temperature(adiabatic.temperature), ...reached].join(', ')]);
  }
  result.effectiveness.forEach(({ inlet, mean, outlet: out }, j) => {
    const values = [inlet, mean, out].map((value) => (value === null ? '–' : significant(value, 3)));
    rows.push([
      `effectiveness of ${reactionNames[j]!}`,
      `${values.join(' / ')}  inlet / mean / ${result.stop ? 'where stopped' : 'outlet'}`,
    ]);
  });
  if (result.heatRemoved !== null && specification.heat.mode !== 'adiabatic') {
    rows.push(['heat removed', `${significant(result.heatRemoved / 1e3, 4)} kW`]);
  }
  rows.push(['catalyst mass', `${significant(result.catalystMass, 4)} kg`]);
  const elements = Object.values(result.balances.elements);
  const closures = [`mass ${exponent(result.balances.mass)}`];
  if (elements.length > 0) closures.push(`elements ${exponent(Math.max(...elements))}`);
  if (specification.heat.mode !== 'isothermal') closures.push(`energy ${exponent(result.balances.energy)}`);
  rows.push(['balances close to', closures.join(', ')]);
  const { work } = result;
  rows.push(['work', `${work.steps} axial steps, ${work.pelletSolves} pellet solutions`]);
  return rows;
}

/** Two columns without borders. */
export function table(rows: readonly Row[]): string {
  const none = '';
  const output = new Table({
    chars: {
      top: none,
      'top-mid': none,
      'top-left': none,
      'top-right': none,
      bottom: none,
      'bottom-mid': none,
      'bottom-left': none,
      'bottom-right': none,
      left: none,
      'left-mid': none,
      mid: none,
      'mid-mid': none,
      right: none,
      'right-mid': none,
      middle: '  ',
    },
    style: { 'padding-left': 0, 'padding-right': 0, head: [], border: [] },
  });
  output.push(...rows.map(([name, value]) => [visibleText(name), visibleText(value)]));
  return output
    .toString()
    .split('\n')
    .map((line) => `  ${line.trimEnd()}`)
    .join('\n');
}

/** A heading and entries with a dash, wrapped; nothing at all where there are none. */
function list<Entry>(
  heading: string,
  entries: readonly Entry[],
  text: (entry: Entry) => string,
  paint: (text: string) => string = String,
): string[] {
  if (entries.length === 0) return [];
  return [[heading, ...entries.map((entry) => paint(bullet(text(entry))))].join('\n')];
}

/** One entry of a list: a dash, then lines indented alike. */
export function bullet(text: string): string {
  return `  - ${wrap(text, lineWidth - 4).replaceAll('\n', '\n    ')}`;
}

/** Breaks at spaces. */
export function wrap(text: string, width: number): string {
  const lines = [''];
  for (const word of text.split(' ')) {
    const last = lines.at(-1)!;
    if (last.length > 0 && last.length + 1 + word.length > width) lines.push(word);
    else lines[lines.length - 1] = last === '' ? word : `${last} ${word}`;
  }
  return lines.join('\n');
}

/** Plain notation where it is short, else an exponent; a dash for what is no number. */
export function significant(value: number, digits: number): string {
  if (!Number.isFinite(value)) return '–';
  if (value === 0) return '0';
  const magnitude = Math.abs(value);
  if (magnitude >= 1e6 || magnitude < 1e-3) return value.toExponential(digits - 1);
  return String(Number(value.toPrecision(digits)));
}

function temperature(value: number): string {
  return `${value.toFixed(1)} K (${(value - zeroCelsius).toFixed(1)} °C)`;
}

function metres(value: number): string {
  return `${significant(value, 4)} m`;
}

function percent(value: number): string {
  return `${significant(100 * value, 4)} %`;
}

function exponent(value: number): string {
  return value === 0 ? '0' : value.toExponential(0);
}
