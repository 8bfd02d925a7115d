import { activeSpecies } from '../../bed/needed-properties.js';
import type { ReactorSpecification } from '../../bed/reactor-specification.js';
import { moleculeDiameter } from '../../pellet/pores/hindrance.js';
import { configurationalRatio } from '../../pellet/pores/pore-regimes.js';
import { problemAt, type CaseContext } from '../case-context.js';

/**
 * Whether molecules fit the pores: one that enters none is a fault, one that fills a pore makes its estimate an order of magnitude, which is
 * a warning. False where there is a fault.
 */
export function checkPores(context: CaseContext, specification: ReactorSpecification): boolean {
  const { pores, effectiveDiffusivities } = specification.pellet.transport;
  if (!pores) return true;
  const isActive = activeSpecies(specification);
  const radii = pores.pores.map(({ radius }) => radius);
  const path = ['pellet', pores.pores.length > 1 ? 'pores' : 'pore_radius'];
  const tight: string[] = [];
  let isSound = true;
  specification.species.forEach((record, i) => {
    const diameter = moleculeDiameter(record);
    if (!isActive[i] || effectiveDiffusivities[i]!.kind !== 'estimate' || diameter === undefined) return;
    if (diameter >= 2 * Math.max(...radii)) {
      isSound = false;
      problemAt(context, path, {
        code: 'inconsistent',
        found: `pores narrower than ${record.id}, whose molecules measure ${nanometres(diameter)}`,
        expected: 'at least one size of pores that it enters',
        mend: `give the effective diffusivity of ${record.id} where it is known`,
      });
    } else if (diameter >= configurationalRatio * 2 * Math.min(...radii)) {
      tight.push(`${record.id} (${nanometres(diameter)})`);
    }
  });
  if (tight.length > 0) {
    problemAt(context, path, {
      code: 'out_of_range',
      severity: 'warning',
      found: `pores of the size of the molecules of ${tight.join(', ')}`,
      expected:
        'pores more than twice as wide: here diffusion is configurational, and the estimate is an order of magnitude at best',
      mend: 'give measured effective diffusivities',
    });
  }
  return isSound;
}

function nanometres(length: number): string {
  return `${Number((length * 1e9).toPrecision(2))} nm`;
}
