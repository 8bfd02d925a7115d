import { describe, expect, it } from 'vitest';
import type { PelletShape } from '../../../src/pellet/geometry/pellet-shape.js';
import { shapeFault } from '../../../src/pellet/geometry/shape-fault.js';

const mm = 1e-3;
const ring = (innerDiameter: number): PelletShape => ({
  kind: 'ring',
  outerDiameter: 6 * mm,
  innerDiameter,
  length: 'long',
});
const drilled = (holes: number, holeDiameter: number): PelletShape => ({
  kind: 'holedCylinder',
  diameter: 12 * mm,
  length: 12 * mm,
  holes,
  holeDiameter,
});
const lobed = (lobes: 3 | 4, lobeDiameter: number): PelletShape => ({
  kind: 'lobed',
  lobes,
  lobeDiameter,
  circumscribedDiameter: 2 * mm,
  length: 'long',
});
const cube = (surface: number): PelletShape => ({ kind: 'custom', volume: 1e-9, surface });

describe('shapeFault', () => {
  it.each<[string, PelletShape, string, RegExp]>([
    ['a size of nothing', { kind: 'sphere', diameter: 0 }, 'diameter', /above 0/],
    ['no number', { kind: 'slab', thickness: NaN }, 'thickness', /above 0/],
    ['an infinite length', { kind: 'cylinder', diameter: 1, length: Infinity }, 'length', /above 0/],
    ['a ring that is all bore', ring(6 * mm), 'innerDiameter', /less than the outer diameter, 6 mm/],
    ['half a hole', drilled(3.5, mm), 'holes', /whole number/],
    ['seven holes side by side across the cylinder', drilled(7, 4 * mm), 'holeDiameter', /less than 4 mm/],
    ['two holes that touch in the centre', drilled(2, 6 * mm), 'holeDiameter', /less than 6 mm/],
    [
      'a hole as wide as the cylinder',
      drilled(1, 12 * mm),
      'holeDiameter',
      /less than 12 mm, so that one hole/,
    ],
    ['lobes that only touch', lobed(4, (2 * mm) / (1 + Math.SQRT2)), 'lobeDiameter', /more than 0\.8284 mm/],
    ['lobes apart', lobed(3, 0.9 * mm), 'lobeDiameter', /more than 0\.9282 mm/],
    ['a lobe as wide as all', lobed(3, 2 * mm), 'lobeDiameter', /less than the circumscribed diameter, 2 mm/],
    ['less surface than a sphere has', cube(4.8e-6), 'surface', /at least 4\.836 mm²/],
    [
      'an exponent of no body',
      { ...cube(6e-6), shapeExponent: -1 } as PelletShape,
      'shapeExponent',
      /above -1/,
    ],
  ])('refuses %s', (_, shape, path, expected) => {
    const fault = shapeFault(shape);
    expect(fault?.path).toBe(path);
    expect(fault?.expected).toMatch(expected);
  });

  it.each<[string, PelletShape]>([
    ['a thin ring', ring(5.99 * mm)],
    ['seven holes with thin walls', drilled(7, 3.99 * mm)],
    ['twenty holes', drilled(20, mm)],
    ['four lobes that just meet', lobed(4, 0.829 * mm)],
    ['three lobes with nothing but their fill in the centre', lobed(3, 0.93 * mm)],
    ['a sphere given as a custom body, rounded', cube(4.835e-6)],
    ['a flat operator', { ...cube(6e-6), shapeExponent: 0 } as PelletShape],
  ])('takes %s', (_, shape) => {
    expect(shapeFault(shape)).toBeUndefined();
  });
});
