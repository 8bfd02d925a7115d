import { lobeLayout } from './cross-section.js';
import type { AxialLength, HoledCylinderShape, LobedShape, PelletShape, RingShape } from './pellet-shape.js';

/** Volume, surface and the diameters made of them; SI. */
export interface ShapeMeasures {
  /** What `volume`, `surface` and `boreVolume` are for: one pellet, a metre of a long one, or a square metre of a slab. */
  readonly per: 'pellet' | 'metre' | 'squareMetre';
  /** Of the solid with its pores, without bores, m³ per `per`. */
  readonly volume: number;
  /** That the fluid reaches, bores and ends counted, m² per `per`. */
  readonly surface: number;
  /** Of the bore of a ring or the holes of a holed cylinder, m³ per `per`; 0 for all others. */
  readonly boreVolume: number;
  /** V/S, m. */
  readonly diffusionLength: number;
  /** 6 V/S: diameter of the sphere with the same surface per volume, m. */
  readonly sauterDiameter: number;
  /** What only a body with ends has. */
  readonly whole?: {
    /** (6 V/π)^(1/3): diameter of the sphere of equal volume, m. */
    readonly volumeDiameter: number;
    /** (S/π)^(1/2): diameter of the sphere of equal surface, m. */
    readonly surfaceDiameter: number;
    /** Surface of the sphere of equal volume over that of the body, 0 to 1. */
    readonly sphericity: number;
  };
  /** As the user would say it: `ring, 5 mm outer and 2 mm inner diameter, 5 mm long`. */
  readonly description: string;
}

/** @param shape - one in which `shapeFault` finds none; measures of others mean nothing */
export function measureShape(shape: PelletShape): ShapeMeasures {
  switch (shape.kind) {
    case 'sphere': {
      const { diameter } = shape;
      return body(
        (Math.PI * diameter ** 3) / 6,
        Math.PI * diameter ** 2,
        0,
        `sphere, diameter ${millimetres(diameter)}`,
      );
    }
    case 'slab': {
      const { thickness } = shape;
      return unbounded(thickness, 2, 0, 'squareMetre', `slab, thickness ${millimetres(thickness)}`);
    }
    case 'cylinder': {
      const { diameter, length } = shape;
      const section = { area: circleArea(diameter), perimeter: Math.PI * diameter, boreArea: 0 };
      return prism(section, length, 'cylinder', `diameter ${millimetres(diameter)}`);
    }
    case 'ring': {
      const { outerDiameter, innerDiameter, length } = shape;
      const diameters = `${millimetres(outerDiameter)} outer and ${millimetres(innerDiameter)} inner diameter`;
      return prism(crossSectionMeasures(shape), length, 'ring', diameters);
    }
    case 'holedCylinder': {
      const { diameter, length, holes, holeDiameter } = shape;
      const drilled = `${holes} ${holes === 1 ? 'hole' : 'holes'} of ${millimetres(holeDiameter)}`;
      const name = `diameter ${millimetres(diameter)}, ${drilled}`;
      return prism(crossSectionMeasures(shape), length, 'holed cylinder', name);
    }
    case 'lobed': {
      const { lobes, lobeDiameter, circumscribedDiameter, length } = shape;
      const sizes = `${lobes} lobes of ${millimetres(lobeDiameter)} within ${millimetres(circumscribedDiameter)}`;
      return prism(crossSectionMeasures(shape), length, 'extrudate', sizes);
    }
    case 'custom': {
      const { volume, surface } = shape;
      return body(
        volume,
        surface,
        0,
        `body of ${rounded(volume * 1e9)} mm³ and ${rounded(surface * 1e6)} mm²`,
      );
    }
  }
}

/** Of the plane figure across a prism's axis. */
export interface CrossSectionMeasures {
  /** Of the solid, m². */
  readonly area: number;
  /** All edges, those of holes counted, m. */
  readonly perimeter: number;
  /** Of the holes, m². */
  readonly boreArea: number;
}

/** Area and perimeter of a ring's, a holed cylinder's or a lobed extrudate's cross-section. */
export function crossSectionMeasures(
  shape: RingShape | HoledCylinderShape | LobedShape,
): CrossSectionMeasures {
  switch (shape.kind) {
    case 'ring': {
      const { outerDiameter, innerDiameter } = shape;
      const boreArea = circleArea(innerDiameter);
      return {
        area: circleArea(outerDiameter) - boreArea,
        perimeter: Math.PI * (outerDiameter + innerDiameter),
        boreArea,
      };
    }
    case 'holedCylinder': {
      const { holes, holeDiameter, diameter } = shape;
      const boreArea = holes * circleArea(holeDiameter);
      return {
        area: circleArea(diameter) - boreArea,
        perimeter: Math.PI * (diameter + holes * holeDiameter),
        boreArea,
      };
    }
    case 'lobed': {
      const { lobes, lobeRadius, centreDistance, notch, halfArc } = lobeLayout(shape);
      // 2n times: the triangle from the axis to a lobe's centre to the notch, and half the lobe's sector.
      return {
        area: lobes * (centreDistance * notch.y + lobeRadius ** 2 * halfArc),
        perimeter: 2 * lobes * lobeRadius * halfArc,
        boreArea: 0,
      };
    }
  }
}

function prism(
  { area, perimeter, boreArea }: CrossSectionMeasures,
  length: AxialLength,
  name: string,
  sizes: string,
): ShapeMeasures {
  if (length === 'long') return unbounded(area, perimeter, boreArea, 'metre', `long ${name}, ${sizes}`);
  const surface = perimeter * length + 2 * area;
  return body(area * length, surface, boreArea * length, `${name}, ${sizes}, ${millimetres(length)} long`);
}

function body(volume: number, surface: number, boreVolume: number, description: string): ShapeMeasures {
  const volumeDiameter = Math.cbrt((6 * volume) / Math.PI);
  return {
    ...unbounded(volume, surface, boreVolume, 'pellet', description),
    whole: {
      volumeDiameter,
      surfaceDiameter: Math.sqrt(surface / Math.PI),
      sphericity: (Math.PI * volumeDiameter ** 2) / surface,
    },
  };
}

function unbounded(
  volume: number,
  surface: number,
  boreVolume: number,
  per: ShapeMeasures['per'],
  description: string,
): ShapeMeasures {
  const diffusionLength = volume / surface;
  return {
    per,
    volume,
    surface,
    boreVolume,
    diffusionLength,
    sauterDiameter: 6 * diffusionLength,
    description,
  };
}

function circleArea(diameter: number): number {
  return (Math.PI * diameter ** 2) / 4;
}

function millimetres(length: number): string {
  return `${rounded(length * 1e3)} mm`;
}

function rounded(value: number): number {
  return Number(value.toPrecision(6));
}
