import { BoundCheckbox } from '@/components/forms';
import { Link, Quiet, Stack, Text } from '@/components/ui';

import { Cautions } from './Cautions';
import type { StepProps } from './formTypes';

/** What has to be known before a person works on a bank, and what to have at hand. */
export function CautionStep({ form: { control }, bank }: StepProps) {
  return (
    <Stack gap="xl">
      <Cautions />
      <Stack gap="s">
        <Text weight="strong">Have at hand</Text>
        <Text>
          A meter that counts Ah and Wh of the whole bank, with its data sheet; the lowest and highest cell
          voltage on the BMS; a thermometer at the cells; a load of about 0.2 It, between 0.05 and 0.5. Cells
          at 15 to 35 °C can be brought to 25 °C by calculation; outside that no correction is made.
        </Text>
        <Quiet>
          Everything you type is kept on this device until it is sent. You can stop and come back.
        </Quiet>
        <Link href={{ pathname: '/banks/[bankId]/test', params: { bankId: bank.id } }}>
          Not measured yet? Go through the test step by step
        </Link>
      </Stack>
      <BoundCheckbox
        control={control}
        name="isAware"
        label="I have read the cautions, and the makers' instructions and local codes come first"
      />
    </Stack>
  );
}
