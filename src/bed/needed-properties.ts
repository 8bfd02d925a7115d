import type { ReactorSpecification } from './reactor-specification.js';

/** Which properties of the fluid a reactor's equations use at all. */
export interface NeededProperties {
  readonly viscosity: boolean;
  readonly thermalConductivity: boolean;
  /** Diffusivity in the mixture, one per species. */
  readonly diffusivities: readonly boolean[];
}

type Parts = Pick<ReactorSpecification, 'pellet' | 'heat'> & {
  readonly bed: Pick<ReactorSpecification['bed'], 'pressureDrop'>;
  /** True for species that take part in a reaction. */
  readonly isActive: readonly boolean[];
};

export function neededProperties({ pellet, bed, heat, isActive }: Parts): NeededProperties {
  const { effectiveDiffusivities, thermalConductivity, film } = pellet.transport;
  const hasCorrelation = film.kind === 'correlation';
  return {
    viscosity: bed.pressureDrop.kind !== 'none' || hasCorrelation,
    thermalConductivity:
      thermalConductivity.kind === 'phases' || (hasCorrelation && heat.mode !== 'isothermal'),
    diffusivities: isActive.map(
      (active, i) => active && (hasCorrelation || effectiveDiffusivities[i]!.kind === 'estimate'),
    ),
  };
}

/** Which species take part in any reaction, in case order. */
export function activeSpecies({
  species,
  reactions,
}: Pick<ReactorSpecification, 'species' | 'reactions'>): boolean[] {
  return species.map((_record, i) => reactions.some(({ stoichiometry }) => stoichiometry[i] !== 0));
}
