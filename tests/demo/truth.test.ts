import { cellTypes } from '@/data/demo/cellTypes';
import { claimedFade, claimsOf, type DemoClaim } from '@/data/demo/claims';
import { rootOf, scenarios, trueFade, trueSoh, truth, trueYearsTo80 } from '@/data/demo/truth';

describe('the demo truth', () => {
  test('is the pooled model: a use worked by hand from its equation', () => {
    // q = A sqrt(t) + B (n/500)^z (D/0.5)^bD (C/0.2)^bC at 25 °C, half full; numbers from the table in the README.
    const q = 0.03 * Math.sqrt(5) + 0.0365 * (1095 / 500) ** 0.62 * 1.2 ** 0.28 * 0.5 ** 0.1;
    expect(trueFade(scenarios.standard, 5, 1095)).toBeCloseTo(q, 12);
    expect(trueSoh(scenarios.standard, 5, 1095)).toBeCloseTo(Math.exp(0.02) * (1 - q), 12);
  });

  test('puts 80 % after 11 to 14 years of typical home use and after 6 to 8 of hard use', () => {
    for (const use of [scenarios.standard, scenarios.typical, scenarios.typicalClamped]) {
      expect(trueYearsTo80(use)).toBeGreaterThan(11);
      expect(trueYearsTo80(use)).toBeLessThan(14);
    }
    for (const use of [scenarios.hard, scenarios.hardClamped]) {
      expect(trueYearsTo80(use)).toBeGreaterThan(6);
      expect(trueYearsTo80(use)).toBeLessThan(8);
    }
  });

  test('lets clamping do nothing up to 0.3 It and something above', () => {
    const ratio = (dischargeIt: number) => {
      const use = { ...scenarios.typical, dischargeIt };
      return trueYearsTo80({ ...use, isClamped: true }) / trueYearsTo80(use);
    };
    expect(ratio(0.1)).toBe(1);
    expect(ratio(0.3)).toBe(1);
    expect(ratio(0.4)).toBeGreaterThan(1.1);
    expect(ratio(0.4)).toBeLessThan(1.35);
  });

  test('spreads its cell types about the average one', () => {
    const banks = cellTypes.reduce((sum, cellType) => sum + cellType.banks, 0);
    const mean = cellTypes.reduce((sum, cellType) => sum + cellType.banks * cellType.effect, 0) / banks;
    expect(Math.abs(mean)).toBeLessThan(0.02);
    const lives = cellTypes.map(({ effect }) => trueYearsTo80(scenarios.standard, effect));
    expect(Math.min(...lives)).toBeLessThan(6);
    expect(Math.max(...lives)).toBeGreaterThan(20);
  });
});

/** Years to 80 % at the standard use that a claim implies: one kappa on the fade, as calculation 5 of the product. */
function impliedYears(claim: DemoClaim): number {
  const lost = (share: number) => 1 - share / Math.exp(truth.c0);
  const kappa = lost(claim.endOfLifeFraction) / claimedFade(claim, claim.cycles);
  const { standard } = scenarios;
  return rootOf(
    (years) => kappa * trueFade(standard, years, standard.efcPerYear * years) - lost(0.8),
    0.01,
    500,
  );
}

describe('the quoted claims', () => {
  const stated = cellTypes.flatMap((cellType) =>
    claimsOf(cellType)
      .filter(({ depthFraction }) => depthFraction !== null)
      .map((claim) => ({ cellType, claim, name: `${cellType.name}: ${claim.whereItStands}` })),
  );

  test.each(stated)('$name implies the life it is documented to', ({ cellType, claim }) => {
    const ratio = trueYearsTo80(scenarios.standard, cellType.effect) / impliedYears(claim);
    // Makers round to 100 cycles: 3 % of the fewest claimed, which the exponent of about 0.6 does not enlarge.
    expect(Math.abs(ratio / cellType.labelRatio - 1)).toBeLessThan(0.03);
  });

  test('two cell types are much better than their label, two much worse, some labels state no conditions', () => {
    expect(cellTypes.filter(({ labelRatio }) => labelRatio >= 1.4)).toHaveLength(2);
    expect(cellTypes.filter(({ labelRatio }) => labelRatio <= 0.65)).toHaveLength(2);
    const unstated = cellTypes.flatMap(claimsOf).filter(({ depthFraction }) => depthFraction === null);
    expect(unstated.length).toBeGreaterThanOrEqual(3);
    expect(
      unstated.every(({ dischargeIt, temperatureC }) => dischargeIt === null && temperatureC === null),
    ).toBe(true);
  });
});
