import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { columnsToCsv, pelletCsv, profileCsv } from '../../src/output/profile-csv.js';
import { readCase } from '../../src/case/read-case.js';
import { CaseError } from '../../src/diagnostics/case-error.js';
import { inventedResult } from './invented-result.js';

/**
 * Records after the grammar of RFC 4180, section 2, and no wider: CRLF ends every record, also the last; quotes only around whole fields,
 * doubled inside; no bare quote, CR or LF elsewhere; all records equally long.
 */
function parseStrictly(text: string): string[][] {
  const records: string[][] = [];
  let at = 0;
  while (at < text.length) {
    const record: string[] = [];
    for (;;) {
      const rest = text.slice(at);
      const quoted = /^"((?:[^"]|"")*)"(?=,|\r\n)/.exec(rest);
      const field = quoted ?? /^([^",\r\n]*)(?=,|\r\n)/.exec(rest);
      if (!field) throw new Error(`not RFC 4180 at ${JSON.stringify(rest.slice(0, 40))}`);
      record.push(quoted ? field[1]!.replaceAll('""', '"') : field[1]!);
      at += field[0].length;
      if (text[at] === ',') at++;
      else break;
    }
    at += 2;
    records.push(record);
    if (record.length !== records[0]!.length)
      throw new Error(`record ${records.length} is of another length`);
  }
  return records;
}

const expectedHeader =
  'z_m,T_K,P_Pa,coolant_T_K,F_A_mol_s,F_B_2_mol_s,y_A,y_B_2,rate_first_mol_kg_s,rate_second_mol_kg_s,eta_first,eta_second,pellet_T_surface_K,pellet_T_center_K,density_kg_m3,compressibility_factor,viscosity_Pa_s,quotient_over_K_second,approach_second_K,equilibrium_conversion_A';

describe('profile.csv', () => {
  const { profile } = inventedResult;
  const equilibrium = inventedResult.equilibrium!;
  const [header, ...rows] = parseStrictly(profileCsv(inventedResult));

  it('has the headers that are documented, in their order, the unit in each', () => {
    expect(header!.join(',')).toBe(expectedHeader);
  });

  it('leaves the coolant out where there is none', () => {
    const uncooled = Object.fromEntries(
      Object.entries(profile).filter(([key]) => key !== 'coolantTemperatures'),
    ) as unknown as typeof profile;
    const text = profileCsv({ ...inventedResult, profile: uncooled });
    expect(parseStrictly(text)[0]!.join(',')).toBe(expectedHeader.replace('coolant_T_K,', ''));
  });

  it('holds every number to its last bit, and an empty cell where there is none', () => {
    const columns = [
      profile.positions,
      profile.temperatures,
      profile.pressures,
      profile.coolantTemperatures!,
      ...profile.molarFlows,
      ...profile.moleFractions,
      ...profile.rates,
      ...profile.effectiveness,
      profile.surfaceTemperatures,
      profile.centreTemperatures,
      profile.densities,
      profile.compressibilityFactors!,
      profile.viscosities!,
      equilibrium.approaches[0]!.quotientRatios,
      equilibrium.approaches[0]!.temperatureApproaches,
      equilibrium.conversions[0]!.values,
    ];
    expect(rows).toHaveLength(profile.positions.length);
    rows.forEach((row, i) => {
      row.forEach((cell, j) => {
        const value = columns[j]![i]!;
        if (Number.isFinite(value)) expect(Number(cell)).toBe(value);
        else expect(cell).toBe('');
      });
    });
  });

  it('any number comes back as it was', () => {
    fc.assert(
      fc.property(fc.float64Array({ minLength: 1, maxLength: 50 }), (values) => {
        const [, ...cells] = parseStrictly(
          columnsToCsv([
            { header: 'x_m', values },
            { header: 'y', values },
          ]),
        );
        cells.forEach(([first], i) => {
          const value = values[i]!;
          // The sign of nothing is not kept.
          if (Number.isFinite(value)) expect(Number(first)).toBe(value === 0 ? 0 : value);
          else expect(first).toBe('');
        });
      }),
    );
  });

  it('no cell can be taken for a formula: headers are words, all else is numbers', () => {
    for (const name of header!) expect(name).toMatch(/^[A-Za-z][A-Za-z0-9_]*$/);
    for (const cell of rows.flat()) expect(cell).toMatch(/^(-?\d+(\.\d+)?(e[+-]\d+)?)?$/);
  });

  it.each(['=A1', '+A', '-A', '@A', '"A,B"', '\tA'])('an id like %j never gets that far', (id) => {
    const source = `bedwright: 1\nspecies:\n  ${JSON.stringify(id)}: library\n`;
    let codes: string[] = [];
    try {
      readCase(source, 'ids.yaml');
    } catch (error) {
      if (!(error instanceof CaseError)) throw error;
      codes = error.problems
        .filter(({ span }) => source.slice(span.start).startsWith(JSON.stringify(id)))
        .map(({ code }) => code);
    }
    expect(codes).not.toEqual([]);
  });
});

describe('pellet.csv', () => {
  it('has a row for each radius of each pellet, the place in front', () => {
    const [header, ...rows] = parseStrictly(pelletCsv(inventedResult));
    expect(header!.join(',')).toBe('place,z_m,relative_radius,c_A_mol_m3,c_B_2_mol_m3,T_K');
    expect(rows).toEqual([
      ['inlet', '0', '0', '10', '0', '602'],
      ['inlet', '0', '1', '20', '', '601'],
      ['outlet', '1', '0', '1', '3', '603'],
      ['outlet', '1', '1', '2', '4', '602'],
    ]);
  });

  it('has its header alone where no pellet was solved', () => {
    expect(pelletCsv({ ...inventedResult, pellets: [] })).toBe(
      'place,z_m,relative_radius,c_A_mol_m3,c_B_2_mol_m3,T_K\r\n',
    );
  });
});
