import type { Rule } from '../screenTypes';
import { capacityDrop } from './capacityDrop';
import { capacityRise } from './capacityRise';
import { cellForBank } from './cellForBank';
import { cellSpread } from './cellSpread';
import { counterBackwards } from './counterBackwards';
import { counterCalendar } from './counterCalendar';
import { counterDepth } from './counterDepth';
import { cutoffReached } from './cutoffReached';
import { duplicate } from './duplicate';
import { endedByBms } from './endedByBms';
import { fullCharge } from './fullCharge';
import { logAgainstTyped } from './logAgainstTyped';
import { logGaps } from './logGaps';
import { mAhForAh } from './mAhForAh';
import { meanVoltage } from './meanVoltage';
import { parallelTwice } from './parallelTwice';
import { ratedCapacity } from './ratedCapacity';
import { rateDuration } from './rateDuration';
import { sameLog } from './sameLog';
import { seriesAddedUp } from './seriesAddedUp';
import { testRate } from './testRate';
import { testTemperature } from './testTemperature';
import { whForAh } from './whForAh';

/** Every rule, in the order findings of one severity are shown. */
export const rules: readonly Rule[] = [
  cellForBank,
  parallelTwice,
  seriesAddedUp,
  whForAh,
  mAhForAh,
  ratedCapacity,
  capacityRise,
  capacityDrop,
  duplicate,
  sameLog,
  counterBackwards,
  counterCalendar,
  counterDepth,
  meanVoltage,
  rateDuration,
  cutoffReached,
  fullCharge,
  endedByBms,
  cellSpread,
  testTemperature,
  testRate,
  logGaps,
  logAgainstTyped,
];
