/** What estimates need of the species, asked for only where an estimate is made; and what they take for granted. */
import { activeSpecies, neededProperties } from '../../bed/needed-properties.js';
import type { Assumption, ReactorSpecification } from '../../bed/reactor-specification.js';
import { filmCorrelations } from '../../pellet/film/film-correlations.js';
import { missingForEquation } from '../../properties/equation-of-state/create-equation-of-state.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { missingForDiffusivity } from '../../properties/transport/binary-diffusivity.js';
import { missingForPressureCorrection } from '../../properties/transport/pseudo-critical.js';
import { missingForConductivity } from '../../properties/transport/pure-gas-conductivity.js';
import { missingForViscosity } from '../../properties/transport/pure-gas-viscosity.js';
import { transportMethods } from '../../properties/transport/transport-methods.js';
import type { CaseContext } from '../case-context.js';
import { equationEstimate, reportMissing } from './report-missing.js';

/** One estimate of a case: whose data it needs, and what there is to say of it. */
interface Estimate {
  /** Case path. */
  readonly about: string;
  readonly what: string;
  readonly missing: (record: SpeciesRecord) => readonly (keyof SpeciesRecord)[];
  /** A way around the estimate. */
  readonly mend: string;
  readonly assumptions: readonly Omit<Assumption, 'about'>[];
}

/** False where a species lacks what an estimate needs; otherwise every estimate is among the assumptions. */
export function checkEstimates(
  context: CaseContext,
  specification: ReactorSpecification,
  assumptions: Assumption[],
): boolean {
  const { species, feed } = specification;
  const isActive = activeSpecies(specification);
  const isPresent = species.map((_record, i) => isActive[i]! || feed.molarFlows[i]! > 0);
  const reported = new Set<string>();
  for (const estimate of estimatesOf(specification, isActive)) {
    species.forEach((record, i) => {
      if (!isPresent[i]) return;
      for (const field of estimate.missing(record)) {
        const key = `${record.id} ${field}`;
        if (reported.has(key)) continue;
        reported.add(key);
        reportMissing(context, record, field, estimate.what, estimate.mend);
      }
    });
    assumptions.push(...estimate.assumptions.map((entry) => ({ about: estimate.about, ...entry })));
  }
  return reported.size === 0;
}

function estimatesOf(specification: ReactorSpecification, isActive: readonly boolean[]): Estimate[] {
  const { fluid, pellet } = specification;
  const needed = neededProperties({ ...specification, isActive });
  const estimates: Estimate[] = [];
  const isViscosityEstimated = needed.viscosity && fluid.viscosity.kind === 'estimate';
  const isConductivityEstimated = needed.thermalConductivity && fluid.thermalConductivity.kind === 'estimate';
  const isDiffusivityEstimated = fluid.diffusivities.some(
    (property, i) => needed.diffusivities[i] && property.kind === 'estimate',
  );
  if (fluid.equationOfState.kind !== 'ideal') {
    estimates.push({
      about: 'fluid.equation_of_state',
      ...equationEstimate,
      missing: (record) => missingForEquation(fluid.equationOfState, record),
      assumptions: [],
    });
  }
  if (isViscosityEstimated) {
    estimates.push({
      about: 'fluid.viscosity',
      what: 'the viscosity of the mixture',
      missing: missingForViscosity,
      mend: 'give `viscosity` under `fluid`',
      assumptions: [transportMethods.viscosity],
    });
  }
  if (isConductivityEstimated) {
    estimates.push({
      about: 'fluid.thermal_conductivity',
      what: 'the thermal conductivity of the mixture',
      missing: missingForConductivity,
      mend: 'give `thermal_conductivity` under `fluid`',
      assumptions: [transportMethods.conductivity],
    });
  }
  if (isDiffusivityEstimated) {
    estimates.push({
      about: 'fluid.diffusivity',
      what: 'its diffusivity in the mixture',
      missing: missingForDiffusivity,
      mend: 'give `diffusivity` under `fluid` for all species',
      assumptions: [transportMethods.binaryDiffusivity, transportMethods[fluid.diffusivityMixing]],
    });
  }
  if (
    (isViscosityEstimated || isConductivityEstimated || isDiffusivityEstimated) &&
    fluid.isCorrectedForPressure
  ) {
    estimates.push({
      about: 'fluid.pressure_correction',
      what: 'the effect of pressure on transport properties',
      missing: missingForPressureCorrection,
      mend: 'write `pressure_correction: false` under `fluid`',
      assumptions: [
        ...(isViscosityEstimated ? [transportMethods.viscosityAtPressure] : []),
        ...(isConductivityEstimated ? [transportMethods.conductivityAtPressure] : []),
        ...(isDiffusivityEstimated ? [transportMethods.diffusivityAtPressure] : []),
      ],
    });
  }
  return [...estimates, ...pelletEstimates(pellet, isActive)];
}

function pelletEstimates(
  { transport }: ReactorSpecification['pellet'],
  isActive: readonly boolean[],
): Estimate[] {
  const estimates: Estimate[] = [];
  const { pores, thermalConductivity, film, effectiveDiffusivities } = transport;
  if (pores && effectiveDiffusivities.some((property, i) => isActive[i] && property.kind === 'estimate')) {
    estimates.push({
      about: 'pellet.effective_diffusivity',
      what: 'its effective diffusivity',
      missing: ({ lennardJones, criticalVolume }) =>
        pores.hindrance === 'none' || lennardJones || criticalVolume !== undefined ? [] : ['criticalVolume'],
      mend: 'give `effective_diffusivity` under `pellet`',
      assumptions: [
        transportMethods.pores,
        transportMethods[pores.model],
        ...(pores.hindrance === 'renkin' ? [transportMethods.renkin] : []),
      ],
    });
  }
  if (thermalConductivity.kind === 'phases') {
    estimates.push({
      about: 'pellet.thermal_conductivity',
      what: 'the conductivity of the pellet',
      missing: () => [],
      mend: '',
      assumptions: [transportMethods.pelletConductivity],
    });
  }
  if (film.kind === 'correlation') {
    const { name, source, reynoldsRange, scatter } = filmCorrelations[film.name];
    estimates.push({
      about: 'pellet.film',
      what: 'the film',
      missing: () => [],
      mend: '',
      assumptions: [
        {
          statement: `film coefficients of mass and heat after ${name}, each species with its own Schmidt number; Reynolds number (of the Sauter diameter and the superficial velocity) from ${reynoldsRange[0]} to ${reynoldsRange[1]}, scatter ${scatter}; no correction for drift`,
          source,
        },
      ],
    });
  }
  return estimates;
}
