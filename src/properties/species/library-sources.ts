/** Where the library's numbers come from, by key. Works not read in print are marked per value in the data (`from memory`). */
export const librarySources = {
  iupacWeights: 'IUPAC abridged standard atomic weights 2021',
  mixture: 'mixture of the composition listed, IUPAC 2021 weights',
  nasaShifted:
    'McBride, Zehe & Gordon, NASA/TP-2002-211556 (2002); b0 of every range shifted so that Hf298 is the Active Thermochemical Tables value',
  nasaMixture:
    'McBride, Zehe & Gordon, NASA/TP-2002-211556 (2002), from the coefficients (mixing entropy included)',
  nasaCoefficients: 'McBride, Zehe & Gordon, NASA/TP-2002-211556 (2002), from the coefficients',
  nasa: 'McBride, Zehe & Gordon, NASA/TP-2002-211556 (2002)',
  coefficients: 'from the heat-capacity coefficients of this entry',
  activeTables: 'Active Thermochemical Tables ver. 1.112, Argonne National Laboratory',
  boilingPoints:
    'CRC Handbook physical-constants tables / NIST WebBook / saturation line of the reference equation of state',
  fuller: 'Fuller, Ensley & Giddings, J. Phys. Chem. 73 (1969) 3679; Poling et al. 5th ed. Table 11-1',
  steamViscosity:
    'IAPWS R12-08 (2008), viscosity of ordinary water substance, dilute gas (constants from memory)',
  steamConductivity:
    'IAPWS R15-11 (2011), thermal conductivity of ordinary water substance, dilute gas (constants from memory)',
  svehla: 'Svehla, NASA TR R-132 (1962), as in Poling et al. 5th ed. App. B',
  leachman: 'Leachman et al., J. Phys. Chem. Ref. Data 38 (2009) 721',
  span2000: 'Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361',
  schmidt: 'Schmidt & Wagner, Fluid Phase Equilib. 19 (1985) 175',
  tegeler: 'Tegeler, Span & Wagner, J. Phys. Chem. Ref. Data 28 (1999) 779',
  ortizVega: 'Ortiz-Vega et al., NIST helium equation of state (2013-2020)',
  lemmonSpan: 'Lemmon & Span, J. Chem. Eng. Data 51 (2006) 785',
  nbs10: 'gas-phase value, Nelson, Lide & Maryott NSRDS-NBS 10 (1967) / NIST CCCBDB experimental list',
  spanWagner: 'Span & Wagner, J. Phys. Chem. Ref. Data 25 (1996) 1509',
  iapws95: 'Wagner & Pruss (IAPWS-95), J. Phys. Chem. Ref. Data 31 (2002) 387',
  chung: 'Chung et al., Ind. Eng. Chem. Res. 27 (1988) 671; Poling et al. 5th ed. Table 9-1',
  setzmann: 'Setzmann & Wagner, J. Phys. Chem. Ref. Data 20 (1991) 1061',
  vaporLiquidReview:
    'Vapor-Liquid Critical Properties of Elements and Compounds, parts 1-12, J. Chem. Eng. Data 40-60 (1995-2015), recommended values',
  wagnerEquation:
    "computed for this library from the Wagner vapour-pressure equation tabulated in Poling, Prausnitz & O'Connell, Properties of Gases and Liquids 5th ed. (2001) App. A, or McGarry, Ind. Eng. Chem. Process Des. Dev. 22 (1983) 313, at 0.7 Tc with the Tc and Pc of this entry",
  smukala: 'Smukala, Span & Wagner, J. Phys. Chem. Ref. Data 29 (2000) 1053',
  buecker: 'Buecker & Wagner, J. Phys. Chem. Ref. Data 35 (2006) 205',
  referenceEquation:
    'from the published reference equation of state of this fluid (saturation pressure at 0.7 Tc)',
  polingConformers:
    "Poling, Prausnitz & O'Connell 5th ed. (2001) App. A (thermal average; the gauche conformer alone is 2.94)",
  poling: "Poling, Prausnitz & O'Connell 5th ed. (2001) App. A",
  mueller: 'experimental values collected by Mueller, Mokrushina & Arlt, J. Chem. Eng. Data 57 (2012) 1231',
  symmetryTrans: 'zero by symmetry (s-trans)',
  symmetryChair: 'zero by symmetry (chair); one handbook table prints 0.3',
  symmetry: 'zero by symmetry',
  daubert:
    'Daubert, J. Chem. Eng. Data 41 (1996) 365 (critical properties part 4); same numbers in Horstmann et al., Fluid Phase Equilib. 227 (2005) 157',
  yaws: 'Yaws, Thermophysical Properties of Chemicals and Hydrocarbons (compilation)',
  microwave: 'microwave, gas; CRC Handbook dipole-moment table',
  trcRefitted:
    'Frenkel, Kabo, Marsh, Roganov & Wilhoit, Thermodynamics of Organic Compounds in the Gas State (TRC, 1994), smoothing equation for Cp; refitted for this library to the nine-constant form',
  trc: 'Frenkel, Kabo, Marsh, Roganov & Wilhoit, Thermodynamics of Organic Compounds in the Gas State (TRC, 1994), smoothing equation for Cp',
  prosenWebbook: 'NIST WebBook (Prosen, Johnson & Rossini, J. Res. NBS 36 (1946) 455); CRC 19.1 kJ/mol',
  trcConstants: 'TRC (1994) equation constants, 1 bar',
  prosen: 'Prosen, Johnson & Rossini (1946); CRC Handbook',
  statisticalPhthalic:
    'statistical mechanics computed for this library (rigid rotor, harmonic oscillator, symmetry number 2) from B3LYP/6-31G* frequencies scaled 0.9614 above 800 1/cm and 0.985 below; refitted to the nine-constant form',
  statisticalMaleic:
    'statistical mechanics computed for this library (rigid rotor, harmonic oscillator, symmetry number 2) from experimental fundamentals in NIST CCCBDB release 22 and B3LYP/6-31G* rotational constants; refitted to the nine-constant form',
  statisticalFormate:
    'statistical mechanics computed for this library from NIST/Shimanouchi fundamentals (NSRDS-NBS 39 series) and microwave rotational constants; refitted to the nine-constant form',
  coxPilcher:
    'Cox & Pilcher (1970), as in the CRC Handbook; crystal -460.1 (Parks et al. 1950 -460.4) plus sublimation 88.7 +/- 2.3 kJ/mol',
  sameCalculation: 'the calculation named for the heat capacity of this entry, at 1 bar',
  reidYaws: 'Reid, Prausnitz & Poling 4th ed. (1987) App. A; Yaws compilation prints 421e-6',
  leeKesler: 'computed for this library from Tb, Tc, Pc by the Lee-Kesler relation, AIChE J. 21 (1975) 510',
  reidSolution: 'benzene solution, Reid, Prausnitz & Poling 4th ed. (1987) App. A',
  crcMaleic:
    'CRC Handbook standard thermodynamic properties table (from calorimetry of the crystal, -469.8, plus sublimation 71.5 kJ/mol)',
  wu: 'Wu, Zhou & Lemmon, J. Phys. Chem. Ref. Data 40 (2011) 023104',
  tholOxide: 'Thol et al., Chem. Eng. Sci. 121 (2015) 87',
  tholVinyl: 'Thol, Fenkl & Lemmon, Int. J. Thermophys. 43 (2022) 41',
  tholHcl: 'Thol et al., J. Chem. Eng. Data 63 (2018) 2533',
  tholChlorine: 'Thol, Herrig, Span & Lemmon, AIChE J. 67 (2021) e17326',
  gaoAmmonia: 'Gao, Wu, Bell, Harvey & Lemmon, J. Phys. Chem. Ref. Data 52 (2023) 013102',
  mathews: 'Mathews, Chem. Rev. 72 (1972) 71',
  gaoSulphur: 'Gao et al., J. Chem. Eng. Data 61 (2016) 2859',
  horstmann: 'Horstmann et al., Fluid Phase Equilib. 227 (2005) 157, appendix',
  isodesmic:
    'computed for this library: acrolein + ethylene = 1,3-butadiene + formaldehyde, CCSD(T)/cc-pVTZ energies at B3LYP/6-31G* geometries with scaled vibrations, reaction enthalpy 14.8 kJ/mol (13.1 with cc-pVDZ), anchored on the literature values of the other three',
  trcAcrylic:
    'TRC (1994) 0 K value carried to 298.15 K; literature spread -320 to -332 kJ/mol, computed -321 +/- 3 (Struct. Chem. 18 (2007) 1007-)',
  trcAcrylonitrile: 'TRC (1994) 0 K value carried to 298.15 K; CRC Handbook 180.6 kJ/mol',
  airOmega:
    'Lemmon, Jacobsen, Penoncello & Friend, J. Phys. Chem. Ref. Data 29 (2000) 331 (pseudo-pure fluid)',
  airBubble:
    'Lemmon, Jacobsen, Penoncello & Friend, J. Phys. Chem. Ref. Data 29 (2000) 331 (bubble point at 101325 Pa)',
  airEquation: 'Lemmon, Jacobsen, Penoncello & Friend, J. Phys. Chem. Ref. Data 29 (2000) 331',
  nonPolar: 'non-polar components',
} as const;

/** Names one of {@link librarySources}. */
export type LibrarySourceKey = keyof typeof librarySources;
