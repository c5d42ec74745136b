import { arrhenius, GAS_CONSTANT } from './arrhenius';

const FARADAY = 96485;
const CELL_AH = 3;

export interface SchimpeUse {
  temperatureC: number;
  /** State of charge of storage, 0..1. */
  storageSocFraction: number;
  hours: number;
  /** Charge through the 3 Ah cell both ways, and into it, Ah. */
  totalAh: number;
  chargeAh: number;
  chargeA: number;
  /** State of charge while charging, 0..1; the fourth term acts above 0.82. */
  chargingSocFraction: number;
}

export interface SchimpeLoss {
  calendar: number;
  cycleHighTemperature: number;
  cycleLowTemperature: number;
  cycleLowTemperatureHighSoc: number;
  total: number;
}

/**
 * Capacity lost, fraction of rated, by the four-term model of a 3 Ah cell.
 * Source: M. Schimpe et al. 2018, J. Electrochem. Soc. 165, A181-A193.
 */
export function schimpeLoss(use: SchimpeUse): SchimpeLoss {
  const { temperatureC, storageSocFraction, hours, totalAh, chargeAh, chargeA, chargingSocFraction } = use;
  const rates = schimpeCycleRates(temperatureC, chargeA);
  const calendar = schimpeCalendarRate(temperatureC, storageSocFraction) * Math.sqrt(hours);
  const cycleHighTemperature = rates.highTemperature * Math.sqrt(totalAh);
  const cycleLowTemperature = rates.lowTemperature * Math.sqrt(chargeAh);
  const cycleLowTemperatureHighSoc = chargingSocFraction > 0.82 ? rates.lowTemperatureHighSoc * chargeAh : 0;
  const total = calendar + cycleHighTemperature + cycleLowTemperature + cycleLowTemperatureHighSoc;
  return { calendar, cycleHighTemperature, cycleLowTemperature, cycleLowTemperatureHighSoc, total };
}

/** Calendar rate, per square root of an hour. */
export function schimpeCalendarRate(temperatureC: number, socFraction: number): number {
  const drive = (0.384 * FARADAY * (0.123 - anodePotential(socFraction))) / (GAS_CONSTANT * 298.15);
  return 3.694e-4 * arrhenius(20592, temperatureC) * (Math.exp(drive) + 0.142);
}

/** Rates of the cycle terms: per sqrt(Ah), per sqrt(Ah) of charge, and per Ah of charge above 82 %. */
export function schimpeCycleRates(temperatureC: number, chargeA: number) {
  const excess = (chargeA - CELL_AH) / CELL_AH;
  return {
    highTemperature: 1.456e-4 * arrhenius(32699, temperatureC),
    lowTemperature: 4.009e-4 * arrhenius(-55546, temperatureC) * Math.exp(2.64 * excess),
    lowTemperatureHighSoc: 2.031e-6 * arrhenius(-233000, temperatureC) * Math.exp(7.84 * excess),
  };
}

/** Open-circuit potential of the graphite anode, V, at a state of charge of the cell. After Safari and Delacourt 2011. */
export function anodePotential(socFraction: number): number {
  const x = 0.0085 + socFraction * (0.78 - 0.0085);
  return (
    0.6379 +
    0.5416 * Math.exp(-305.5309 * x) +
    0.044 * Math.tanh(-(x - 0.1958) / 0.1088) -
    0.1978 * Math.tanh((x - 1.0571) / 0.0854) -
    0.6875 * Math.tanh((x + 0.0117) / 0.0529) -
    0.0175 * Math.tanh((x - 0.5692) / 0.0875)
  );
}
