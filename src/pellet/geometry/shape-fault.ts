import { holeLayout, lobeLayout } from './cross-section.js';
import type { PelletShape } from './pellet-shape.js';

/** Why a body cannot be. `path` is the measure to blame by its name in the shape; the texts continue "found …; expected …", lengths in mm. */
export interface ShapeFault {
  readonly path: string;
  readonly found: string;
  readonly expected: string;
}

/** @returns the first reason why there is no such body, undefined when there is none */
export function shapeFault(shape: PelletShape): ShapeFault | undefined {
  return sizeFault(shape) ?? fitFault(shape);
}

/** Every measure a finite number above 0, whole numbers where they count. */
function sizeFault(shape: PelletShape): ShapeFault | undefined {
  for (const [path, value] of Object.entries(shape) as [string, unknown][]) {
    if (path === 'kind' || path === 'shapeExponent' || value === 'long') continue;
    if (!(typeof value === 'number' && value > 0 && value < Infinity)) {
      return { path, found: String(value), expected: 'a number above 0' };
    }
  }
  return undefined;
}

function fitFault(shape: PelletShape): ShapeFault | undefined {
  switch (shape.kind) {
    case 'sphere':
    case 'slab':
    case 'cylinder':
      return undefined;
    case 'ring': {
      const { innerDiameter, outerDiameter } = shape;
      if (innerDiameter < outerDiameter) return undefined;
      return {
        path: 'innerDiameter',
        found: millimetres(innerDiameter),
        expected: `less than the outer diameter, ${millimetres(outerDiameter)}`,
      };
    }
    case 'holedCylinder': {
      if (!Number.isInteger(shape.holes)) {
        return { path: 'holes', found: String(shape.holes), expected: 'a whole number, 1 or more' };
      }
      const { wall } = holeLayout(shape);
      if (wall > 0) return undefined;
      return {
        path: 'holeDiameter',
        found: millimetres(shape.holeDiameter),
        expected: `less than ${millimetres(widestHole(shape.diameter, shape.holes))}, so that ${counted(shape.holes)} in a cylinder of ${millimetres(shape.diameter)} neither cut the rim nor each other`,
      };
    }
    case 'lobed': {
      const { lobes, lobeDiameter, circumscribedDiameter } = shape;
      if (lobeDiameter >= circumscribedDiameter) {
        return {
          path: 'lobeDiameter',
          found: millimetres(lobeDiameter),
          expected: `less than the circumscribed diameter, ${millimetres(circumscribedDiameter)}`,
        };
      }
      const { centreDistance, lobeRadius } = lobeLayout(shape);
      const span = Math.sin(Math.PI / lobes);
      if (centreDistance * span < lobeRadius) return undefined;
      // d/2 = (D - d)/2 sin(π/n) where neighbours touch.
      const touching = (circumscribedDiameter * span) / (1 + span);
      return {
        path: 'lobeDiameter',
        found: millimetres(lobeDiameter),
        expected: `more than ${millimetres(touching)}, so that ${lobes} lobes within a circle of ${millimetres(circumscribedDiameter)} meet`,
      };
    }
    case 'custom': {
      const { volume, surface, shapeExponent } = shape;
      const least = Math.cbrt(36 * Math.PI * volume * volume);
      // A sphere given with rounded numbers is one.
      if (surface < least * (1 - 1e-3)) {
        return {
          path: 'surface',
          found: `${rounded(surface * 1e6)} mm²`,
          expected: `at least ${rounded(least * 1e6)} mm², the surface of a sphere of that volume`,
        };
      }
      if (shapeExponent !== undefined && !(shapeExponent > -1 && shapeExponent < Infinity)) {
        return { path: 'shapeExponent', found: String(shapeExponent), expected: 'a number above -1' };
      }
      return undefined;
    }
  }
}

/** Hole diameter at which the walls are gone: R - b = a with b = (R + a)/(1 + q), q = 2 sin(π/n). */
function widestHole(diameter: number, holes: number): number {
  if (holes === 1) return diameter;
  const q = 2 * Math.sin(Math.PI / (holes === 7 ? 6 : holes));
  return (diameter * q) / (2 + q);
}

function counted(holes: number): string {
  return holes === 1 ? 'one hole' : `${holes} holes`;
}

function millimetres(length: number): string {
  return `${rounded(length * 1e3)} mm`;
}

function rounded(value: number): string {
  return String(Number(value.toPrecision(4)));
}
