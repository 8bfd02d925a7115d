/** Case texts that the tests edit, and what reading them comes to. */
import { readFileSync } from 'node:fs';
import { decodeCase } from '../../src/case/decode-case.js';
import { readCase } from '../../src/case/read-case.js';
import { CaseError } from '../../src/diagnostics/case-error.js';
import type { Problem } from '../../src/diagnostics/problem.js';

export function caseText(name: string): string {
  return readFileSync(new URL(`../../cases/${name}.yaml`, import.meta.url), 'utf8');
}

/** The smallest case: one reaction, everything else left to defaults. */
export const smallCase = `bedwright: 1
species:
  A: {formula: C2H4O2}
  B: {formula: C2H4O2}
  N2: library
reactions:
  - name: turn
    equation: A -> B
    rate: k * c.A
    per: pellet_volume
    constants: {k: 2 1/s}
feed:
  temperature: 500 K
  pressure: 2 bar
  molar_flow: 3 mol/s
  mole_fractions: {A: 25 %, N2: balance}
pellet:
  shape: {sphere: {diameter: 3 mm}}
  density: 1500 kg/m^3
  method: intrinsic
bed:
  tube_diameter: 40 mm
  length: 1.5 m
  void_fraction: 0.4
  pressure_drop: none
heat: {mode: isothermal}
`;

/** A text with pieces replaced, each of which must stand in it. */
export function withEdits(text: string, ...edits: readonly (readonly [string, string])[]): string {
  return edits.reduce((edited, [search, replacement]) => {
    if (!edited.includes(search)) throw new Error(`the case does not hold ${search}`);
    return edited.replace(search, () => replacement);
  }, text);
}

/** What a case that must be refused is refused for. */
export function refusalOf(source: Uint8Array | string): CaseError {
  try {
    readCase(decodeCase(typeof source === 'string' ? Buffer.from(source) : source, 'case.yaml'), 'case.yaml');
  } catch (error) {
    if (error instanceof CaseError) return error;
    throw error;
  }
  throw new Error('the case was read without a fault');
}

/** `code path` of each problem, in the order of the reading. */
export function labels(problems: readonly Problem[]): string[] {
  return problems.map(({ code, path }) => `${code} ${path}`);
}
