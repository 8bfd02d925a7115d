/** Dimensionless groups at the inlet: what engineers judge a pellet and a bed by before running it. */
import { firstOrderEffectiveness } from '../pellet/closed-form-effectiveness.js';
import type { Balances } from './balances.js';
import type { ReactorModel } from './reactor-model.js';
import type { DimensionlessGroup } from './run-result.js';

export function inletGroups(model: ReactorModel, balances: Balances): DimensionlessGroup[] {
  balances.unpack(balances.initialState);
  return [
    ...bedGroups(model),
    ...model.specification.reactions.flatMap((_reaction, j) => reactionGroups(model, balances, j)),
  ];
}

function bedGroups(model: ReactorModel): DimensionlessGroup[] {
  const { specification, massFlux, solidFraction } = model;
  const { bed, pellet } = specification;
  const diameter = pellet.geometry.sauterDiameter;
  const groups: DimensionlessGroup[] = [
    {
      name: 'tube-to-pellet diameter ratio',
      value: bed.tubeDiameter / diameter,
      unit: '1',
      definition: 'tube diameter over Sauter diameter of the pellet, D/d',
      source: 'common practice',
    },
    {
      name: 'bed length in pellet diameters',
      value: bed.length / diameter,
      unit: '1',
      definition: 'bed length over Sauter diameter of the pellet, L/d',
      source: 'common practice',
    },
  ];
  const { viscosity } = model.localProperties;
  if (viscosity > 0) {
    groups.push({
      name: 'packed-bed Reynolds number',
      value: (massFlux * diameter) / (viscosity * solidFraction),
      unit: '1',
      definition: 'G d / (μ (1-ε)), G superficial mass flux, d Sauter diameter',
      source: 'Ergun (1952), Chem. Eng. Prog. 48, 89',
    });
  }
  return groups;
}

