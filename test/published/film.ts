import { filmCorrelations } from '../../src/pellet/film/film-correlations.js';
import { createFilmTransfer } from '../../src/pellet/film/film-transfer.js';
import type { PublishedRow } from './published-row.js';

// Geankoplis 7.3-4: water through spheres of benzoic acid.
const benzoicAcid = {
  flow: { massFlux: (996.7 * 5.514e-7) / ((Math.PI / 4) * 0.0667 ** 2), density: 996.7, viscosity: 8.718e-4 },
  transfer: createFilmTransfer(
    filmCorrelations.dwivedi_upadhyay,
    { volumeDiameter: 6.375e-3, sauterDiameter: 6.375e-3, surfaceDiameter: 6.375e-3, sphericity: 1 },
    0.436,
  ),
};

// Fogler: hydrazine, cylinders of 2.5 by 5 mm; surface and volume with both ends.
const [width, height] = [2.5e-3, 5e-3];
const volume = (Math.PI / 4) * width ** 2 * height;
const surface = Math.PI * width * height + (Math.PI / 2) * width ** 2;
const volumeDiameter = Math.cbrt((6 * volume) / Math.PI);
const sizes = {
  volumeDiameter,
  sauterDiameter: (6 * volume) / surface,
  surfaceDiameter: Math.sqrt(surface / Math.PI),
  sphericity: (6 * volume) / surface / volumeDiameter,
};
const voidFraction = 0.3;
const hydrazine = {
  // A density of 1 kg/m³ stands in: only the kinematic viscosity is printed.
  flow: { massFlux: 15, density: 1, viscosity: 4.5e-4 },
  diffusivity: 6.9e-5 * (750 / 298) ** 1.75,
  transfer: createFilmTransfer(filmCorrelations.thoenes_kramers, sizes, voidFraction),
};
const hydrazineCoefficient = (): number => {
  const target = new Float64Array(1);
  hydrazine.transfer.coefficientsInto(hydrazine.flow, Float64Array.of(hydrazine.diffusivity), target);
  return target[0]!;
};
const crowding = (1 - voidFraction) / sizes.sphericity;
const foglerSource = 'Fogler, Elements of Chemical Reaction Engineering, 4th ed., example 11-3';
const foglerInputs =
  'cylinders 2.5 × 5 mm, void fraction 0.3, u = 15 m/s, ν = 4.5e-4 m²/s, D = 6.9e-5 m²/s at 298 K, exponent 1.75, 750 K';

export const filmRows: readonly PublishedRow[] = [
  {
    id: 'film-geankoplis-7-3-4 Reynolds number',
    source: 'Geankoplis, Transport Processes and Unit Operations, 3rd ed., example 7.3-4, p. 449',
    status: 'checked',
    inputs: 'Q = 5.514e-7 m³/s, d = 6.375 mm, tube 66.7 mm, µ = 8.718e-4 Pa s, ρ = 996.7 kg/m³',
    expected: 1.15,
    unit: '1',
    tolerance: {
      relative: 0.005,
      reason: 'three digits printed',
    },
    obtain: () => benzoicAcid.transfer.reynolds(benzoicAcid.flow),
  },
  {
    id: 'film-geankoplis-7-3-4 measured coefficient',
    source:
      'Geankoplis, Transport Processes and Unit Operations, 3rd ed., example 7.3-4, p. 449: experiment of Wilson & Geankoplis (1966)',
    status: 'checked',
    inputs:
      'as above, void fraction 0.436, D = 1.245e-9 m²/s; here with the correlation of Dwivedi & Upadhyay',
    expected: 4.665e-6,
    unit: 'm/s',
    tolerance: { relative: 0.05, reason: 'the scatter of one measurement; the correlation claims 18 %' },
    obtain: () => {
      const target = new Float64Array(1);
      benzoicAcid.transfer.coefficientsInto(benzoicAcid.flow, Float64Array.of(1.245e-9), target);
      return target[0]!;
    },
  },
  {
    id: 'film-fogler-hydrazine shape factor',
    source: foglerSource,
    status: 'memory',
    inputs: foglerInputs,
    expected: 1.2,
    unit: '1',
    tolerance: { relative: 0.005, reason: 'two digits printed, 1.2019 recomputed' },
    obtain: () => 1 / sizes.sphericity,
  },
  {
    id: 'film-fogler-hydrazine Reynolds number',
    source: foglerSource,
    status: 'memory',
    inputs: foglerInputs,
    expected: 143,
    unit: '1',
    tolerance: {
      relative: 0.005,
      reason: 'three digits printed, from rounded intermediate values',
    },
    obtain: () => {
      const reynolds = hydrazine.transfer.reynolds(hydrazine.flow);
      return filmCorrelations.thoenes_kramers.ownReynolds!.of(reynolds, { ...sizes, voidFraction });
    },
  },
  {
    id: 'film-fogler-hydrazine Sherwood number after Thoenes and Kramers',
    source: foglerSource,
    status: 'memory',
    inputs: foglerInputs,
    expected: 13.05,
    unit: '1',
    tolerance: {
      relative: 0.005,
      reason: 'three digits printed, from rounded intermediate values',
    },
    obtain: () =>
      (((hydrazineCoefficient() * volumeDiameter) / hydrazine.diffusivity) * voidFraction) / crowding,
  },
  {
    id: 'film-fogler-hydrazine coefficient',
    source: foglerSource,
    status: 'memory',
    inputs: foglerInputs,
    expected: 3.52,
    unit: 'm/s',
    tolerance: { relative: 0.005, reason: 'three digits printed' },
    obtain: hydrazineCoefficient,
  },
];
