import type { ReactorSpecification } from '../../src/bed/reactor-specification.js';
import type { SpeciesRecord } from '../../src/properties/species-record.js';
import { readFormula } from './evaluate-formula.js';
import { constant, givenTransport, idealGas } from '../pellet/given-transport.js';

export interface PlainReactor {
  readonly species: readonly SpeciesRecord[];
  readonly reactions: readonly {
    readonly name: string;
    readonly stoichiometry: readonly number[];
    readonly law: string;
    /** J/mol */
    readonly heat?: number;
  }[];
  /** mol/s */
  readonly molarFlows: readonly number[];
  readonly temperature: number;
  readonly pressure: number;
  readonly tubeDiameter: number;
  readonly length: number;
  readonly voidFraction: number;
  readonly pelletDensity: number;
  readonly pelletDiameter?: number;
  readonly heat: ReactorSpecification['heat'];
  readonly heatCapacity?: ReactorSpecification['fluid']['heatCapacity'];
  /** Pa s; with it the pressure falls after Ergun. */
  readonly viscosity?: number;
  readonly targets?: ReactorSpecification['targets'];
}

/** A reactor whose pellets put up no resistance, as most published bed examples have it. */
export function plainReactor(plain: PlainReactor): ReactorSpecification {
  const speciesIds = plain.species.map((record) => record.id);
  const pelletDiameter = plain.pelletDiameter ?? 3e-3;
  return {
    title: 'published example',
    notes: '',
    species: plain.species,
    reactions: plain.reactions.map(({ name, stoichiometry, law, heat }) => ({
      name,
      equation: name,
      isReversible: false,
      stoichiometry,
      rate: readFormula(law, { speciesIds }),
      basis: 'catalyst_mass',
      ...(heat !== undefined && { heat: { value: heat } }),
    })),
    feed: { temperature: plain.temperature, pressure: plain.pressure, molarFlows: plain.molarFlows },
    fluid: idealGas(plain.species.length, {
      ...(plain.heatCapacity && { heatCapacity: plain.heatCapacity }),
      ...(plain.viscosity !== undefined && { viscosity: constant(plain.viscosity) }),
    }),
    pellet: {
      geometry: {
        diffusionLength: pelletDiameter / 6,
        shapeExponent: 2,
        sauterDiameter: pelletDiameter,
        description: 'sphere',
      },
      method: { kind: 'intrinsic' },
      density: plain.pelletDensity,
      activity: 1,
      transport: givenTransport({ diffusivities: plain.species.map(() => Infinity) }),
    },
    bed: {
      tubeDiameter: plain.tubeDiameter,
      tubes: 1,
      length: plain.length,
      voidFraction: plain.voidFraction,
      pressureDrop:
        plain.viscosity === undefined
          ? { kind: 'none' }
          : {
              kind: 'two_term',
              viscous: 150,
              inertial: 1.75,
              source: 'Ergun (1952), Chem. Eng. Prog. 48, 89',
            },
    },
    heat: plain.heat,
    limits: {},
    targets: plain.targets ?? [],
    output: { points: 51, pelletPositions: [], selectivities: [] },
    numerics: { tolerance: 1e-6 },
    assumptions: [],
  };
}
