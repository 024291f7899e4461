import { requireThat } from './check.js';

/** Molar gas constant in kcal per mol and kelvin. */
const GAS_CONSTANT_KCAL = 1.9872e-3;
const ZERO_CELSIUS_IN_KELVIN = 273.15;

/**
 * Factor by which the rate of a reaction grows from this temperature to one a degree higher (Arrhenius' law). The default
 * activation energy is that of isoleucine in Mercenaria (Mitterer 1975, Earth and Planetary Science Letters 28, 275–282).
 *
 * @param celsius temperature in °C
 * @param activationEnergyKcal activation energy in kcal per mol, above 0; default 29.4
 * @throws RangeError when the temperature is not above absolute zero or the energy is not above 0
 * @example
 * ```ts
 * rateIncreasePerDegree(10); // => 1.2019
 * ```
 */
export function rateIncreasePerDegree(celsius: number, activationEnergyKcal = 29.4): number {
  const kelvin = celsius + ZERO_CELSIUS_IN_KELVIN;
  requireThat(kelvin > 0 && kelvin < Infinity, 'rateIncreasePerDegree', 'a temperature above -273.15', celsius);
  const energy = activationEnergyKcal;
  requireThat(energy > 0 && energy < Infinity, 'rateIncreasePerDegree', 'an energy above 0', energy);
  return Math.exp(energy / GAS_CONSTANT_KCAL / (kelvin * (kelvin + 1)));
}
