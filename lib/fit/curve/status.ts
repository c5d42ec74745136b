import type { LifeStatus } from './types';

/** How far past the reach a figure lies: to 1x measured, to 2x projected, to 3x extrapolated. */
export function statusAt(value: number, reach: number): LifeStatus {
  if (!(reach > 0)) throw new RangeError('statusAt requires a positive reach');
  if (value <= reach) return 'measured';
  if (value <= 2 * reach) return 'projected';
  return value <= 3 * reach ? 'extrapolated' : 'beyond';
}
