/**
 * Who may import whom under src/. Folders are listed from the bottom up; each may import itself and those above it in this list,
 * and of packages only what stands beside it. `DEVELOPERS.md` repeats the table and is compared with it.
 */
export interface FolderRule {
  readonly folder: string;
  readonly holds: string;
  readonly packages: readonly string[];
}

export const importTable: readonly FolderRule[] = [
  {
    folder: 'diagnostics',
    holds: 'faults and problems as records, and the text made from them',
    packages: ['fastest-levenshtein'],
  },
  {
    folder: 'numerics',
    holds:
      'linear algebra, quadrature, roots, the stiff integrator, the diffusion operator; knows no chemistry',
    packages: ['ml-matrix'],
  },
  {
    folder: 'quantities',
    holds: 'dimensions, units, text with a unit to SI, constants of nature',
    packages: [],
  },
  {
    folder: 'expressions',
    holds: 'formulas: text to a checked tree, derivatives, generated code',
    packages: ['mathjs'],
  },
  {
    folder: 'properties',
    holds: 'species data, thermochemistry, equilibrium, equations of state, transport properties',
    packages: [],
  },
  {
    folder: 'kinetics',
    holds: 'reaction equations, element balance, rate laws compiled, independent reactions',
    packages: ['ml-matrix'],
  },
  { folder: 'pellet', holds: 'shapes, pores, reaction and diffusion in one pellet, film', packages: [] },
  { folder: 'bed', holds: 'axial balances, friction, heat, events, the result', packages: [] },
  {
    folder: 'case',
    holds: 'case files: YAML, schema, checks, building the specification',
    packages: ['yaml', 'zod'],
  },
  {
    folder: 'output',
    holds: 'result to text, tables, CSV, charts',
    packages: [
      'canvas',
      'chart.js',
      'chartjs-node-canvas',
      'cli-table3',
      'csv-stringify',
      'dejavu-fonts-ttf',
      'picocolors',
    ],
  },
  {
    folder: 'cli',
    holds: 'commands, files, exit status; alone touches process, console and the file system',
    packages: ['picocolors', 'yargs'],
  },
];
