import { createCondensationWatch } from '../../bed/condensation.js';
import type { Assumption, ReactorSpecification } from '../../bed/reactor-specification.js';
import { problemAt, type CaseContext } from '../case-context.js';

/** False where a liquid would condense from the feed; along the bed an event watches over it. */
export function checkPhase(
  context: CaseContext,
  specification: ReactorSpecification,
  assumptions: Assumption[],
): boolean {
  const { feed, fluid } = specification;
  const watch = createCondensationWatch(specification);
  const total = feed.molarFlows.reduce((sum, flow) => sum + flow, 0);
  const moleFractions = Float64Array.from(feed.molarFlows, (flow) => flow / total);
  assumptions.push({
    about: 'fluid.phase',
    statement: `whether a liquid condenses is tested along the bed with ${
      fluid.equationOfState.kind === 'ideal' ? 'the Peng–Robinson equation' : 'the gas’s equation of state'
    }, for open space: small pores fill somewhat above the dew point${
      watch.leftOut.length > 0
        ? `; ${watch.leftOut.join(', ')} ${watch.leftOut.length > 1 ? 'are' : 'is'} taken not to condense, for want of critical data`
        : ''
    }`,
    source: 'Michelsen (1982), Fluid Phase Equilib. 9, 1',
  });
  if (watch.excess(moleFractions, feed.temperature, feed.pressure) < 0) return true;
  const dewTemperature = watch.dewTemperature(moleFractions, feed.pressure);
  problemAt(context, ['feed', 'temperature'], {
    code: 'out_of_range',
    found: `${feed.temperature} K, where a liquid would condense from the feed`,
    expected: `a feed that is a gas${dewTemperature === undefined ? '' : `: above its dew point, ${dewTemperature.toFixed(1)} K by the equation of state`}`,
    mend: 'raise the temperature or lower the pressure; two phases are beyond this version',
  });
  return false;
}
