import type { BankSize } from '@/lib/measure';
import type { Bank } from '@/lib/contract/banks';

import type { SourcedField } from './checkValues';
import type { CheckFormHandle } from './formTypes';

type EstimatedField = Extract<
  SourcedField,
  'depthFraction' | 'dischargeIt' | 'temperatureMeanC' | 'socLowFraction' | 'socHighFraction'
>;

const asTyped = { shouldDirty: true, shouldTouch: true, shouldValidate: true } as const;

/** Writes estimates into their fields, each with its source set to "estimated". */
export function estimateInto({ setValue }: CheckFormHandle) {
  return (estimates: Partial<Record<EstimatedField, string>>) => {
    for (const [field, value] of Object.entries(estimates) as [EstimatedField, string][]) {
      setValue(`conditions.${field}`, value, asTyped);
      setValue(`sources.${field}`, 'estimated', { shouldDirty: true });
    }
  };
}

/** What estimates need to know of a bank. */
export const sizeOf = ({ ratedAh, series, cellType }: Bank): BankSize => {
  return { ratedAh, nominalV: cellType.nominalV * series };
};
