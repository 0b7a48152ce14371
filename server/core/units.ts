/** Exact unit definitions. Everything inside is SI or bar, kg, mm; these convert at the edges, once. */

/** Standard gravity, m/s², exact. 3rd General Conference on Weights and Measures (1901). READ in NIST SP 811, B.8. */
export const STANDARD_GRAVITY = 9.80665
/** Kilograms in one avoirdupois pound, exact. International yard and pound agreement (1959). */
export const KG_PER_LB = 0.45359237
/** Kilograms in one stone of 14 lb, exact. */
export const KG_PER_ST = 14 * KG_PER_LB
/** Millimetres in one inch, exact. International yard and pound agreement (1959). */
export const MM_PER_IN = 25.4
/** Pascals in one pound-force per square inch: lb · g0 / in², exact but for its endless digits. */
export const PA_PER_PSI = (KG_PER_LB * STANDARD_GRAVITY) / (MM_PER_IN / 1000) ** 2
/** Pascals in one bar, exact. */
export const PA_PER_BAR = 100_000

export const lbToKg = (lb: number) => lb * KG_PER_LB
export const kgToLb = (kg: number) => kg / KG_PER_LB
export const stToKg = (st: number) => st * KG_PER_ST
export const kgToSt = (kg: number) => kg / KG_PER_ST
export const inToMm = (inches: number) => inches * MM_PER_IN
export const mmToIn = (mm: number) => mm / MM_PER_IN
export const psiToBar = (psi: number) => (psi * PA_PER_PSI) / PA_PER_BAR
export const barToPsi = (bar: number) => (bar * PA_PER_BAR) / PA_PER_PSI
export const kmhToMs = (kmh: number) => kmh / 3.6
