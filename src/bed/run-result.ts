import type { PoreRegime } from '../pellet/pores/pore-regimes.js';
import type { Assumption } from './reactor-specification.js';

/** Why a run ended before the end of the bed. Texts for each stand in `bed/stop-messages.ts`. */
export type StopReason =
  | 'pressure_used_up'
  | 'property_range_left'
  | 'condensation'
  | 'no_pellet_state'
  | 'reactant_overdrawn'
  | 'step_limit'
  | 'rate_not_finite';

export interface RunStop {
  readonly reason: StopReason;
  /** m from the inlet */
  readonly position: number;
  /** One or two sentences for the user: what happened and what can be done. */
  readonly message: string;
}

/** Columns along the bed, one entry per output position; SI. Species and reactions in case order. */
export interface Profile {
  /** m */
  readonly positions: Float64Array;
  /** K, bulk fluid */
  readonly temperatures: Float64Array;
  /** Pa */
  readonly pressures: Float64Array;
  /** K; absent where nothing is cooled. */
  readonly coolantTemperatures?: Float64Array;
  /** kg/m³, bulk fluid */
  readonly densities: Float64Array;
  /** P v / (R T); absent for an ideal gas. */
  readonly compressibilityFactors?: Float64Array;
  /** Pa s; absent where nothing needs it. */
  readonly viscosities?: Float64Array;
  /** mol/s, whole reactor; one column per species. */
  readonly molarFlows: readonly Float64Array[];
  readonly moleFractions: readonly Float64Array[];
  /** mol/(kg s): averaged over the pellet, per catalyst mass; one column per reaction. */
  readonly rates: readonly Float64Array[];
  /** Averaged rate over the rate at bulk conditions; NaN where the latter is not told from zero (no reactant yet, equilibrium). One column per reaction. */
  readonly effectiveness: readonly Float64Array[];
  /** K */
  readonly surfaceTemperatures: Float64Array;
  /** K */
  readonly centreTemperatures: Float64Array;
}

/** How near one reaction is to its equilibrium along the bed. */
export interface ReactionApproach {
  readonly reactionIndex: number;
  /** Reaction quotient over equilibrium constant: 0 far from equilibrium, 1 at it; NaN where neither is a number. */
  readonly quotientRatios: Float64Array;
  /** K, temperature of the gas less that at which its composition would be at equilibrium; NaN where there is none. */
  readonly temperatureApproaches: Float64Array;
}

/** Equilibrium of the reactions written as reversible whose constants follow from the species' data. */
export interface EquilibriumLine {
  readonly approaches: readonly ReactionApproach[];
  /** What conversions would be if all those reactions came to equilibrium at the temperature and pressure of the position. */
  readonly conversions: readonly EquilibriumConversion[];
  /** Where the feed comes to equilibrium without exchange of heat, at its pressure; absent where that lies outside the species' data. */
  readonly adiabatic?: {
    /** K */
    readonly temperature: number;
    readonly moleFractions: readonly number[];
    readonly conversions: readonly { readonly speciesIndex: number; readonly value: number }[];
  };
}

export interface EquilibriumConversion {
  readonly speciesIndex: number;
  readonly values: Float64Array;
}

/** Properties of the fluid, the film and the pellet at one position; SI, `null` where nothing needs a property. */
export interface TransportReport {
  readonly label: 'inlet' | 'outlet';
  /** m from the inlet */
  readonly position: number;
  readonly density: number;
  readonly compressibilityFactor: number;
  readonly viscosity: number | null;
  readonly thermalConductivity: number | null;
  /** W/(m K) and W/(m² K) */
  readonly pelletConductivity: number | null;
  readonly filmHeatTransfer: number | null;
  /** One per species that takes part in a reaction. */
  readonly species: readonly SpeciesTransport[];
}

export interface SpeciesTransport {
  readonly speciesIndex: number;
  /** m²/s, in the mixture */
  readonly diffusivity: number | null;
  readonly effectiveDiffusivity: number | null;
  /** m/s */
  readonly filmMassTransfer: number | null;
  readonly fugacityCoefficient: number;
  /** What controls its diffusion in each size of pore; empty where diffusion in the pores is given. */
  readonly pores: readonly PoreRegime[];
}

