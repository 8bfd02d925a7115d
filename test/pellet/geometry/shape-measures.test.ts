import { describe, expect, it } from 'vitest';
import type { PelletShape } from '../../../src/pellet/geometry/pellet-shape.js';
import { measureShape } from '../../../src/pellet/geometry/shape-measures.js';
import { polygonMeasures } from './outline.js';

const mm = 1e-3;

/** Relative to rounding in double precision. */
function expectClose(obtained: number, expected: number, relative = 1e-12): void {
  expect(Math.abs(obtained / expected - 1), `${obtained} against ${expected}`).toBeLessThan(relative);
}

describe('measureShape, against mensuration by hand', () => {
  it('sphere of 6 mm: 36π mm³, 36π mm², all diameters alike', () => {
    const { volume, surface, whole, sauterDiameter, diffusionLength } = measureShape({
      kind: 'sphere',
      diameter: 6 * mm,
    });
    expectClose(volume, 36 * Math.PI * mm ** 3);
    expectClose(surface, 36 * Math.PI * mm ** 2);
    expectClose(diffusionLength, mm);
    for (const diameter of [sauterDiameter, whole!.volumeDiameter, whole!.surfaceDiameter]) {
      expectClose(diameter, 6 * mm);
    }
    expectClose(whole!.sphericity, 1);
  });

  it('cylinder as long as wide: 6V/S is the diameter; 1.145, 1.225 and 0.874 for the other three', () => {
    const { sauterDiameter, whole } = measureShape({ kind: 'cylinder', diameter: 3 * mm, length: 3 * mm });
    expectClose(sauterDiameter, 3 * mm);
    // (3/2)^(1/3), (3/2)^(1/2) and (2/3)^(1/3) from π/4 D³ and 3/2 π D².
    expectClose(whole!.volumeDiameter, 1.5 ** (1 / 3) * 3 * mm);
    expectClose(whole!.surfaceDiameter, 1.5 ** 0.5 * 3 * mm);
    expectClose(whole!.sphericity, (2 / 3) ** (1 / 3));
  });

  it('ring of 8, 4 and 6 mm: 72π mm³, surface 72π + 24π mm², bore 24π mm³', () => {
    const ring: PelletShape = {
      kind: 'ring',
      outerDiameter: 8 * mm,
      innerDiameter: 4 * mm,
      length: 6 * mm,
    };
    const { volume, surface, boreVolume } = measureShape(ring);
    expectClose(volume, 72 * Math.PI * mm ** 3);
    expectClose(surface, (8 * 6 + 4 * 6 + 2 * (16 - 4)) * Math.PI * mm ** 2);
    expectClose(boreVolume, 24 * Math.PI * mm ** 3);
  });

  it('long ring: V/S is half the wall', () => {
    const { per, diffusionLength, whole } = measureShape({
      kind: 'ring',
      outerDiameter: 9 * mm,
      innerDiameter: 3 * mm,
      length: 'long',
    });
    expect(per).toBe('metre');
    expectClose(diffusionLength, 1.5 * mm);
    expect(whole).toBeUndefined();
  });

  it('slab: half its thickness, by the square metre', () => {
    const { per, volume, surface } = measureShape({ kind: 'slab', thickness: 2 * mm });
    expect([per, volume, surface]).toEqual(['squareMetre', 2 * mm, 2]);
  });

  it('seven holes of 2 mm in 20 mm by 10 mm: (100 - 7)π of 10 mm, edges of 20 and 7 × 2 mm', () => {
    const { volume, surface, boreVolume } = measureShape({
      kind: 'holedCylinder',
      diameter: 20 * mm,
      length: 10 * mm,
      holes: 7,
      holeDiameter: 2 * mm,
    });
    expectClose(volume, 930 * Math.PI * mm ** 3);
    expectClose(boreVolume, 70 * Math.PI * mm ** 3);
    expectClose(surface, (34 * 10 + 2 * 93) * Math.PI * mm ** 2);
  });

  it('one hole makes a ring', () => {
    const sizes = { length: 5 * mm } as const;
    const drilled = measureShape({
      kind: 'holedCylinder',
      diameter: 6 * mm,
      holes: 1,
      holeDiameter: 2 * mm,
      ...sizes,
    });
    const ring = measureShape({ kind: 'ring', outerDiameter: 6 * mm, innerDiameter: 2 * mm, ...sizes });
    expectClose(drilled.volume, ring.volume);
    expectClose(drilled.surface, ring.surface);
  });

  it.each([
    [3, 1.0, 1.7],
    [3, 1.0, 2.1],
    [3, 1.2, 2.2],
    [4, 1.0, 2.2],
    [4, 1.0, 2.38],
  ] as const)('%i lobes of %d within %d mm: the polygon that follows their rims', (lobes, lobe, around) => {
    const section = { lobes, lobeDiameter: lobe * mm, circumscribedDiameter: around * mm };
    const { volume, surface } = measureShape({ kind: 'lobed', ...section, length: 'long' });
    const { area, perimeter } = polygonMeasures(section);
    // 24 000 corners: chords are short by 1e-7 of area and length; where the rim turns away from the axis, some are longer.
    expectClose(volume, area, 1e-6);
    expectClose(surface, perimeter, 1e-6);
  });

  it('three lobes about to part: three sectors of 300° and the triangle of their centres', () => {
    const d = 2 * mm;
    const { volume, surface } = measureShape({
      kind: 'lobed',
      lobes: 3,
      lobeDiameter: d,
      circumscribedDiameter: d * (1 + 2 / Math.sqrt(3)) * (1 - 1e-12),
      length: 'long',
    });
    expectClose(volume, d * d * ((5 / 8) * Math.PI + Math.sqrt(3) / 4), 1e-5);
    expectClose(surface, (5 / 2) * Math.PI * d, 1e-5);
  });

  it('lobes that lie in one circle are that circle', () => {
    const { diffusionLength } = measureShape({
      kind: 'lobed',
      lobes: 4,
      lobeDiameter: 2 * mm * (1 - 1e-9),
      circumscribedDiameter: 2 * mm,
      length: 'long',
    });
    expectClose(diffusionLength, 0.5 * mm, 1e-8);
  });

  it('custom bodies keep what they are given', () => {
    const { volume, surface, diffusionLength, whole } = measureShape({
      kind: 'custom',
      volume: 8e-9,
      surface: 24e-6,
    });
    expect([volume, surface]).toEqual([8e-9, 24e-6]);
    expectClose(diffusionLength, mm / 3);
    // Sphericity of a cube, (π/6)^(1/3).
    expectClose(whole!.sphericity, (Math.PI / 6) ** (1 / 3));
  });
});

