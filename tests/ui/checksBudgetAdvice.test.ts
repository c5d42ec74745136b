import { budgetAdvice, budgetHalves } from '@/components/checks/budgetAdvice';
import { budgetOf } from '@/lib/measure';

const budgetWith = (parts: { name: string; relSd: number }[]) => ({
  budget: { newEachCheck: budgetOf(parts), sameEachCheck: budgetOf([{ name: 'gain', relSd: 0.003 }]) },
  capacityRefAh: 100,
  expandedAh: 2 * 100 * Math.hypot(...parts.map(({ relSd }) => relSd)),
});

it('names the largest part, and what the ± would be without it', () => {
  // 2 x 100 Ah x 0.003 = 0.6 Ah without, 2 x 100 Ah x 0.005 = 1 Ah with it.
  const advice = budgetAdvice(
    budgetWith([
      { name: 'reading', relSd: 0.003 },
      { name: 'imbalance', relSd: 0.004 },
    ]),
  );
  expect(advice).toMatch(/^What would reduce it most: both cell voltages read/);
  expect(advice).toMatch(/±0\.60\s?Ah in place of ±1\.0\s?Ah\.$/);
});

it('says nothing where there is nothing to reduce', () => {
  expect(budgetAdvice(budgetWith([]))).toBeUndefined();
  expect(budgetHalves({ relSdMeter: 0, relSdNew: 0 })).toEqual([]);
});

it('splits the variance of one capacity into its two parts, the new one first', () => {
  // 0.004² / (0.003² + 0.004²) = 16 / 25.
  const [fresh, meter] = budgetHalves({ relSdMeter: 0.003, relSdNew: 0.004 });
  expect(fresh?.fraction).toBeCloseTo(0.64, 12);
  expect(meter?.fraction).toBeCloseTo(0.36, 12);
});
