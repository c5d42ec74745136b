import { FieldPair } from '@/components/forms';
import { Checkbox, Quiet, RadioGroup, Stack, Text } from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';
import { defaultSettings } from '@/lib/measure';
import { formatDuration, formatQuantity } from '@/lib/units';

import { Cautions, CautionsFolded } from './Cautions';
import { dischargeEnds, fullChargeEnds } from './endChoices';
import { GuidedReading } from './GuidedReading';
import { StageTimer } from './StageTimer';
import type { TestRun, TestStage } from './testRun';
import { expectedDischargeS, referenceLoad, restS, watchBeforeS } from './testTimes';

export interface StageProps {
  bank: Bank;
  run: TestRun;
  onNote: (field: string, text: string) => void;
  onAware: (isAware: boolean) => void;
  /** The cautions were passed over. */
  isAwareMissing: boolean;
}

const cutOff = formatQuantity(defaultSettings.cutOffCellV, 'V', { decimals: 1 });
const hours = formatQuantity(expectedDischargeS / 3600, 'h', { decimals: 0 });

/** The load of about 0.2 It in this bank's own amps and watts. */
export const loadWords = (bank: Bank) => {
  const { amps, watts } = referenceLoad({ ...bank, nominalV: bank.cellType.nominalV });
  const power =
    watts >= 1000
      ? formatQuantity(watts / 1000, 'kW', { significant: 2 })
      : formatQuantity(watts, 'W', { significant: 2 });
  return `${formatQuantity(amps, 'A', { significant: 3 })}, some ${power}`;
};

function Prepare({ bank, run, onAware, isAwareMissing }: StageProps) {
  return (
    <Stack gap="xl">
      <Cautions />
      <Stack gap="s">
        <Text weight="strong">What it takes</Text>
        <Text>
          {`A full charge, a rest of an hour, and about ${hours} of discharge at 0.2 It: for this bank ${loadWords(bank)}. Then the time to charge again. Plan a day on which somebody can stay with it and the house can do without the bank.`}
        </Text>
        <Text>
          {`A meter that counts Ah and Wh of the whole bank, set to zero; the cell voltages on the BMS; a thermometer at the cells; a steady load. Between 0.05 and 0.5 It and at 15 to 35 °C the result can be brought to ${defaultSettings.referenceTemperatureC} °C and ${defaultSettings.referenceIt} It.`}
        </Text>
      </Stack>
      <Checkbox
        label="I have read the cautions, and the makers' instructions and local codes come first"
        checked={run.isAware}
        onChange={onAware}
        error={isAwareMissing ? 'Read the cautions, then confirm it here.' : undefined}
      />
    </Stack>
  );
}

function Charge({ run, onNote }: StageProps) {
  const noted = { readings: run.readings, onNote };
  return (
    <Stack gap="xl">
      <Text>
        Charge the bank to the voltage its maker states, until the current has fallen to the maker&apos;s tail
        current. Do not push it beyond. Nothing below 0 °C at the cells.
      </Text>
      <RadioGroup
        label="The charge was ended by"
        value={run.readings.fullChargeEndedBy ?? ''}
        options={fullChargeEnds}
        onChange={(value) => onNote('fullChargeEndedBy', value)}
      />
      <FieldPair>
        <GuidedReading
          {...noted}
          field="highestCellAtFullV"
          label="Highest cell at full"
          hint="As the charge ends."
        />
        <GuidedReading
          {...noted}
          field="lowestCellAtFullV"
          label="Lowest cell at full"
          hint="At the same moment."
        />
      </FieldPair>
    </Stack>
  );
}

function Rest({ bank, run, onNote }: StageProps) {
  return (
    <Stack gap="xl">
      <StageTimer
        label="Rest"
        startedAt={run.startedAt.rest ?? new Date().toISOString()}
        ringsAfterS={restS}
        uid={`ebbline-rest-${bank.id}`}
        due={{
          title: 'The bank has rested for an hour',
          text: 'Note the temperature at the cells, set the meter to zero, then put the load on.',
        }}
      />
      <Text>
        {`No charge and no load for about an hour (common practice, no source). Then set the meter to zero and put on a steady load of about 0.2 It: ${loadWords(bank)}.`}
      </Text>
      <GuidedReading
        readings={run.readings}
        onNote={onNote}
        field="temperatureStartC"
        label="Cells at the start"
        hint="Just before the load goes on."
      />
    </Stack>
  );
}

