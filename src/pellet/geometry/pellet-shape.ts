/** Bodies a pellet can be, as plain data; lengths in m, all > 0. Which measures fit together is for `shapeFault` to say. */

/** Along the axis, face to face, m; `long` where the ends do not count. */
export type AxialLength = number | 'long';

export interface SphereShape {
  readonly kind: 'sphere';
  readonly diameter: number;
}

/** Reacts from both faces; the edges do not count. */
export interface SlabShape {
  readonly kind: 'slab';
  readonly thickness: number;
}

export interface CylinderShape {
  readonly kind: 'cylinder';
  readonly diameter: number;
  readonly length: AxialLength;
}

export interface RingShape {
  readonly kind: 'ring';
  readonly outerDiameter: number;
  readonly innerDiameter: number;
  readonly length: AxialLength;
}

/**
 * Cylinder with equal round holes along its length. One hole is in the centre; seven are six around one in the centre; any other number is
 * evenly spaced around the axis, none in the centre. The circle of their centres makes all walls alike: from a hole to the rim as thick as
 * from a hole to its neighbour (and, with six around one, to the one in the centre).
 */
export interface HoledCylinderShape {
  readonly kind: 'holedCylinder';
  readonly diameter: number;
  readonly length: AxialLength;
  /** 1 or more, whole. */
  readonly holes: number;
  readonly holeDiameter: number;
}

/** Extrudate of overlapping round lobes evenly spaced around the axis; what the lobes enclose between them is filled. */
export interface LobedShape {
  readonly kind: 'lobed';
  readonly lobes: 3 | 4;
  readonly lobeDiameter: number;
  /** Of the smallest circle around the cross-section. */
  readonly circumscribedDiameter: number;
  readonly length: AxialLength;
}

/** Any other body, by its measures. */
export interface CustomShape {
  readonly kind: 'custom';
  /** m³ of one pellet, without bores. */
  readonly volume: number;
  /** m² of one pellet that the fluid reaches, bores counted. */
  readonly surface: number;
  /** Exponent of the one-dimensional body that stands for it, > -1; by default that of the sphere. */
  readonly shapeExponent?: number;
}

export type PelletShape =
  SphereShape | SlabShape | CylinderShape | RingShape | HoledCylinderShape | LobedShape | CustomShape;
