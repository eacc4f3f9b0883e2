/** The air that a ball flies through. */
export interface Air {
  densityKgM3: number
  /** The wind's own motion, towards the target and to the right, in metres a second. */
  windAlongMps: number
  windRightMps: number
}

const SEA_LEVEL_PA = 101_325
const SEA_LEVEL_KELVIN = 288.15
const LAPSE_KELVIN_PER_METRE = 0.0065
const GAS_CONSTANT = 287.05287
const PRESSURE_POWER = 5.25588

/** The standard atmosphere's own temperature at an altitude, in °C. */
export const standardCelsius = (altitudeMetres: number): number =>
  SEA_LEVEL_KELVIN - LAPSE_KELVIN_PER_METRE * altitudeMetres - 273.15

/**
 * Density of dry air in kg/m³: the International Standard Atmosphere's pressure at that altitude
 * (valid to 11 km), with the temperature of the day where it is given.
 */
export function airDensityKgM3(of: { altitudeMetres: number; celsius?: number }): number {
  const { altitudeMetres, celsius = standardCelsius(altitudeMetres) } = of
  const standard = SEA_LEVEL_KELVIN - LAPSE_KELVIN_PER_METRE * altitudeMetres
  const pressure = SEA_LEVEL_PA * (standard / SEA_LEVEL_KELVIN) ** PRESSURE_POWER
  return pressure / (GAS_CONSTANT * (celsius + 273.15))
}
