import { findIsolations } from '@/scripts/attack/isolations';
import { publish } from '@/scripts/attack/publish';
import { randomPool } from '@/scripts/attack/randomPool';
import { switchedOff } from '@/scripts/attack/switchedOff';
import { type Protections, protections } from '@/server/publicView/protections';

jest.setTimeout(240_000);

const attack = (seed: number, by: Protections) => {
  const { shown, moderatorNames } = publish(randomPool(seed), by);
  return findIsolations(shown, moderatorNames);
};

describe('a curious visitor', () => {
  it.each([1, 2, 3])('isolates nobody in the random pool %i', (seed) => {
    expect(attack(seed, protections)).toEqual([]);
  });

  it.each(Object.entries(switchedOff))('finds somebody without: %s', (_name, off) => {
    const found = [1, 2, 3, 4, 5].some((seed) => attack(seed, off).length > 0);
    expect(found).toBe(true);
  });
});
