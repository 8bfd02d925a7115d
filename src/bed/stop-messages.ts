import type { StopReason } from './run-result.js';

/** What each way of stopping short means to the user, and what can be done. */
export const stopMessages: Readonly<Record<StopReason, string>> = {
  pressure_used_up:
    'The pressure is used up here: friction takes all of it before the end of the bed. Shorten or widen the bed, use larger pellets or a larger void fraction, lower the flow, or raise the feed pressure.',
  property_range_left:
    "The temperature leaves the range for which the species' heat capacities and enthalpies hold. Check the heat balance of the case; if the temperature is real, give data that cover it.",
  condensation:
    'A liquid would condense from the gas here, which this version does not follow: wet pellets lose most of their activity and may be damaged. Raise the temperature, lower the pressure, or change the composition; check `binary_interaction` where the dew point matters.',
  no_pellet_state:
    'No steady state of the pellet was found here within the work allowed. The conditions may be past ignition or extinction of the pellet, or a law of an order below one leaves its core without reactant, which this version does not resolve. Check the rate laws and the pellet data at these conditions; `method: thiele` may serve where cores are empty.',
  reactant_overdrawn:
    'A species is used up here while a rate law goes on consuming it. Such a law holds only while there is enough of the species: add a factor that vanishes with it (an order above zero), or end the bed here.',
  step_limit:
    'The number of axial steps allowed was not enough. The problem may be extremely stiff, or a rate law may jump; a looser tolerance under `numerics` may help to see more.',
  rate_not_finite:
    'A rate law gives no finite number at these conditions (a division by zero, or a power or logarithm of nothing). Check the law at the composition of this position.',
};
