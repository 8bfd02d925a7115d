import type { HoledCylinderShape, LobedShape } from './pellet-shape.js';

/** Where the holes of a holed cylinder are, in the plane across its axis; lengths in m. */
export interface HoleLayout {
  /** Holes evenly spaced around the axis; 0 when the only hole is in the centre. */
  readonly aroundCount: number;
  readonly hasCentreHole: boolean;
  readonly holeRadius: number;
  readonly outerRadius: number;
  /** From the axis to the centres of the holes around it; 0 when there are none. */
  readonly circleRadius: number;
  /** Between a hole and the rim, and between neighbouring holes; 0 or less when they cut each other. */
  readonly wall: number;
}

/**
 * The circle radius b makes the wall to the rim, R - b - a, equal to that between neighbours, 2 b sin(π/n) - 2 a. With six around the axis
 * b = (R + a)/2, and the wall to a hole in the centre is the same again.
 */
export function holeLayout({ diameter, holes, holeDiameter }: HoledCylinderShape): HoleLayout {
  const outerRadius = diameter / 2;
  const holeRadius = holeDiameter / 2;
  const hasCentreHole = holes === 1 || holes === 7;
  const aroundCount = hasCentreHole ? holes - 1 : holes;
  if (aroundCount === 0) {
    return {
      aroundCount,
      hasCentreHole,
      holeRadius,
      outerRadius,
      circleRadius: 0,
      wall: outerRadius - holeRadius,
    };
  }
  const circleRadius = (outerRadius + holeRadius) / (1 + 2 * Math.sin(Math.PI / aroundCount));
  const wall = outerRadius - circleRadius - holeRadius;
  return { aroundCount, hasCentreHole, holeRadius, outerRadius, circleRadius, wall };
}

/** Half a lobe, from its crest on the axis of x to the notch beside it; lengths in m. */
export interface LobeLayout {
  readonly lobes: number;
  readonly lobeRadius: number;
  /** From the pellet's axis to a lobe's centre, on the axis of x. */
  readonly centreDistance: number;
  /** Where two lobes meet, at the angle π/lobes from the axis of x. */
  readonly notch: { readonly x: number; readonly y: number };
  /** Of the lobe's arc from crest to notch, seen from the lobe's centre, rad. */
  readonly halfArc: number;
}

/** @returns NaN in the notch when the lobes do not meet */
export function lobeLayout({ lobes, lobeDiameter, circumscribedDiameter }: LobedShape): LobeLayout {
  const lobeRadius = lobeDiameter / 2;
  const centreDistance = (circumscribedDiameter - lobeDiameter) / 2;
  const half = Math.PI / lobes;
  const notchDistance =
    centreDistance * Math.cos(half) + Math.sqrt(lobeRadius ** 2 - (centreDistance * Math.sin(half)) ** 2);
  const notch = { x: notchDistance * Math.cos(half), y: notchDistance * Math.sin(half) };
  return { lobes, lobeRadius, centreDistance, notch, halfArc: Math.atan2(notch.y, notch.x - centreDistance) };
}
