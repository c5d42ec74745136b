import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

/** Seeded random numbers. */
export interface Dice {
  /** In [0, 1). */
  uniform(): number;
  /** Standard normal. */
  normal(): number;
}

/** Dice of a seed: the same seed throws the same numbers (normals by Box and Muller's method). */
export function createDice(seed: number): Dice {
  const generator = xoroshiro128plus(seed);
  const uniform = () => uniformFloat64(generator);
  return {
    uniform,
    normal: () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform()),
  };
}
