import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

/** Seeded draws of one stream. */
export interface Draws {
  uniform: (min: number, max: number) => number;
  normal: (mean: number, sd: number) => number;
  /** Normal, held within bounds. */
  normalWithin: (mean: number, sd: number, min: number, max: number) => number;
  int: (min: number, max: number) => number;
  chance: (probability: number) => boolean;
  pick: <T>(items: readonly T[]) => T;
  /** Picks a key with a probability in proportion to its weight. */
  weighted: <K extends string>(weights: Readonly<Record<K, number>>) => K;
  shuffled: <T>(items: readonly T[]) => T[];
  uuid: () => string;
}

/**
 * A stream of draws of its own for each seed and path (say bank 12), so that a change to one bank's draws leaves the
 * others as they were.
 */
export function createDraws(seed: number, ...path: number[]): Draws {
  const random = xoroshiro128plus(path.reduce(mix, mix(0x5bd1e995, seed)));
  const unit = () => uniformFloat64(random);
  const uniform = (min: number, max: number) => min + (max - min) * unit();
  const int = (min: number, max: number) => uniformInt(random, min, max);
  // Box-Muller; 1 - u keeps the logarithm off zero.
  const normal = (mean: number, sd: number) =>
    mean + sd * Math.sqrt(-2 * Math.log(1 - unit())) * Math.cos(2 * Math.PI * unit());
  const pick = <T>(items: readonly T[]): T => items[int(0, items.length - 1)] as T;
  return {
    uniform,
    normal,
    normalWithin: (mean, sd, min, max) => Math.min(max, Math.max(min, normal(mean, sd))),
    int,
    chance: (probability) => unit() < probability,
    pick,
    weighted: (weights) => pickWeighted(weights, unit()),
    shuffled: (items) => {
      const list = [...items];
      for (let last = list.length - 1; last > 0; last--) {
        const other = int(0, last);
        [list[last], list[other]] = [list[other]!, list[last]!];
      }
      return list;
    },
    uuid: () => {
      const hex = Array.from({ length: 8 }, () => int(0, 0xffff).toString(16).padStart(4, '0')).join('');
      const variant = pick(['8', '9', 'a', 'b']);
      return [
        hex.slice(0, 8),
        hex.slice(8, 12),
        `4${hex.slice(13, 16)}`,
        `${variant}${hex.slice(17, 20)}`,
        hex.slice(20),
      ].join('-');
    },
  };
}

function pickWeighted<K extends string>(weights: Readonly<Record<K, number>>, unit: number): K {
  const keys = Object.keys(weights) as K[];
  let left = unit * keys.reduce((sum, key) => sum + weights[key], 0);
  for (const key of keys) {
    left -= weights[key];
    if (left < 0) return key;
  }
  return keys[keys.length - 1] as K;
}

function mix(hash: number, value: number): number {
  let mixed = Math.imul(hash ^ value, 0x9e3779b1);
  mixed = Math.imul(mixed ^ (mixed >>> 15), 0x85ebca6b);
  return (mixed ^ (mixed >>> 13)) | 0;
}

/** Rounds to a step: (0.347, 0.05) is 0.35, without the tail of binary fractions. */
export function toStep(value: number, step: number): number {
  return Number((Math.round(value / step) * step).toFixed(6));
}

/** Holds a value within bounds. */
export function held(value: number, min: number, max: number): number {
  return Math.min(max, Math.max(min, value));
}
