import type { Rule } from '../screenTypes';
import { alikeAccounts } from './alikeAccounts';
import { burst } from './burst';
import { capacityDrop } from './capacityDrop';
import { capacityRise } from './capacityRise';
import { cellForBank } from './cellForBank';
import { cellSpread } from './cellSpread';
import { counterBackwards } from './counterBackwards';
import { counterCalendar } from './counterCalendar';
import { counterDepth } from './counterDepth';
import { counterRate } from './counterRate';
import { counterStill } from './counterStill';
import { counterUnit } from './counterUnit';
import { cutoffReached } from './cutoffReached';
import { duplicate } from './duplicate';
import { endedByBms } from './endedByBms';
import { energyUnit } from './energyUnit';
import { fullCharge } from './fullCharge';
import { kWhForAh } from './kWhForAh';
import { layoutSwapped } from './layoutSwapped';
import { logAgainstTyped } from './logAgainstTyped';
import { logGaps } from './logGaps';
import { mAhForAh } from './mAhForAh';
import { meanVoltage } from './meanVoltage';
import { parallelTwice } from './parallelTwice';
import { personalText } from './personalText';
import { poolResidual } from './poolResidual';
import { ratedCapacity } from './ratedCapacity';
import { rateDuration } from './rateDuration';
import { sameCurve } from './sameCurve';
import { sameLog } from './sameLog';
import { samePhoto } from './samePhoto';
import { seriesAddedUp } from './seriesAddedUp';
import { temperatureUnit } from './temperatureUnit';
import { testRate } from './testRate';
import { testTemperature } from './testTemperature';
import { typicalCycles } from './typicalCycles';
import { whForAh } from './whForAh';

/** Every rule, in the order findings of one severity are shown. */
export const rules: readonly Rule[] = [
  cellForBank,
  parallelTwice,
  seriesAddedUp,
  whForAh,
  kWhForAh,
  mAhForAh,
  layoutSwapped,
  ratedCapacity,
  capacityRise,
  capacityDrop,
  duplicate,
  sameLog,
  sameCurve,
  samePhoto,
  counterBackwards,
  counterCalendar,
  counterRate,
  counterUnit,
  counterStill,
  counterDepth,
  typicalCycles,
  energyUnit,
  meanVoltage,
  rateDuration,
  cutoffReached,
  fullCharge,
  endedByBms,
  cellSpread,
  temperatureUnit,
  testTemperature,
  testRate,
  logGaps,
  logAgainstTyped,
  poolResidual,
  burst,
  alikeAccounts,
  personalText,
];
