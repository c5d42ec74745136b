import type { RecordContent } from '@/lib/contract/records';
import type { Standing } from '@/lib/contract/standing';
import { calendarDateOf } from '@/lib/units';

import type { LoadedBank } from '../banks/queries';
import type { Check } from '../db/models';

const round = (value: number, step: number) => Number((Math.round(value / step) * step).toFixed(6));
const roundUp = (value: number, step: number) => Number((Math.ceil(value / step - 1e-9) * step).toFixed(6));

/**
 * What a health record says of a bank: figures rounded more coarsely than public rows, so that one is not told by the
 * other; no name, pseudonym, place, climate or price.
 */
export function recordContent(
  bank: LoadedBank,
  {
    checks,
    setAside,
    standing,
    now,
  }: { checks: readonly Check[]; setAside: ReadonlySet<string>; standing: Standing; now: Date },
): RecordContent {
  const { cellType, parallel, series, firstUseMonth, bought, clamping } = bank;
  const [ratedAh, nominalV] = [cellType.ratedAh * parallel, round(cellType.nominalV * series, 0.1)];
  return {
    format: 1,
    issuedOn: calendarDateOf(now),
    bank: {
      ...{
        maker: cellType.maker,
        cellType: cellType.name,
        parallel,
        series,
        ratedAh,
        nominalV,
        bought,
        clamping,
      },
      energyKwh: round((ratedAh * nominalV) / 1000, 0.1),
      firstUseYear: Number(firstUseMonth.slice(0, 4)),
    },
    checks: checks.map(({ id, testedOn, ageYears, efc, computed, uploadId }) => ({
      month: testedOn.slice(0, 7),
      years: round(ageYears, 0.25),
      efc: round(efc, 50),
      sohFraction: round(computed.sohFraction, 0.01),
      plusMinusFraction: roundUp(
        (computed.expandedAh / computed.capacityRefAh) * computed.sohFraction,
        0.005,
      ),
      isFromLog: uploadId !== null,
      isSetAside: setAside.has(id),
    })),
    standing: roundStanding(standing),
  };
}

function roundStanding(standing: Standing): RecordContent['standing'] {
  const { state, notes, basis, checksUsed, use, outside, bands, pace, forecast } = standing;
  const ranged = (
    { estimate, lower, upper }: { estimate: number; lower: number; upper: number },
    step: number,
  ) => ({
    estimate: round(estimate, step),
    lower: round(lower, step),
    upper: round(upper, step),
  });
  return {
    ...{ state, notes, basis, checksUsed },
    use: use && {
      depthFraction: round(use.depthFraction, 0.05),
      dischargeIt: round(use.dischargeIt, 0.05),
      temperatureC: round(use.temperatureC, 1),
      socMeanFraction: round(use.socMeanFraction, 0.05),
      isClamped: use.isClamped,
      efcPerYear: round(use.efcPerYear, 10),
    },
    outside: outside.map(({ condition, value, nearest }) => ({
      condition,
      value: typeof value === 'number' ? round(value, outsideSteps[condition]) : value,
      nearest: typeof nearest === 'number' ? round(nearest, outsideSteps[condition]) : nearest,
    })),
    bands: bands.map(({ years, efc, quantiles, status }) => ({
      ...{ status, years: round(years, 0.05), efc: round(efc, 10) },
      quantiles: quantiles.map((quantile) => round(quantile, 0.001)),
    })),
    pace: pace && { fasterFraction: ranged(pace.fasterFraction, 0.01), ratio: ranged(pace.ratio, 0.05) },
    forecast: forecast && {
      ...{ inYear: forecast.inYear, status: forecast.status, support: forecast.support },
      years: ranged(forecast.years, 1),
      efc: ranged(forecast.efc, 100),
      passedFraction: round(forecast.passedFraction, 0.01),
      calendarFraction: ranged(forecast.calendarFraction, 0.01),
    },
  };
}

const outsideSteps = {
  depthFraction: 0.05,
  dischargeIt: 0.05,
  temperatureC: 1,
  socMeanFraction: 0.05,
  efcPerYear: 10,
  isClamped: 1,
} as const;
