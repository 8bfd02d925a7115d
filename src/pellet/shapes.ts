import type { PelletGeometry } from './pellet-specification.js';

/** What the one-dimensional problem needs of a body: volume over surface, and the exponent of its radial operator. */
function geometry(diffusionLength: number, shapeExponent: number, description: string): PelletGeometry {
  return { diffusionLength, shapeExponent, sauterDiameter: 6 * diffusionLength, description };
}

/** Sphere. @param diameter - m, > 0 */
export function sphereGeometry(diameter: number): PelletGeometry {
  return geometry(diameter / 6, 2, `sphere, diameter ${millimetres(diameter)}`);
}

/** Slab that reacts from both faces, edges not counted. @param thickness - m, > 0, face to face */
export function slabGeometry(thickness: number): PelletGeometry {
  return geometry(thickness / 2, 0, `slab, thickness ${millimetres(thickness)}`);
}

/** Cylinder whose ends do not count. @param diameter - m, > 0 */
export function longCylinderGeometry(diameter: number): PelletGeometry {
  return geometry(diameter / 4, 1, `long cylinder, diameter ${millimetres(diameter)}`);
}

function millimetres(length: number): string {
  return `${Number((length * 1000).toPrecision(6))} mm`;
}
