/** Molar gas constant, J/(mol K), exact. @source CODATA 2018 */
export const gasConstant = 8.314462618;

/** Normal atmosphere, Pa, exact. @source CODATA 2018 */
export const standardAtmosphere = 101325;

/** 0 degrees Celsius in kelvin, exact. @source SI definition */
export const zeroCelsius = 273.15;

/** Standard pressure of thermochemical tables, Pa. @source IUPAC (1982) recommendation */
export const standardPressure = 1e5;
