/** Gas constant as the papers used it, J/(mol K). */
export const GAS_CONSTANT = 8.314;
const REFERENCE_K = 298.15;

export const kelvin = (temperatureC: number) => temperatureC + 273.15;

/** exp(-Ea/R (1/T - 1/298.15 K)): 1 at 25 °C. `activationJ` in J/mol. */
export function arrhenius(activationJ: number, temperatureC: number): number {
  return Math.exp((-activationJ / GAS_CONSTANT) * (1 / kelvin(temperatureC) - 1 / REFERENCE_K));
}
