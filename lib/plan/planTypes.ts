import type { OutsidePool, PooledLife, Ranged } from '@/lib/fit/pooled/published';

import type { PathPoint } from './capacityPath';

/** What a plan is computed from. Energies Wh, money in minor units of one currency. */
export interface PlanInput {
  /** Energy the loads need each night, Wh. */
  nightWh: number;
  /** Hours over which the night's energy is drawn. */
  nightHours: number;
  /** Highest draw of the loads together, W. */
  peakW: number;
  /** Rated energy of the bank: rated Ah x nominal voltage x cells, Wh. */
  ratedWh: number;
  /** The deepest the limits let a night go, share of the present capacity, 0..1. */
  usableFraction: number;
  nightsPerYear: number;
  /** Mean cell temperature, °C. */
  temperatureC: number;
  /** Mean state of charge, 0..1. */
  socMeanFraction: number;
  isClamped: boolean;
  /** Energy to the loads / energy charged, 0..1. */
  roundTripFraction: number;
  cellsMinor: number;
  /** BMS, fuse, cabling, fixture, share of the inverter. */
  otherMinor: number;
  upkeepMinorPerYear: number;
  /** What a kWh of charging costs, or would have earned. */
  chargingMinorPerKwh: number;
  /** What a kWh delivered saves. */
  tariffMinorPerKwh: number;
  /** Discount rate a year: 0.04 is 4 %. */
  discountRate: number;
}

export interface PlanResult {
  /** The first night: depth of the present capacity, mean and peak rate in It. */
  first: { depthFraction: number; dischargeIt: number; peakIt: number };
  /** The typical bank, quarter by quarter. */
  points: PathPoint[];
  /** Life at the mean depth to its end: its status, support and what lies outside the pool. */
  life: PooledLife;
  /** Years to 80 % with the night's energy held; `isCapped` when they pass three times the reach and the plan stops there. */
  years: Ranged;
  isCapped: boolean;
  /** Years to 80 % if only time, or only cycles, took capacity. */
  calendarYears: number;
  cyclingYears: number;
  endedBy: 'calendar' | 'cycling';
  /** The year the night's energy no longer fits; null when it does to the end. 0: never fits. */
  shortYears: number | null;
  /** Energy given to the loads over the life. */
  deliveredKwh: Ranged;
  firstCostMinor: number;
  costMinorPerKwh: Ranged;
  /** Discounted savings less discounted costs over the life. */
  gainMinor: Ranged;
  breakEvenYears: number | null;
  outside: OutsidePool[];
}