describe('descriptions', () => {
  it.each<[PelletShape, string]>([
    [{ kind: 'sphere', diameter: 4 * mm }, 'sphere, diameter 4 mm'],
    [{ kind: 'slab', thickness: 2 * mm }, 'slab, thickness 2 mm'],
    [{ kind: 'cylinder', diameter: 3 * mm, length: 'long' }, 'long cylinder, diameter 3 mm'],
    [{ kind: 'cylinder', diameter: 3 * mm, length: 4 * mm }, 'cylinder, diameter 3 mm, 4 mm long'],
    [
      { kind: 'ring', outerDiameter: 8 * mm, innerDiameter: 3 * mm, length: 8 * mm },
      'ring, 8 mm outer and 3 mm inner diameter, 8 mm long',
    ],
    [
      { kind: 'holedCylinder', diameter: 16 * mm, length: 10 * mm, holes: 7, holeDiameter: 3 * mm },
      'holed cylinder, diameter 16 mm, 7 holes of 3 mm, 10 mm long',
    ],
    [
      {
        kind: 'lobed',
        lobes: 3,
        lobeDiameter: 0.8 * mm,
        circumscribedDiameter: 1.6 * mm,
        length: 'long',
      },
      'long extrudate, 3 lobes of 0.8 mm within 1.6 mm',
    ],
    [{ kind: 'custom', volume: 8e-9, surface: 24e-6 }, 'body of 8 mm³ and 24 mm²'],
  ])('%o', (shape, description) => {
    expect(measureShape(shape).description).toBe(description);
  });
});