function reactionGroups(model: ReactorModel, balances: Balances, j: number): DimensionlessGroup[] {
  const { specification, speciesCount, rateFactors, stoichiometry, feedFlows } = model;
  const { pellet, reactions, bed } = specification;
  const { conditions } = balances;
  const { transport } = model.localProperties;
  const row = stoichiometry[j]!;
  const key = limitingReactant(row, conditions.concentrations, transport.effectiveDiffusivities);
  if (key === undefined) return [];
  const rates = new Float64Array(model.reactionCount);
  const columns = speciesCount + 2;
  const gradient = new Float64Array(model.reactionCount * columns);
  model.rates.evaluateWithGradient(
    conditions.concentrations,
    0,
    conditions.temperature,
    conditions.pressure,
    rates,
    0,
    gradient,
    0,
  );
  const rate = rates[j]! * rateFactors[j]!;
  const concentration = conditions.concentrations[key]!;
  if (!(rate > 0) || !(concentration > 0)) return [];
  const of = `${reactions[j]!.name} (${specification.species[key]!.id})`;
  const length = pellet.geometry.diffusionLength;
  const consumption = rate * -row[key]!;
  const diffusivity = transport.effectiveDiffusivities[key]!;
  const { temperature } = conditions;
  // d ln r / d ln T at constant partial pressures is E/(R T) for an Arrhenius law; ours is at constant concentrations.
  const byTemperature = gradient[j * columns + speciesCount]! * rateFactors[j]!;
  const order = (gradient[j * columns + key]! * rateFactors[j]! * concentration) / rate;
  const groups: DimensionlessGroup[] = [];
  const push = (group: Omit<DimensionlessGroup, 'of'>): void => {
    if (Number.isFinite(group.value)) groups.push({ ...group, of });
  };
  push({
    name: 'reaction order',
    value: order,
    unit: '1',
    definition: 'd ln r / d ln c of the limiting reactant at bulk conditions',
    source: 'definition',
  });
  if (pellet.method.kind === 'full' || pellet.method.kind === 'thiele') {
    const modulus = length * Math.sqrt(consumption / (concentration * diffusivity));
    push({
      name: 'Thiele modulus',
      value: modulus,
      unit: '1',
      definition: '(V/S) √(r / (De c)) with r, c of the limiting reactant at bulk conditions',
      source: 'Thiele (1939), Ind. Eng. Chem. 31, 916; Aris (1957), Chem. Eng. Sci. 6, 262',
    });
    push({
      name: 'effectiveness if first order and isothermal',
      value: firstOrderEffectiveness(modulus, pellet.geometry.shapeExponent).effectiveness,
      unit: '1',
      definition: 'closed form of the shape at that modulus, no film',
      source: 'Aris (1957), Chem. Eng. Sci. 6, 262',
    });
    push({
      name: 'Biot number for mass',
      value: (transport.massTransfer[key]! * length) / diffusivity,
      unit: '1',
      definition: 'kc (V/S) / De',
      source: 'definition',
    });
  }
  const heat = conditions.reactionHeats[j]!;
  const knowsHeat = model.heatContent !== undefined && specification.heat.mode !== 'isothermal';
  if (knowsHeat && (pellet.method.kind === 'full' || pellet.method.kind === 'thiele')) {
    push({
      name: 'Prater number',
      value:
        (-heat * diffusivity * concentration) / (-row[key]! * transport.thermalConductivity * temperature),
      unit: '1',
      definition: '(-ΔH) De c / (λ T): largest inner temperature rise over bulk temperature',
      source: 'Prater (1958), Chem. Eng. Sci. 8, 284',
    });
    push({
      name: 'Biot number for heat',
      value: (transport.heatTransfer * length) / transport.thermalConductivity,
      unit: '1',
      definition: 'h (V/S) / λ',
      source: 'definition',
    });
  }
  push({
    name: 'Arrhenius number',
    value:
      (byTemperature * temperature) / rate -
      sumOfOrders(gradient, j, columns, speciesCount, conditions.concentrations, rateFactors[j]!, rate),
    unit: '1',
    definition: 'd ln r / d ln T at constant partial pressures; E/(R T) for an Arrhenius law',
    source: 'definition',
  });
  push({
    name: 'Damköhler number',
    value: (consumption * model.crossSection * model.solidFraction * bed.length) / feedFlows[key]!,
    unit: '1',
    definition: 'consumption of the limiting reactant at inlet conditions, whole bed, over its feed',
    source: 'Damköhler (1936), first group',
  });
  if (knowsHeat) {
    push({
      name: 'adiabatic temperature rise',
      value:
        (-heat * feedFlows[key]!) / (-row[key]! * model.heatContent.capacityFlow(feedFlows, temperature)),
      unit: 'K',
      definition: 'full conversion of the limiting reactant by this reaction alone, inlet heat capacity',
      source: 'definition',
    });
  }
  return groups;
}

/** Concentrations fall as 1/T at constant partial pressures: the difference between the two temperature derivatives. */
function sumOfOrders(
  gradient: Float64Array,
  j: number,
  columns: number,
  speciesCount: number,
  concentrations: Float64Array,
  factor: number,
  rate: number,
): number {
  let sum = 0;
  for (let i = 0; i < speciesCount; i++) sum += gradient[j * columns + i]! * concentrations[i]!;
  return (sum * factor) / rate;
}

/** The reactant that runs out first on its way into the pellet (De c / |ν| smallest). */
function limitingReactant(
  row: readonly number[],
  concentrations: Float64Array,
  diffusivities: Float64Array,
): number | undefined {
  let best: number | undefined;
  let smallest = Infinity;
  row.forEach((coefficient, i) => {
    if (coefficient >= 0) return;
    const diffusivity = Number.isFinite(diffusivities[i]!) ? diffusivities[i]! : 1;
    const supply = (concentrations[i]! * diffusivity) / -coefficient;
    if (supply < smallest) {
      smallest = supply;
      best = i;
    }
  });
  return best;
}
