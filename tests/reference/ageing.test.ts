import {
  naumannCalendarLoss,
  naumannCalendarLossOver,
  naumannCycleLoss,
  naumannYearsToLoss,
} from '@/lib/fit/published/naumann';
import {
  anodePotential,
  schimpeCalendarRate,
  schimpeCycleRates,
  schimpeLoss,
} from '@/lib/fit/published/schimpe2018';
import { stroeCalendarLoss } from '@/lib/fit/published/stroe2016';
import { wangCycleLoss, wangThroughputToLoss, type WangRate } from '@/lib/fit/published/wang2011';
import { defaultPriors } from '@/lib/fit/pooled/priors';
import { readReferenceJson } from '../support/reference';

type Row<Key extends string> = Record<Key, number>;

// Source: ageing_models.json, worked in 40-digit arithmetic from the printed equations and coefficients.
const reference = readReferenceJson<{
  wang2011: {
    worked: Row<'c_rate' | 'temp_C' | 'Ah' | 'loss_percent'>[];
    worked_life_to_20_percent: Row<
      'c_rate' | 'temp_C' | 'dod' | 'Ah_to_20_percent' | 'cycles_to_20_percent_2p2Ah'
    >[];
  };
  naumann2018_calendar: {
    worked: Row<'temp_C' | 'soc' | 'years_of_365_d' | 'loss_percent'>[];
    worked_years_to_20_percent: Row<'temp_C' | 'soc' | 'years_of_365_d'>[];
    worked_changing_stress: { segments: Row<'temp_C' | 'soc' | 'seconds'>[]; loss_percent: number };
  };
  naumann2020_cycle: {
    worked: Row<'c_rate' | 'dod' | 'efc' | 'loss_percent'>[];
    worked_sum_with_calendar: Row<
      | 'temp_C'
      | 'mean_soc'
      | 'years_of_365_d'
      | 'c_rate'
      | 'dod'
      | 'efc_per_year'
      | 'calendar_percent'
      | 'cycle_percent'
      | 'total_percent'
    >[];
  };
  schimpe2018: {
    worked_anode_potential: Row<'soc' | 'Ua_V'>[];
    worked_k_cal: Row<'temp_C' | 'soc' | 'k_per_sqrt_h'>[];
    worked_k_cyc: Row<'temp_C' | 'I_charge_A' | 'k_highT' | 'k_lowT' | 'k_lowT_highSoC_above_82pc'>[];
    worked_total: Row<
      | 'temp_C'
      | 'storage_soc'
      | 'hours'
      | 'I_charge_A'
      | 'soc_during_charge'
      | 'Q_total_Ah'
      | 'Q_charge_Ah'
      | 'calendar'
      | 'cycle_high_T'
      | 'cycle_low_T'
      | 'cycle_low_T_high_SoC'
      | 'total_fraction'
    >[];
  };
  stroe2018_calendar: { worked: Row<'temp_C' | 'soc_percent' | 'months' | 'fade_percent'>[] };
}>('ageing_models.json');

// Pure formulas: relative 1e-9.
const near = (found: number, expected: number) =>
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(1e-9 * Math.abs(expected));

describe('Wang 2011', () => {
  it('gives the worked losses', () => {
    const { worked } = reference.wang2011;
    expect(worked).toHaveLength(60);
    for (const row of worked) {
      near(100 * wangCycleLoss(row.c_rate as WangRate, row.temp_C, row.Ah), row.loss_percent);
    }
  });

  it('gives the worked throughput to 20 % and the cycles of the 2.2 Ah cell', () => {
    for (const row of reference.wang2011.worked_life_to_20_percent) {
      const throughputAh = wangThroughputToLoss(row.c_rate as WangRate, row.temp_C, 0.2);
      near(throughputAh, row.Ah_to_20_percent);
      near(throughputAh / (2.2 * row.dod), row.cycles_to_20_percent_2p2Ah);
    }
  });
});

