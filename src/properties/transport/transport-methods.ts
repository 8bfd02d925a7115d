/** What each estimate of a transport property is, for the list of a run's assumptions: the method, its range and accuracy, its source. */
export interface MethodNote {
  readonly statement: string;
  readonly source: string;
}

export const transportMethods = {
  viscosity: {
    statement:
      'viscosity of the mixture: gases by corresponding states with polar and association corrections (hydrogen and helium by their Lennard-Jones constants, steam by a formula of its own), mixed after Wilke; dilute gas, about 0.7 Tc upwards; 2 % non-polar, 5 % and more polar and in mixtures with hydrogen',
    source:
      'Chung, Ajlan, Lee & Starling (1988), Ind. Eng. Chem. Res. 27, 671; Wilke (1950), J. Chem. Phys. 18, 517',
  },
  conductivity: {
    statement:
      'thermal conductivity of the mixture: gases by corresponding states from viscosity and heat capacity, mixed after Wassiljewa with the factors of Mason and Saxena; dilute gas; 5 to 10 %, strongly polar gases worse',
    source:
      'Chung, Lee & Starling (1984), Ind. Eng. Chem. Fundam. 23, 8; Mason & Saxena (1958), Phys. Fluids 1, 361',
  },
  binaryDiffusivity: {
    statement:
      'diffusivities of pairs of gases from diffusion volumes; low to moderate pressure; 4 % on average',
    source:
      'Fuller, Schettler & Giddings (1966), Ind. Eng. Chem. 58(5), 18; volumes of Fuller, Ensley & Giddings (1969), J. Phys. Chem. 73, 3679',
  },
  wilke: {
    statement: 'each species diffuses through the mixture of the others as if these stood still',
    source: 'Wilke (1950), Chem. Eng. Prog. 46, 95',
  },
  blanc: {
    statement: 'each species diffuses through the mixture as a trace',
    source: 'Blanc (1908), J. Phys. Theor. Appl. 7, 825',
  },
  flux_ratios: {
    statement:
      'diffusivities in the mixture for fluxes in the ratio of the reaction’s coefficients, at constant pressure in the pores',
    source: 'Maxwell–Stefan equations; Jackson (1977), Transport in Porous Catalysts',
  },
  viscosityAtPressure: {
    statement:
      'viscosity corrected for pressure by the reduced temperature and pressure of the mixture; reduced temperature above 1; 5 % non-polar, 10 % polar',
    source: 'Lucas (1981), Chem. Ing. Tech. 53, 959',
  },
  conductivityAtPressure: {
    statement:
      'thermal conductivity corrected for pressure by the reduced density of the mixture; non-polar gases, reduced density below 2.8; 10 to 20 % of the correction and more',
    source: 'Stiel & Thodos (1964), AIChE J. 10, 26',
  },
  diffusivityAtPressure: {
    statement:
      'diffusivities corrected for pressure by the reduced temperature and pressure of the mixture, one factor for all pairs',
    source: 'Takahashi (1974), J. Chem. Eng. Japan 7, 417',
  },
  pores: {
    statement:
      'effective diffusivities from the pores: molecular and Knudsen diffusion resist one after the other, which is exact only for fluxes that balance',
    source:
      'Bosanquet (1944), as in Pollard & Present (1948), Phys. Rev. 73, 762; Knudsen (1909), Ann. Phys. 333, 75',
  },
  parallel: {
    statement:
      'pores of all sizes lie side by side: porosity over tortuosity times the mean of their diffusivities',
    source: 'Johnson & Stewart (1965), J. Catal. 4, 248',
  },
  random: {
    statement: 'micropores and macropores cross at random; no tortuosity',
    source: 'Wakao & Smith (1962), Chem. Eng. Sci. 17, 825',
  },
  renkin: {
    statement:
      'molecules not small against a pore are slowed by its walls; derived for liquids, for gases an order of magnitude',
    source: 'Renkin (1954), J. Gen. Physiol. 38, 225',
  },
  pelletConductivity: {
    statement: 'conductivity of the pellet: geometric mean of solid and gas by volume; scatter 30 % and more',
    source: 'Woodside & Messmer (1961), J. Appl. Phys. 32, 1688',
  },
} as const satisfies Record<string, MethodNote>;
