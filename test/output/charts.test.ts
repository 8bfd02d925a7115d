import { describe, expect, it } from 'vitest';
import { solveReactor } from '../../src/bed/solve-reactor.js';
import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import { chartTable } from '../../src/output/charts/chart-table.js';
import { spread } from '../../src/output/charts/labels-plugin.js';
import { lineChart, pointsOf } from '../../src/output/charts/line-chart.js';
import { createChartRenderer } from '../../src/output/charts/render-chart.js';
import { lineStyles } from '../../src/output/charts/theme.js';
import { cooledOxidation } from '../bed/cooled-oxidation.js';

const specification = cooledOxidation({
  limits: { temperature: 700, pressureDrop: 5e4 },
  targets: [{ speciesIndex: 0, conversion: 0.8 }],
});
const result = solveReactor(specification);

type Configuration = ReturnType<(typeof chartTable)[number]['configuration']>;

function chart(fileName: string, of: ReactorSpecification = specification): Configuration {
  return chartTable.find((record) => record.fileName === fileName)!.configuration(result, of);
}

function labels(configuration: Configuration): (string | undefined)[] {
  return configuration.data.datasets.map(({ label }) => label);
}

/** Text of an axis title. */
function axisTitle(configuration: Configuration, axis: 'x' | 'y'): unknown {
  const scale = configuration.options!.scales![axis] as { title: { text: string } };
  return scale.title.text;
}

describe('charts as data', () => {
  it('all of them apply to a cooled full-pellet bed, and name quantity and unit on both axes', () => {
    const applying = chartTable.filter(({ applies }) => applies(result, specification));
    expect(applying.map(({ fileName }) => fileName)).toEqual([
      'temperature.png',
      'conversion.png',
      'mole-fractions.png',
      'pressure.png',
      'effectiveness.png',
      'pellet-interior.png',
      'pellet-temperature.png',
    ]);
    expect(axisTitle(chart('temperature.png'), 'x')).toBe('Position along the bed / m');
    expect(axisTitle(chart('temperature.png'), 'y')).toBe('Temperature / K');
    expect(axisTitle(chart('conversion.png'), 'y')).toBe('Conversion / %');
    expect(axisTitle(chart('pressure.png'), 'y')).toBe('Pressure / bar');
  });

  it('an isothermal bed without friction and pellet model has two', () => {
    const plain: ReactorSpecification = {
      ...specification,
      heat: { mode: 'isothermal' },
      bed: { ...specification.bed, pressureDrop: { kind: 'none' } },
      pellet: { ...specification.pellet, method: { kind: 'intrinsic' } },
    };
    const applying = chartTable.filter(({ applies }) => applies(result, plain));
    expect(applying.map(({ fileName }) => fileName)).toEqual(['conversion.png', 'mole-fractions.png']);
  });

  it('temperature: gas, pellet centre, coolant, and the limit only where one is set', () => {
    expect(labels(chart('temperature.png'))).toEqual([
      'gas',
      'pellet centre',
      'coolant',
      'limit you set, 700 K',
    ]);
    expect(labels(chart('temperature.png', { ...specification, limits: {} }))).toEqual([
      'gas',
      'pellet centre',
      'coolant',
    ]);
  });

  it('temperature: the gas line passes through the peak itself', () => {
    const gas = chart('temperature.png').data.datasets[0]!.data;
    expect(gas).toContainEqual({ x: result.peak.position, y: result.peak.temperature });
    expect(gas.map(({ x }) => x)).toEqual([...gas.map(({ x }) => x)].sort((a, b) => a - b));
  });

  it('conversion: percent of what was fed, from 0, with the target', () => {
    const { datasets } = chart('conversion.png').data;
    const points = datasets[0]!.data;
    expect(points[0]!.y).toBe(0);
    expect(points.at(-1)!.y).toBeCloseTo(100 * result.conversions[0]!.value, 10);
    expect(datasets.at(-1)!.label).toBe('target for A, 80 %');
  });

  it('mole fractions: reacting species, a logarithmic axis where they spread, the inert named as left out', () => {
    const configuration = chart('mole-fractions.png');
    expect(labels(configuration)).toEqual(['A', 'P', 'O2', 'H2O', 'CO2']);
    expect(configuration.options!.scales!['y']!.type).toBe('logarithmic');
    expect((configuration.options!.plugins!.subtitle as { text: string }).text).toMatch(
      /^Without inert N2\. /,
    );
  });

  it('effectiveness: a reaction whose fuel is not there yet has a gap, not a point', () => {
    const overburn = chart('effectiveness.png').data.datasets[2]!.data;
    expect(overburn[0]!.y).toBeNull();
    expect(overburn[1]!.y).toBeGreaterThan(0);
  });

  it('every line of a chart differs in colour and in dash', () => {
    expect(new Set(lineStyles.map(({ colour }) => colour)).size).toBe(lineStyles.length);
    expect(new Set(lineStyles.map(({ dash }) => dash.join())).size).toBe(lineStyles.length);
  });

  it('titles are clipped and control characters shown', () => {
    const configuration = chart('pressure.png', { ...specification, title: `\u001b[31m${'x'.repeat(300)}` });
    const { text } = configuration.options!.plugins!.subtitle as { text: string };
    expect(text).toMatch(/^<U\+001B>\[31mx+…$/);
    expect(text.length).toBeLessThan(120);
  });

  it('NaN becomes a gap', () => {
    expect(pointsOf([0, 1], [Number.NaN, 2], 10)).toEqual([
      { x: 0, y: null },
      { x: 1, y: 20 },
    ]);
  });
});

describe('labels at line ends', () => {
  it('are moved apart and stay inside', () => {
    expect(spread([100, 101, 300], 0, 400)).toEqual([100, 117, 300]);
    expect(spread([390, 395, 399], 0, 400)).toEqual([366, 383, 400]);
    expect(spread([], 0, 400)).toEqual([]);
  });
});

describe('rendering', () => {
  const render = createChartRenderer();
  const small = (title: string): Uint8Array =>
    render(
      lineChart({
        title,
        subtitle: '',
        xTitle: 'x / m',
        yTitle: 'y',
        series: [{ label: 'line', points: pointsOf([0, 1, 2], [1, 3, 2]) }],
      }),
    );
  const size = (png: Uint8Array): [number, number] => {
    const view = new DataView(png.buffer, png.byteOffset);
    return [view.getUint32(16), view.getUint32(20)];
  };

  it('gives PNG at twice the nominal size', () => {
    const png = small('title');
    expect([...png.subarray(0, 8)]).toEqual([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
    expect(size(png)).toEqual([1600, 1000]);
  });

  it('draws text: another title is another picture, the same title the same', () => {
    expect(Buffer.compare(small('one'), small('two'))).not.toBe(0);
    expect(Buffer.compare(small('one'), small('one'))).toBe(0);
  });

  it('draws every chart of a run', () => {
    for (const { configuration } of chartTable) {
      // An empty canvas of this size packs to less than ten kilobytes.
      expect(render(configuration(result, specification)).length).toBeGreaterThan(2e4);
    }
  });
});
