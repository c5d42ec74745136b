import { Heading, Stack, Text } from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';

import type { CheckFormValues } from './checkValues';
import { currentRemark, meanVoltageRemark } from './remarks';

/** What the figures of the test say of each other, once more before they are sent. */
export function TestRemarks({ bank, reading }: { bank: Bank; reading: CheckFormValues['reading'] }) {
  const { capacityAh, energyWh: energyKwh, meanCurrentA, durationS: duration, method } = reading;
  const remarks = [
    meanVoltageRemark({ capacityAh, energyKwh, method }, bank.series),
    currentRemark({ capacityAh, meanCurrentA, duration }, bank.ratedAh),
  ].filter((remark) => remark !== undefined);
  return (
    <Stack gap="s">
      <Heading size="lead">The figures beside each other</Heading>
      {remarks.map(({ text, isDoubt }) => (
        <Text key={text} tone={isDoubt ? 'rust' : 'quiet'}>
          {text}
        </Text>
      ))}
    </Stack>
  );
}
