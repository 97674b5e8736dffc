/** Magnetic constant in H/m. CODATA 2018: https://physics.nist.gov/cuu/Constants/ */
export const magneticConstant = 1.25663706212e-6;

/** Electric constant in F/m. CODATA 2018. */
export const electricConstant = 8.8541878128e-12;

/** Conductivity at 20 °C that is called 100 % IACS, in S/m: International Annealed Copper Standard, IEC 60028 (1925). */
export const annealedCopperConductivity = 58e6;

/** Temperature at which conductivities are stated, in degrees Celsius. */
export const statedTemperature = 20;
