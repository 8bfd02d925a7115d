/**
 * What estimating properties costs: one reactor with everything estimated along the bed, and the same with the numbers of its inlet typed in,
 * for an ideal and for a real gas. Read the ratios, as built; work counts are printed beside the times.
 */
import { readFileSync } from 'node:fs';
import { bench, describe } from 'vitest';
import type { ReactorSpecification, RunResult } from '../../src/index.js';

const built = new URL('../../dist/index.js', import.meta.url);
const { readCase, solveReactor } = (await import(built.href)) as typeof import('../../src/index.js');

const text = readFileSync(new URL('../../cases/ammonia-bed.yaml', import.meta.url), 'utf8');
const constant = (value: number): { kind: 'constant'; value: number } => ({ kind: 'constant', value });
const solve = (specification: ReactorSpecification): RunResult =>
  solveReactor(specification, { withEquilibrium: false });

/** The estimates of the inlet as constants. */
function typedIn(specification: ReactorSpecification): ReactorSpecification {
  const inlet = solve(specification).transport.find(({ label }) => label === 'inlet')!;
  const each = (
    of: (entry: (typeof inlet.species)[number]) => number | null,
  ): { kind: 'constant'; value: number }[] =>
    specification.species.map((_record, i) => {
      const entry = inlet.species.find(({ speciesIndex }) => speciesIndex === i);
      return constant((entry && of(entry)) ?? Infinity);
    });
  return {
    ...specification,
    fluid: { ...specification.fluid, viscosity: constant(inlet.viscosity!) },
    pellet: {
      ...specification.pellet,
      transport: {
        effectiveDiffusivities: each((entry) => entry.effectiveDiffusivity),
        thermalConductivity: constant(inlet.pelletConductivity!),
        film: {
          kind: 'given',
          massTransfer: each((entry) => entry.filmMassTransfer),
          heatTransfer: constant(inlet.filmHeatTransfer!),
        },
      },
    },
  };
}

for (const [name, equation] of [
  ['ideal gas', 'ideal'],
  ['Peng–Robinson', 'peng_robinson'],
] as const) {
  describe(`ammonia bed, ${name}`, () => {
    const estimated = readCase(text.replace('peng_robinson', equation), name).specification;
    const typed = typedIn(estimated);
    console.log(name, 'estimated', JSON.stringify(solve(estimated).work));
    console.log(name, 'typed in', JSON.stringify(solve(typed).work));
    // Both compiled before either is timed.
    for (let run = 0; run < 60; run++) [estimated, typed].forEach(solve);
    const options = { time: 2000 };
    bench('properties estimated along the bed', () => void solve(estimated), options);
    bench('the same numbers typed in', () => void solve(typed), options);
  });
}
