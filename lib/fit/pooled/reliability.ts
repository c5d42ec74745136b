import { variance } from 'simple-statistics';
import type { PoolCheck, ValueSource } from '../poolCheck';
import type { InputReliability } from './effects';

/** Standard error of a condition by how it was obtained: judgement, no source. */
const errorSd: Record<'temperature' | 'soc', Record<ValueSource, number>> = {
  temperature: { metered: 0, readOff: 0.5, estimated: 2 },
  soc: { metered: 0, readOff: 0.03, estimated: 0.08 },
};
const lowestReliability = 0.3;

/**
 * Reliability of the two conditions that owners guess, at the pool's own mix of sources and its own spread: real
 * variance / observed variance between banks (README equation 23).
 */
export function inputReliability(checks: readonly PoolCheck[]): InputReliability {
  const banks = [...new Map(checks.map((check) => [check.bank, check])).values()];
  return {
    temperature: reliabilityOf(
      banks.map((check) => check.temperatureC),
      banks.map((check) => errorSd.temperature[check.temperatureSource ?? 'metered']),
    ),
    soc: reliabilityOf(
      banks.map((check) => check.socMeanFraction),
      banks.map((check) => errorSd.soc[check.socSource ?? 'metered']),
    ),
  };
}

function reliabilityOf(values: number[], errors: number[]): number {
  const noise = errors.reduce((sum, sd) => sum + sd * sd, 0) / errors.length;
  if (noise === 0 || values.length < 2) return 1;
  const observed = variance(values);
  return Math.max(lowestReliability, observed > 0 ? 1 - noise / observed : lowestReliability);
}
