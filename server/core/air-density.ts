const SEA_LEVEL_PA = 101_325
const SEA_LEVEL_K = 288.15
const LAPSE_K_PER_M = 0.0065
const MOLAR_KG = 0.0289644
const GAS_CONSTANT = 8.31432
const EXPONENT = (9.80665 * MOLAR_KG) / (GAS_CONSTANT * LAPSE_K_PER_M)

/** Pressure of the standard atmosphere, Pa. @param heightM -1000 to 11 000 @source International Standard Atmosphere, READ via open transcriptions */
export const airPressure = (heightM: number) => SEA_LEVEL_PA * (1 - (LAPSE_K_PER_M * heightM) / SEA_LEVEL_K) ** EXPONENT

/**
 * Density of dry air. ρ = p·M/(R·T)
 * @param temperatureC null: the standard temperature of that height
 * @returns kg/m³
 * @source aero reference 2.7, International Standard Atmosphere, READ via open transcriptions
 * @example airDensity(1000) // 1.1116
 */
export function airDensity(heightM: number, temperatureC: number | null = null): number {
  const kelvin = temperatureC === null ? SEA_LEVEL_K - LAPSE_K_PER_M * heightM : temperatureC + 273.15
  return (airPressure(heightM) * MOLAR_KG) / (GAS_CONSTANT * kelvin)
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
  return ((bar + before) * (toC + 273.15)) / (fromC + 273.15) - after
}
