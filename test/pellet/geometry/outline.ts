/** Polygons that follow a lobed cross-section, for checks that share no formula with the program. */

interface Lobes {
  readonly lobes: number;
  readonly lobeDiameter: number;
  readonly circumscribedDiameter: number;
}

/** Distance from the axis to the farthest lobe's rim at a polar angle. */
function outlineRadius({ lobes, lobeDiameter, circumscribedDiameter }: Lobes, angle: number): number {
  const reach = (circumscribedDiameter - lobeDiameter) / 2;
  let farthest = 0;
  for (let k = 0; k < lobes; k++) {
    const towards = angle - (2 * Math.PI * k) / lobes;
    const beside = reach * Math.sin(towards);
    const chord = (lobeDiameter / 2) ** 2 - beside ** 2;
    if (chord >= 0) farthest = Math.max(farthest, reach * Math.cos(towards) + Math.sqrt(chord));
  }
  return farthest;
}

/** Area by Green's theorem and length of a polygon with its corners on the outline, one of them in every notch. */
export function polygonMeasures(section: Lobes, corners = 24_000): { area: number; perimeter: number } {
  let area = 0;
  let perimeter = 0;
  let [x, y] = [outlineRadius(section, 0), 0];
  for (let k = 1; k <= corners; k++) {
    const angle = (2 * Math.PI * k) / corners;
    const radius = outlineRadius(section, angle);
    const [nextX, nextY] = [radius * Math.cos(angle), radius * Math.sin(angle)];
    area += (x * nextY - nextX * y) / 2;
    perimeter += Math.hypot(nextX - x, nextY - y);
    [x, y] = [nextX, nextY];
  }
  return { area, perimeter };
}
