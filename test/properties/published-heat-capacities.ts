/**
 * Ideal-gas heat capacities, J/(mol K), at 298.15 K and 1000 K, and standard entropies at 298.15 K and 1 bar, typed from memory of
 * NIST-JANAF Thermochemical Tables, 4th ed. (Chase 1998) for the small molecules and of the CRC Handbook and the TRC tables (1994) for the
 * organic ones. All from memory.
 */
export interface PublishedHeatCapacity {
  readonly id: string;
  readonly at298: number;
  readonly at1000?: number;
  readonly entropy?: number;
  /** How far tables of this kind of substance differ among themselves; relative, for heat capacities. */
  readonly scatter: number;
}

/** Tables of small molecules from spectra: rigid rotor against anharmonic partition functions. */
const spectroscopic = 0.005;
/** Organic vapours: uncertainty that the TRC tables (1994) state for them. */
const organic = 0.01;
/** CH4, HCN, NO2 are rigid rotors in NIST-JANAF; Gurvich et al. (1989-91), who count anharmonicity, lie up to 2 % off, more at 1000 K. */
const anharmonic = 0.02;

export const publishedHeatCapacities: readonly PublishedHeatCapacity[] = [
  { id: 'H2', at298: 28.836, at1000: 30.205, entropy: 130.68, scatter: spectroscopic },
  { id: 'N2', at298: 29.124, at1000: 32.697, entropy: 191.609, scatter: spectroscopic },
  { id: 'O2', at298: 29.376, at1000: 34.87, entropy: 205.147, scatter: spectroscopic },
  { id: 'Ar', at298: 20.786, at1000: 20.786, entropy: 154.845, scatter: spectroscopic },
  { id: 'He', at298: 20.786, at1000: 20.786, entropy: 126.152, scatter: spectroscopic },
  { id: 'CO', at298: 29.142, at1000: 33.183, entropy: 197.653, scatter: spectroscopic },
  { id: 'CO2', at298: 37.129, at1000: 54.308, entropy: 213.795, scatter: spectroscopic },
  { id: 'H2O', at298: 33.59, at1000: 41.268, entropy: 188.834, scatter: spectroscopic },
  { id: 'CH4', at298: 35.639, at1000: 71.795, entropy: 186.251, scatter: anharmonic },
  { id: 'C2H2', at298: 44.095, at1000: 68.275, entropy: 200.958, scatter: spectroscopic },
  { id: 'C2H4', at298: 42.886, at1000: 93.899, entropy: 219.33, scatter: spectroscopic },
  { id: 'C2H6', at298: 52.49, at1000: 122.7, entropy: 229.2, scatter: organic },
  { id: 'C3H6', at298: 64.32, entropy: 266.6, scatter: organic },
  { id: 'C3H8', at298: 73.6, at1000: 175, entropy: 270.3, scatter: organic },
  { id: 'n_C4H10', at298: 98.49, entropy: 309.9, scatter: organic },
  { id: 'i_C4H10', at298: 96.65, entropy: 295.5, scatter: organic },
  { id: 'benzene', at298: 82.44, at1000: 209.9, entropy: 269.2, scatter: organic },
  { id: 'toluene', at298: 103.75, entropy: 320.99, scatter: organic },
  { id: 'ethylbenzene', at298: 127.4, entropy: 360.6, scatter: organic },
  { id: 'methanol', at298: 44.06, at1000: 89.5, entropy: 239.9, scatter: organic },
  { id: 'acetone', at298: 74.52, entropy: 295.3, scatter: organic },
  { id: 'ethylene_oxide', at298: 47.901, entropy: 243, scatter: organic },
  { id: 'HCl', at298: 29.136, at1000: 31.628, entropy: 186.901, scatter: spectroscopic },
  { id: 'Cl2', at298: 33.949, at1000: 37.438, entropy: 223.079, scatter: spectroscopic },
  { id: 'NH3', at298: 35.652, at1000: 56.491, entropy: 192.774, scatter: spectroscopic },
  { id: 'NO', at298: 29.845, at1000: 33.987, entropy: 210.758, scatter: spectroscopic },
  { id: 'NO2', at298: 36.974, at1000: 52.166, entropy: 240.034, scatter: anharmonic },
  { id: 'N2O', at298: 38.617, at1000: 55.149, entropy: 219.957, scatter: spectroscopic },
  { id: 'HCN', at298: 35.857, at1000: 51.04, entropy: 201.828, scatter: anharmonic },
  { id: 'SO2', at298: 39.878, at1000: 54.332, entropy: 248.212, scatter: spectroscopic },
  { id: 'SO3', at298: 50.661, at1000: 75.97, entropy: 256.769, scatter: spectroscopic },
  { id: 'H2S', at298: 34.192, at1000: 45.786, entropy: 205.757, scatter: spectroscopic },
  { id: 'COS', at298: 41.497, entropy: 231.581, scatter: spectroscopic },
  { id: 'CS2', at298: 45.664, entropy: 237.977, scatter: spectroscopic },
];
