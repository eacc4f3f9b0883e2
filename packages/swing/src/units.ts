/** What people read and write; inside all is metres, metres a second, degrees Celsius. */

export const METRES_PER_YARD = 0.9144
export const METRES_PER_FOOT = 0.3048
const MPS_PER_MPH = 0.44704

export const toYards = (metres: number): number => metres / METRES_PER_YARD
export const fromYards = (yards: number): number => yards * METRES_PER_YARD
export const toMph = (mps: number): number => mps / MPS_PER_MPH
export const fromMph = (mph: number): number => mph * MPS_PER_MPH
export const toFahrenheit = (celsius: number): number => (celsius * 9) / 5 + 32
export const fromFahrenheit = (fahrenheit: number): number => ((fahrenheit - 32) * 5) / 9