/** Inside of one pellet, from the centre to the surface; SI. */
export interface PelletProfile {
  readonly label: 'inlet' | 'hottest' | 'outlet' | 'requested';
  /** m from the inlet */
  readonly position: number;
  /** 0 centre to 1 surface */
  readonly relativeRadii: Float64Array;
  /** mol/m³, one array per species */
  readonly concentrations: readonly Float64Array[];
  /** K */
  readonly temperatures: Float64Array;
  /** Bulk conditions outside the film. */
  readonly bulkConcentrations: readonly number[];
  readonly bulkTemperature: number;
}

export type RunEventKind =
  | 'temperature_limit_crossed'
  | 'pressure_drop_limit_crossed'
  | 'target_conversion_reached'
  | 'peak_temperature'
  | RunStop['reason'];

export interface RunEvent {
  readonly kind: RunEventKind;
  /** m from the inlet */
  readonly position: number;
  readonly message: string;
}

/** A dimensionless or temperature-like figure that engineers judge a pellet or bed by. */
export interface DimensionlessGroup {
  /** Trade name, e.g. `Thiele modulus`. */
  readonly name: string;
  /** Reaction or species it belongs to; absent for the bed as a whole. */
  readonly of?: string;
  readonly value: number;
  /** `1` for dimensionless, else SI. */
  readonly unit: string;
  /** Definition in words and symbols. */
  readonly definition: string;
  readonly source: string;
}

export interface EffectivenessSummary {
  readonly inlet: number | null;
  readonly outlet: number | null;
  /** Weighted by the bulk rate along the bed: total averaged rate over total rate at bulk conditions. */
  readonly mean: number | null;
}

export interface RunResult {
  readonly status: 'complete' | 'stopped';
  readonly stop?: RunStop;
  readonly speciesIds: readonly string[];
  readonly reactionNames: readonly string[];
  readonly profile: Profile;
  readonly pellets: readonly PelletProfile[];
  readonly transport: readonly TransportReport[];
  /** Absent where no reaction is reversible. */
  readonly equilibrium?: EquilibriumLine;
  readonly outlet: {
    /** m; the bed's length, or where the run stopped. */
    readonly position: number;
    readonly temperature: number;
    readonly pressure: number;
    /** mol/s, whole reactor */
    readonly molarFlows: readonly number[];
    readonly moleFractions: readonly number[];
  };
  /** Of every species that is fed and of which less leaves; NaN never. */
  readonly conversions: readonly { readonly speciesIndex: number; readonly value: number }[];
  readonly selectivities: readonly {
    readonly productIndex: number;
    readonly reactantIndex: number;
    readonly selectivity: number | null;
    readonly yield: number;
  }[];
  readonly peak: { readonly temperature: number; readonly position: number };
  /** Pa */
  readonly pressureDrop: number;
  /** W taken from the bed, whole reactor; negative when it is heated; null in an isothermal bed whose heats of reaction are unknown. */
  readonly heatRemoved: number | null;
  /** kg, whole reactor */
  readonly catalystMass: number;
  readonly effectiveness: readonly EffectivenessSummary[];
  /** Relative closure, worst along the bed: |in - out| over what is in. */
  readonly balances: {
    readonly mass: number;
    readonly elements: Readonly<Record<string, number>>;
    readonly energy: number;
  };
  /** At the inlet. */
  readonly groups: readonly DimensionlessGroup[];
  readonly events: readonly RunEvent[];
  readonly warnings: readonly string[];
  readonly assumptions: readonly Assumption[];
  readonly work: {
    readonly steps: number;
    readonly rejectedSteps: number;
    readonly rightHandSides: number;
    readonly jacobians: number;
    readonly pelletSolves: number;
    readonly pelletIterations: number;
    readonly pelletFactorisations: number;
    readonly rateEvaluations: number;
    readonly largestPelletPoints: number;
  };
}
