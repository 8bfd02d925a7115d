/** Exit statuses of the command. 0 done; 1 a defect; 2 the case or the command line is at fault, nothing written; 3 the run stopped short. */
export type ExitStatus = 0 | 1 | 2 | 3;

/** Gravest first: with several cases the command ends with the gravest of their statuses. */
const gravity: readonly ExitStatus[] = [1, 2, 3, 0];

export function gravest(statuses: readonly ExitStatus[]): ExitStatus {
  return gravity.find((status) => statuses.includes(status)) ?? 0;
}
