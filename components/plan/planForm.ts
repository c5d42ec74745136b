import { z } from 'zod';

import { numberText, optionalNumberText } from '@/components/forms';
import { minorUnitsOf } from '@/lib/units';
import type { PlanInput } from '@/lib/plan';

/** In place of a cell type: the average of the pool. */
export const averageCell = 'average';

/** What is typed into a plan, as typed. */
export type PlanText = typeof defaultPlan;

export const defaultPlan = {
  cell: averageCell,
  night: '6',
  hours: '6',
  peak: '2500',
  size: '15',
  usable: '90',
  heat: '25',
  level: '50',
  clamped: 'no' as 'yes' | 'no',
  efficiency: '90',
  currency: 'EUR',
  cells: '1800',
  other: '900',
  upkeep: '0',
  charging: '0.08',
  tariff: '0.30',
  discount: '3',
  fixture: '',
};

export const planKeys = Object.keys(defaultPlan) as (keyof PlanText)[];

const between = (lowest: number, highest: number, unit: string) =>
  numberText(
    z
      .number()
      .min(lowest, `At least ${lowest}${unit && ` ${unit}`}.`)
      .max(highest, `At most ${highest}${unit && ` ${unit}`}.`),
  );

/** What a plan needs beside the model: read from what was typed. */
export interface PlanChoices {
  /** Id of a cell type, or the average. */
  cell: string;
  currency: string;
  fixtureMinor: number | null;
  input: PlanInput;
}

export const planSchema: z.ZodType<PlanChoices, PlanText> = z
  .object({
    cell: z.string().max(80),
    night: between(0.1, 200, 'kWh'),
    hours: between(1, 24, 'h'),
    peak: between(1, 100_000, 'W'),
    size: between(0.5, 1000, 'kWh'),
    usable: between(10, 100, '%'),
    heat: between(-10, 55, '°C'),
    level: between(5, 95, '%'),
    clamped: z.enum(['yes', 'no']),
    efficiency: between(50, 100, '%'),
    currency: z.string().regex(/^[A-Z]{3}$/, 'Choose a currency.'),
    cells: between(1, 10_000_000, ''),
    other: between(0, 10_000_000, ''),
    upkeep: between(0, 1_000_000, ''),
    charging: between(0, 1000, ''),
    tariff: between(0, 1000, ''),
    discount: between(0, 30, '%'),
    fixture: optionalNumberText(z.number().min(0, 'At least 0.').max(1_000_000, 'At most 1,000,000.')),
  })
  .transform((typed) => {
    const minor = (amount: number) => minorUnitsOf(amount, typed.currency);
    // A price per kWh is below a minor unit often enough: 0.085 is 8.5 cents.
    const minorPerKwh = (amount: number) => (amount * minorUnitsOf(1000, typed.currency)) / 1000;
    return {
      cell: typed.cell,
      currency: typed.currency,
      fixtureMinor: typed.fixture === null ? null : minor(typed.fixture),
      input: {
        nightWh: typed.night * 1000,
        nightHours: typed.hours,
        peakW: typed.peak,
        ratedWh: typed.size * 1000,
        usableFraction: typed.usable / 100,
        nightsPerYear: 365,
        temperatureC: typed.heat,
        socMeanFraction: typed.level / 100,
        isClamped: typed.clamped === 'yes',
        roundTripFraction: typed.efficiency / 100,
        cellsMinor: minor(typed.cells),
        otherMinor: minor(typed.other),
        upkeepMinorPerYear: minor(typed.upkeep),
        chargingMinorPerKwh: minorPerKwh(typed.charging),
        tariffMinorPerKwh: minorPerKwh(typed.tariff),
        discountRate: typed.discount / 100,
      },
    };
  });