function Discharge({ bank, run, onNote }: StageProps) {
  const noted = { readings: run.readings, onNote };
  return (
    <Stack gap="xl">
      <StageTimer
        label="Discharge"
        startedAt={run.startedAt.discharge ?? new Date().toISOString()}
        ringsAfterS={expectedDischargeS - watchBeforeS}
        uid={`ebbline-discharge-${bank.id}`}
        due={{
          title: 'Watch the lowest cell now',
          text: `The discharge may end within the hour. Stop the load at ${cutOff} on the lowest cell, before the BMS must.`,
        }}
      />
      <Text>
        {`About ${hours} at 0.2 It (${loadWords(bank)}); a bank that has aged ends sooner. Stay with it. The voltage falls slowly for hours and fast at the end, so look often from ${formatDuration(expectedDischargeS - watchBeforeS)} on.`}
      </Text>
      <Text weight="strong">
        {`You stop the load when the lowest cell reaches ${cutOff}, or the maker's own limit if that is higher. The BMS trip is the last protection, not the test's end. Stop at once on any cell out of its limits, or warm.`}
      </Text>
      <FieldPair>
        <GuidedReading
          {...noted}
          field="lowestCellAtEndV"
          label="Lowest cell at the end"
          hint="The last reading with the load still on."
        />
        <GuidedReading
          {...noted}
          field="highestCellAtEndV"
          label="Highest cell at the end"
          hint="At the same moment."
        />
      </FieldPair>
      <CautionsFolded />
    </Stack>
  );
}

function Recharge({ run, onNote }: StageProps) {
  const noted = { readings: run.readings, onNote };
  return (
    <Stack gap="xl">
      <Text weight="strong">Recharge at once: an empty bank is harmed by standing.</Text>
      <Text>
        Once it charges, note what the meter counted while discharging, before it counts anything else.
      </Text>
      <RadioGroup
        label="The discharge was ended by"
        value={run.readings.dischargeEndedBy ?? ''}
        options={dischargeEnds}
        onChange={(value) => onNote('dischargeEndedBy', value)}
      />
      <FieldPair>
        <GuidedReading {...noted} field="capacityAh" label="Charge taken out" hint="Of the whole bank." />
        <GuidedReading {...noted} field="energyWh" label="Energy taken out" hint="Of the whole bank." />
      </FieldPair>
      <FieldPair>
        <GuidedReading
          {...noted}
          field="meanCurrentA"
          label="Discharge current, mean"
          hint="While the load was on."
        />
        <GuidedReading
          {...noted}
          field="temperatureEndC"
          label="Cells at the end"
          hint="As the load came off."
        />
      </FieldPair>
      <Quiet>With a log, these come from it; leave them empty then.</Quiet>
    </Stack>
  );
}

function Noted({ run }: StageProps) {
  const count = Object.values(run.readings).filter((text) => text.trim() !== '').length;
  return (
    <Stack gap="m">
      <Text>
        {`The test is done. ${count === 0 ? 'The day, the rest and the duration' : 'The day, the rest, the duration and what you noted'} go into the form of the check, where everything can still be changed, and where a log or a photo of the meter can be added.`}
      </Text>
      <Quiet>Leave the bank charging, and look at it until it is back in use.</Quiet>
    </Stack>
  );
}

/** What each stage shows, and what leads on from it. */
export const guidedStages: Record<
  TestStage,
  { title: string; lead: string; next: string; Body: (props: StageProps) => React.JSX.Element }
> = {
  prepare: {
    title: 'Run the test',
    lead: 'A test empties the bank once, from full. This page goes through it with you and keeps the times.',
    next: 'Begin with the full charge',
    Body: Prepare,
  },
  charge: {
    title: 'Charge it full',
    lead: 'Every test begins at the same place: full, as the maker means it.',
    next: 'It is full: start the rest',
    Body: Charge,
  },
  rest: {
    title: 'Let it rest',
    lead: 'The cells settle, and so do their temperatures.',
    next: 'The load is on: start the discharge',
    Body: Rest,
  },
  discharge: {
    title: 'Discharge it',
    lead: 'A steady load, and somebody who stays with it.',
    next: 'I have stopped the load',
    Body: Discharge,
  },
  recharge: {
    title: 'Recharge it at once',
    lead: 'Then note the readings.',
    next: 'It is charging, and noted',
    Body: Recharge,
  },
  noted: {
    title: 'Into the form',
    lead: 'What was measured becomes a check once it is looked over and sent.',
    next: 'On to the form of the check',
    Body: Noted,
  },
};
