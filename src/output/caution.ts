/** The caution that stands under every result, wherever it is shown. */
export const caution: string =
  'These are estimates for study under the supervision of qualified engineers. They are no basis for operating limits or relief; ' +
  'hot spots, runaways and pressure can injure. Local codes and licensed practice govern.';
