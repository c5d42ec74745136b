import { growthShares, type GrowthPoint } from '@/lib/contract/standing';
import { banksAt, type PublishedFit, statusOf, type Use } from '@/lib/fit';

const points = 24;
/** The model has ln(years): a chart begins a few days after the start. */
const firstYears = 0.02;
/** How far past the last check the chart goes at least, years. */
const ahead = 4;

/**
 * Where banks used like this one lie over the years, up to a few years past its last check but no further than three
 * times the reach. Denser early, where the fade is steep, with points where the standing changes.
 */
export function growthBands(
  fit: PublishedFit,
  use: Use,
  { cellType, reach, lastYears }: { cellType: string | undefined; reach: number; lastYears: number },
): GrowthPoint[] {
  const end = Math.min(Math.max(lastYears + ahead, reach), Math.max(3 * reach, lastYears));
  const turns = [reach, 2 * reach, 3 * reach].filter((turn) => turn <= end);
  const grid = Array.from({ length: points + 1 }, (_, i) => Math.max(firstYears, end * (i / points) ** 2));
  return [...new Set([...grid, ...turns])]
    .sort((a, b) => a - b)
    .map((years) => ({
      ...{ years, efc: years * use.efcPerYear, status: statusOf(years, reach) },
      quantiles: banksAt(fit, use, years, growthShares, cellType === undefined ? {} : { cellType }),
    }));
}
