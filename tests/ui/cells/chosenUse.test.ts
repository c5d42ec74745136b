import fc from 'fast-check';

import { usePresets } from '@/components/chosenUse/presets';
import { oftenWords, useSentenceParts } from '@/components/chosenUse/sentenceParts';
import { standardUse } from '@/lib/contract/cells';
import { chosenUseQuery, chosenUseSearch, isStandardUse, readChosenUse } from '@/lib/contract/chosenUse';

describe('the use in an address', () => {
  test('is left out where it is the standard use, and read back from what is written', () => {
    expect(chosenUseSearch(standardUse)).toBe('');
    const use = { ...standardUse, depthFraction: 0.8, temperatureC: -5, isClamped: true };
    expect(chosenUseSearch(use)).toBe('?depth=80&heat=-5&clamped=yes');
    expect(readChosenUse(chosenUseQuery(use))).toEqual({ use, notes: [] });
  });

  test('comes back as it was for every use within its limits', () => {
    fc.assert(
      fc.property(
        fc.record({
          depthFraction: fc.integer({ min: 5, max: 100 }).map((percent) => percent / 100),
          dischargeIt: fc.integer({ min: 1, max: 200 }).map((hundredths) => hundredths / 100),
          temperatureC: fc.integer({ min: -20, max: 60 }),
          socMeanFraction: fc.integer({ min: 5, max: 95 }).map((percent) => percent / 100),
          isClamped: fc.boolean(),
          cyclesPerDay: fc.integer({ min: 1, max: 500 }).map((hundredths) => hundredths / 100),
        }),
        (use) => {
          const query = Object.fromEntries(new URLSearchParams(chosenUseSearch(use)));
          const { use: read, notes } = readChosenUse(query);
          expect(notes).toEqual([]);
          for (const key of Object.keys(use) as (keyof typeof use)[])
            expect(Number(read[key])).toBeCloseTo(Number(use[key]), 6);
        },
      ),
      { seed: 11 },
    );
  });

  test.each([
    [{ depth: '900' }, /a depth that is not a number from 5 to 100 %; 60 % is shown/],
    [{ depth: 'deep' }, /a depth/],
    [{ depth: ['60', '70'] }, /a depth/],
    [{ depth: '' }, /a depth/],
    [{ rate: '0' }, /a rate that is not a number from 0.01 to 2 It; 0.1 It/],
    [{ rate: '1e3' }, /a rate/],
    [{ heat: '-400' }, /a temperature that is not a number from −20 to 60 °C; 25 °C/],
    [{ full: 'NaN' }, /a mean charge level/],
    [{ cycles: 'Infinity' }, /cycles a day/],
    [{ clamped: 'maybe' }, /neither yes nor no/],
  ])('answers %j with a note and the standard use', (query, words) => {
    const { use, notes } = readChosenUse(query);
    expect(use).toEqual(standardUse);
    expect(notes).toEqual([expect.stringMatching(words)]);
  });

  test('keeps what makes sense beside what does not, and leaves other parameters alone', () => {
    const { use, notes } = readChosenUse({ depth: '900', heat: '30', band: 'depth:deep', __proto__: 'x' });
    expect(use).toEqual({ ...standardUse, temperatureC: 30 });
    expect(notes).toHaveLength(1);
  });
});

describe('uses by their names', () => {
  test('begin with the standard use, and can each be put into an address', () => {
    expect(isStandardUse(usePresets[0]!.use)).toBe(true);
    for (const { use } of usePresets) expect(readChosenUse(chosenUseQuery(use))).toEqual({ use, notes: [] });
  });
});

describe('the sentence', () => {
  test('says the standard use', () => {
    const words = useSentenceParts.map((part) => {
      if (typeof part === 'string') return part;
      const show = part.show as (value: unknown) => string;
      return show(standardUse[part.key]);
    });
    expect(words.join('').replaceAll('\u202f', ' ')).toBe(
      'Cycled 60 % deep at 0.1 It, once a day, near 25 °C, half full on average, not clamped.',
    );
  });

  test('has words for how often, also where no usual one fits', () => {
    expect(oftenWords(0.5)).toBe('every other day');
    expect(oftenWords(0.7)).toBe('0.7 times a day');
  });
});
