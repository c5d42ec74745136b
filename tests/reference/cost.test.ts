import {
  annuityFactor,
  breakEvenYears,
  capitalRecoveryFactor,
  discountFactor,
  levelisedCost,
} from '@/lib/plan';

import { readReferenceJson } from '../support/reference';

interface Inputs {
  capex: number;
  om: number;
  charge_price: number;
  eta: number;
  E: number[];
  r: number;
  resid?: number;
  repl?: Record<string, number>;
}
interface Cost {
  published_worked_example: {
    inputs: { capex_per_W: number; capacity_factor: number; years: number; rate: number; om_per_kWh: number };
    printed: { capital_part: number; total: number };
  };
  annuity: {
    table: {
      rate: number;
      years: number;
      annuity_factor: number;
      capital_recovery_factor: number;
      discount_factor: number;
    }[];
  };
  lcos: {
    name: string;
    inputs: Inputs;
    discounted_cost: number;
    discounted_kWh: number;
    cost_per_kWh: number;
  }[];
  geometric_fade: {
    E1_kWh: number;
    fade_per_year: number;
    rate: number;
    years: number;
    discounted_kWh: number;
  };
}

const cost = readReferenceJson<Cost>('cost.json');

describe('annuities', () => {
  it.each(cost.annuity.table)('at $rate over $years years are those of the table', (row) => {
    expect(annuityFactor(row.rate, row.years)).toBeCloseTo(row.annuity_factor, 10);
    expect(capitalRecoveryFactor(row.rate, row.years)).toBeCloseTo(row.capital_recovery_factor, 10);
    expect(discountFactor(row.rate, row.years)).toBeCloseTo(row.discount_factor, 10);
  });
});

describe('levelised cost', () => {
  // Exact rational arithmetic from the formula of Short, Packey and Holt, NREL/TP-462-5173, 1995 (named there from memory).
  it.each(cost.lcos)('$name', ({ inputs, ...expected }) => {
    const flows = inputs.E.map((deliveredKwh, i) => ({
      years: i + 1,
      deliveredKwh,
      cost:
        inputs.om + (deliveredKwh / inputs.eta) * inputs.charge_price + (inputs.repl?.[String(i + 1)] ?? 0),
    }));
    const got = levelisedCost(inputs.capex, flows, inputs.r, inputs.resid);
    expect(got.discountedCost / expected.discounted_cost).toBeCloseTo(1, 10);
    expect(got.discountedKwh / expected.discounted_kWh).toBeCloseTo(1, 10);
    expect(got.costPerKwh / expected.cost_per_kWh).toBeCloseTo(1, 10);
  });

  it('sums a geometric fade as its series does', () => {
    const { E1_kWh, fade_per_year, rate, years, discounted_kWh } = cost.geometric_fade;
    const flows = Array.from({ length: years }, (_, i) => ({
      years: i + 1,
      cost: 0,
      deliveredKwh: E1_kWh * (1 - fade_per_year) ** i,
    }));
    expect(levelisedCost(1, flows, rate).discountedKwh / discounted_kWh).toBeCloseTo(1, 10);
  });

  it('gives the published worked example: 0.1159 capital (cut off, as printed), 0.1559 in all', () => {
    const { inputs, printed } = cost.published_worked_example;
    const kwh = (inputs.capacity_factor * 8760) / 1000;
    const flows = Array.from({ length: inputs.years }, (_, i) => ({
      years: i + 1,
      deliveredKwh: kwh,
      cost: kwh * inputs.om_per_kWh,
    }));
    const { costPerKwh } = levelisedCost(inputs.capex_per_W, flows, inputs.rate);
    const cutOff = (value: number) => Math.floor(value * 1e4) / 1e4;
    expect(cutOff(costPerKwh)).toBe(printed.total);
    expect(cutOff(costPerKwh - inputs.om_per_kWh)).toBe(printed.capital_part);
  });

  it('is refused without energy', () => {
    expect(() => levelisedCost(100, [], 0.05)).toThrow(RangeError);
  });
});

describe('break-even', () => {
  it('is first cost / yearly gain without discount, and within its year', () => {
    const gains = [1, 2, 3, 4, 5].map((years) => ({ years, gain: 300 }));
    expect(breakEvenYears(1000, gains, 0)).toBeCloseTo(1000 / 300, 12);
    expect(breakEvenYears(1501, gains, 0)).toBeNull();
  });

  it('comes when the annuity of the gains equals the first cost', () => {
    const gains = Array.from({ length: 12 }, (_, i) => ({ years: i + 1, gain: 300 }));
    expect(breakEvenYears(300 * annuityFactor(0.05, 7), gains, 0.05)).toBeCloseTo(7, 9);
  });
});
