/**
 * One number that somebody else printed, and how the program comes to its own.
 *
 * `status`: `checked` - found in text that attributes it to the source; `memory` - quoted from memory; `recomputed` - calculated from the stated
 * inputs by a separate program (double precision, tolerances of 1e-8), where the print is coarse or is known to have slipped.
 */
export interface PublishedRow {
  readonly id: string;
  /** Author, year, edition, table, equation or page. */
  readonly source: string;
  readonly status: 'checked' | 'memory' | 'recomputed';
  /** With units as printed. */
  readonly inputs: string;
  /** In `unit`, with the digits that are printed. */
  readonly expected: number;
  readonly unit: string;
  /** Exactly one kind; `reason` says why no tighter: rounding of print, reading of a chart, stated accuracy. */
  readonly tolerance: { readonly reason: string } & (
    | { readonly relative: number; readonly absolute?: never }
    | { readonly absolute: number; readonly relative?: never }
  );
  /** The program's value in `unit`, by way of its public functions only. */
  readonly obtain: () => number;
}

/** Error over tolerance: a row is met at 1 or below. NaN where the program gives no number. */
export function missRatio(row: PublishedRow, obtained: number): number {
  const error = Math.abs(obtained - row.expected);
  const { relative, absolute } = row.tolerance;
  return error / (relative === undefined ? absolute : relative * Math.abs(row.expected));
}
