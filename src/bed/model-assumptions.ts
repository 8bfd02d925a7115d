import type { Assumption, ReactorSpecification } from './reactor-specification.js';

interface ModelAssumption extends Assumption {
  readonly applies: (specification: ReactorSpecification) => boolean;
}

/** What the equations themselves take for granted, whatever the case says. */
const modelAssumptions: readonly ModelAssumption[] = [
  {
    about: 'model',
    statement:
      'steady one-dimensional plug flow: no axial or radial dispersion of heat or matter; one temperature across the tube, so that the centre line is hotter than shown wherever heat leaves through the wall',
    source: 'common practice (pseudo-one-dimensional heterogeneous bed)',
    applies: () => true,
  },
  {
    about: 'pellet',
    statement:
      'diffusivities and conductivity are constant within a pellet; fluxes follow Fick’s law for each species alone; total pressure in the pores equals that outside',
    source: 'common practice (effective diffusivities)',
    applies: ({ pellet }) => pellet.method.kind === 'full' || pellet.method.kind === 'thiele',
  },
  {
    about: 'pellet.method',
    statement:
      'effectiveness by the generalised modulus: each reaction alone, pellet interior at the surface temperature; an approximation for several reactions and for orders other than one',
    source: 'Bischoff (1965), AIChE J. 11, 351',
    applies: ({ pellet }) => pellet.method.kind === 'thiele',
  },
  {
    about: 'pellet.method',
    statement:
      'given effectiveness factors multiply the rates at bulk conditions; film and pore resistance are not computed',
    source: 'case: pellet.method',
    applies: ({ pellet }) => pellet.method.kind === 'fixed',
  },
  {
    about: 'pellet.method',
    statement: 'no resistance in film or pores: rates at bulk conditions hold throughout the pellet',
    source: 'case: pellet.method',
    applies: ({ pellet }) => pellet.method.kind === 'intrinsic',
  },
  {
    about: 'bed.pressure_drop',
    statement:
      'static head is not counted; friction is taken with the local density and the pellet’s Sauter diameter (six times volume over surface)',
    source: 'Ergun (1952), Chem. Eng. Prog. 48, 89',
    applies: ({ bed }) => bed.pressureDrop.kind !== 'none',
  },
  {
    about: 'bed.pressure_drop',
    statement: 'pressure is constant along the bed',
    source: 'case: bed.pressure_drop',
    applies: ({ bed }) => bed.pressureDrop.kind === 'none',
  },
  {
    about: 'reactions.heat',
    statement:
      'given heats of reaction hold at the feed temperature unless a temperature stands beside them; elsewhere they follow the heat capacity in use (Kirchhoff)',
    source: 'thermodynamic consistency with one heat content of the mixture',
    applies: ({ reactions, heat }) =>
      heat.mode !== 'isothermal' && reactions.some((reaction) => reaction.heat),
  },
];

export function collectAssumptions(specification: ReactorSpecification): Assumption[] {
  const own = modelAssumptions.flatMap(({ about, statement, source, applies }) =>
    applies(specification) ? [{ about, statement, source }] : [],
  );
  return [...specification.assumptions, ...own];
}
