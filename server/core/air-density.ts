/** Air by height, temperature and damp: the International Standard Atmosphere. Heights in m, temperatures in °C, densities in kg/m³. */
const SEA_LEVEL_PA = 101_325
const SEA_LEVEL_K = 288.15
const ZERO_K = 273.15
const LAPSE_K_PER_M = 0.0065
const MOLAR_KG = 0.0289644
const WATER_MOLAR_KG = 0.018015
const GAS_CONSTANT = 8.31432
const EXPONENT = (9.80665 * MOLAR_KG) / (GAS_CONSTANT * LAPSE_K_PER_M)

/**
 * Pressure of the standard atmosphere, Pa. p = 101325·(1 − 0.0065·h/288.15)^5.2559
 * @param heightM −1000 to 11 000
 * @throws RangeError outside
 * @source International Standard Atmosphere, READ via open transcriptions
 */
export function airPressure(heightM: number): number {
  if (!(heightM >= -1000 && heightM <= 11_000)) throw new RangeError('airPressure: out of range')
  return SEA_LEVEL_PA * (1 - (LAPSE_K_PER_M * heightM) / SEA_LEVEL_K) ** EXPONENT
}

/**
 * Density of air at a height. ρ = p·M/(R·T)
 * @param heightM −1000 to 11 000
 * @param temperatureC null: the standard temperature of that height
 * @returns kg/m³, dry
 * @throws RangeError outside, and at or below absolute zero
 * @source aero reference 2.7, International Standard Atmosphere, READ via open transcriptions
 * @example airDensity(1000) // 1.1116
 */
export function airDensity(heightM: number, temperatureC: number | null = null): number {
  const celsius = temperatureC ?? SEA_LEVEL_K - LAPSE_K_PER_M * heightM - ZERO_K
  return densityOf(airPressure(heightM), celsius)
}

/**
 * Density of air from a barometer, damp or dry. ρ = ((p − e)·M + e·M_w)/(R·T), e = humidity · 610.94·exp(17.625·t/(t + 243.04))
 * @param humidity 0 to 1
 * @throws RangeError outside, for a pressure that is not positive, and at or below absolute zero
 * @source ideal gases; saturation after Magnus with the constants of Alduchov & Eskridge 1996, MEMORY; checked at 1.1533 and 1.1793
 * @example densityOf(101_325, 30, 0.6) // 1.1533
 */
export function densityOf(pressurePa: number, temperatureC: number, humidity = 0): number {
  const kelvin = temperatureC + ZERO_K
  if (!(pressurePa > 0 && kelvin > 0 && humidity >= 0 && humidity <= 1)) throw new RangeError('densityOf: out of range')
  const vapourPa = humidity === 0 ? 0 : humidity * 610.94 * Math.exp((17.625 * temperatureC) / (temperatureC + 243.04))
  return ((pressurePa - vapourPa) * MOLAR_KG + vapourPa * WATER_MOLAR_KG) / (GAS_CONSTANT * kelvin)
}

/**
 * Gauge pressure of a sealed tyre after a change of temperature and height: ideal gas, fixed volume.
 * @param bar gauge; temperatures in °C, heights in m
 * @source tyres reference 3.15, DERIVED
 * @example gaugeAfter(5, { fromC: 20, toC: 0, fromM: 0, toM: 0 }) // 4.59
 */
export function gaugeAfter(
  bar: number,
  { fromC, toC, fromM, toM }: { fromC: number; toC: number; fromM: number; toM: number },
): number {
  const [before, after] = [airPressure(fromM) / 1e5, airPressure(toM) / 1e5]
  return ((bar + before) * (toC + ZERO_K)) / (fromC + ZERO_K) - after
}
