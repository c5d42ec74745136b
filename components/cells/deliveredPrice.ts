import type { CellEntry, Estimate } from '@/lib/contract/cells';
import { currencyDecimals } from '@/lib/units';

import { toldOf } from './lifeWords';

export type DeliveredPrice =
  { ok: true; currency: string; perKwh: Estimate } | { ok: false; reason: 'notEnoughPrices' | 'noLife' };

/**
 * What a kWh delivered costs over a cell's life at the use shown: the median price owners gave for a cell over the
 * energy it delivers until 80 %, its full cycles times its rated Ah and nominal V. The cells alone, without what else
 * a bank needs; the range is the life's.
 */
export function deliveredPrice({
  cellType,
  life,
  price,
}: Pick<CellEntry, 'life' | 'price'> & { cellType: { ratedAh: number; nominalV: number } }): DeliveredPrice {
  if (!price) return { ok: false, reason: 'notEnoughPrices' };
  if (!life || life.basis !== 'cellType' || !['figure', 'range'].includes(toldOf(life)))
    return { ok: false, reason: 'noLife' };
  const perCell = price.perCellMinor / 10 ** currencyDecimals(price.currency);
  const perKwh = (efc: number) => perCell / ((efc * cellType.ratedAh * cellType.nominalV) / 1000);
  const { estimate, lower, upper } = life.efc;
  return {
    ok: true,
    currency: price.currency,
    perKwh: { estimate: perKwh(estimate), lower: perKwh(upper), upper: perKwh(lower) },
  };
}