describe('Naumann 2018 and 2020', () => {
  it('gives the worked calendar losses and years to 20 %', () => {
    const { worked, worked_years_to_20_percent: lives } = reference.naumann2018_calendar;
    expect(worked).toHaveLength(75);
    for (const row of worked) {
      const period = { temperatureC: row.temp_C, socFraction: row.soc, years: row.years_of_365_d };
      near(100 * naumannCalendarLoss(period), row.loss_percent);
    }
    for (const row of lives) near(naumannYearsToLoss(row.temp_C, row.soc, 0.2), row.years_of_365_d);
  });

  it('adds the squares of losses when conditions change', () => {
    const { segments, loss_percent: expected } = reference.naumann2018_calendar.worked_changing_stress;
    const periods = segments.map((segment) => ({
      temperatureC: segment.temp_C,
      socFraction: segment.soc,
      years: segment.seconds / (365 * 86400),
    }));
    near(100 * naumannCalendarLossOver(periods), expected);
    near(naumannCalendarLossOver([...periods].reverse()), naumannCalendarLossOver(periods));
  });

  it('gives the worked cycle losses and sums', () => {
    const { worked, worked_sum_with_calendar: sums } = reference.naumann2020_cycle;
    expect(worked).toHaveLength(48);
    for (const row of worked) near(100 * naumannCycleLoss(row.c_rate, row.dod, row.efc), row.loss_percent);
    for (const row of sums) {
      const years = row.years_of_365_d;
      const calendar = naumannCalendarLoss({ temperatureC: row.temp_C, socFraction: row.mean_soc, years });
      const cycle = naumannCycleLoss(row.c_rate, row.dod, row.efc_per_year * years);
      near(100 * calendar, row.calendar_percent);
      near(100 * cycle, row.cycle_percent);
      near(100 * (calendar + cycle), row.total_percent);
    }
  });
});

describe('Schimpe 2018', () => {
  it('gives the worked potentials and rates', () => {
    const { worked_anode_potential, worked_k_cal, worked_k_cyc } = reference.schimpe2018;
    for (const row of worked_anode_potential) near(anodePotential(row.soc), row.Ua_V);
    for (const row of worked_k_cal) near(schimpeCalendarRate(row.temp_C, row.soc), row.k_per_sqrt_h);
    for (const row of worked_k_cyc) {
      const rates = schimpeCycleRates(row.temp_C, row.I_charge_A);
      near(rates.highTemperature, row.k_highT);
      near(rates.lowTemperature, row.k_lowT);
      near(rates.lowTemperatureHighSoc, row.k_lowT_highSoC_above_82pc);
    }
  });

  it('gives the worked totals, the fourth term above 82 % only', () => {
    const { worked_total: rows } = reference.schimpe2018;
    for (const row of rows) {
      const loss = schimpeLoss({
        temperatureC: row.temp_C,
        storageSocFraction: row.storage_soc,
        hours: row.hours,
        totalAh: row.Q_total_Ah,
        chargeAh: row.Q_charge_Ah,
        chargeA: row.I_charge_A,
        chargingSocFraction: row.soc_during_charge,
      });
      near(loss.calendar, row.calendar);
      near(loss.cycleHighTemperature, row.cycle_high_T);
      near(loss.cycleLowTemperature, row.cycle_low_T);
      near(loss.cycleLowTemperatureHighSoc, row.cycle_low_T_high_SoC);
      near(loss.total, row.total_fraction);
    }
    expect(new Set(rows.map((row) => row.cycle_low_T_high_SoC > 0)).size).toBe(2);
  });
});

describe('Stroe 2016', () => {
  it('gives the worked losses', () => {
    const { worked } = reference.stroe2018_calendar;
    expect(worked).toHaveLength(36);
    for (const row of worked) {
      near(100 * stroeCalendarLoss(row.temp_C, row.soc_percent / 100, row.months), row.fade_percent);
    }
  });
});

describe('the default priors beside the published studies', () => {
  const prior = (name: string) => {
    const found = defaultPriors.find((candidate) => candidate.name === name);
    if (!found) throw new Error(`no prior of ${name}`);
    return found;
  };

  // What the priors' description says of Naumann 2018 and 2020 in the terms of the pooled model, to the digits given.
  const calendarA = naumannCalendarLoss({ temperatureC: 25, socFraction: 0.5, years: 1 });
  const cycleB = naumannCycleLoss(0.2, 0.5, 500);
  const slope = (high: number, low: number, ratio: number) => Math.log(high / low) / Math.log(ratio);
  const depthSlope = slope(naumannCycleLoss(0.2, 0.9, 500), naumannCycleLoss(0.2, 0.5, 500), 0.9 / 0.5);
  const rateSlope = slope(naumannCycleLoss(0.8, 0.5, 500), naumannCycleLoss(0.1, 0.5, 500), 8);

  it('restates the studies correctly', () => {
    expect(calendarA).toBeCloseTo(0.0425, 4);
    expect(cycleB).toBeCloseTo(0.0267, 4);
    expect(depthSlope).toBeCloseTo(0.17, 2);
    expect(rateSlope).toBeCloseTo(0.17, 2);
  });

  it('has each published value within two standard deviations of its prior', () => {
    const published: [string, number][] = [
      ['lnA', Math.log(calendarA)],
      ['aT', 17.126],
      ['lnB', Math.log(cycleB)],
      ['z', 0.5],
      ['z', 0.55],
      ['bD', depthSlope],
      ['bC', rateSlope],
      ['bT', 31.7],
    ];
    for (const [name, value] of published) {
      const { mean, sd } = prior(name);
      expect(Math.abs(value - mean)).toBeLessThan(2 * sd);
    }
  });
});
