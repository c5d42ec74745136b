import { checkFormSchema } from '@/components/checks/checkSchema';
import { type CheckFormValues, newCheckValues, valuesOfCheck } from '@/components/checks/checkValues';
import { submitCheckRequestSchema } from '@/lib/contract/checks';
import { consent } from '@/lib/contract/consent';

import { sampleCheck, sampleFields } from '../support/checkSample';

const id = '7c1d1c1e-0a52-4b34-8d3e-27a4f3c0aa10';

const typed = (change: (values: CheckFormValues) => void = () => {}): CheckFormValues => {
  const values = { ...structuredClone(valuesOfCheck(sampleCheck(), 5)), idempotencyKey: id };
  change(values);
  return values;
};

const messages = (values: CheckFormValues): Record<string, string> => {
  const read = checkFormSchema.safeParse(values);
  return Object.fromEntries(read.error?.issues.map(({ path, message }) => [path.join('.'), message]) ?? []);
};

it('reads back what a stored check was filled in from, as the contract takes it', () => {
  const { answer, version, ...sent } = checkFormSchema.parse(typed());
  expect([answer, version]).toEqual(['', 1]);
  expect(sent).toEqual({ ...sampleFields(), idempotencyKey: id });
  const request = { ...sent, consent: consent.version };
  expect(submitCheckRequestSchema.safeParse(request).error).toBeUndefined();
});

it('takes shares in per cent, energy in kWh, durations and decimal commas as typed', () => {
  const { reading, conditions } = checkFormSchema.parse(
    typed((values) => {
      values.reading.gainErrorFraction = '0,5';
      values.reading.energyWh = '11,57';
      values.reading.durationS = '4 h 42 min';
      values.conditions.depthFraction = '57';
    }),
  );
  expect(reading.gainErrorFraction).toBe(0.005);
  expect(reading.energyWh).toBe(11_570);
  expect(reading.durationS).toBe(16_920);
  expect(conditions.depthFraction).toBe(0.57);
});

it('names limits in the unit that is typed', () => {
  expect(
    messages(
      typed((values) => {
        values.conditions.depthFraction = '0.6';
        values.reading.energyWh = '30000';
        values.reading.durationS = '282';
        values.conditions.dischargeIt = '0.001';
      }),
    ),
  ).toEqual({
    'conditions.depthFraction': 'Enter a number from 5 to 100 %.',
    'reading.energyWh': 'Enter a number from 0.0001 to 20,000 kWh.',
    'reading.durationS': 'Enter hours and minutes, such as 4:42 or 4 h 42 min.',
    'conditions.dischargeIt': 'Enter a number from 0.005 to 2 It.',
  });
});

it('holds the reading together before anything is said of how the bank lived', () => {
  const found = messages(
    typed((values) => {
      values.reading.lowestCellAtFullV = '3.6';
      values.conditions = { ...newCheckValues(undefined, id).conditions };
    }),
  );
  expect(found['reading.lowestCellAtFullV']).toBe('The lowest cell cannot be above the highest.');
  expect(found['conditions.depthFraction']).toBe('This is needed.');
});

it('asks for the window where a window was chosen, and for cycles a day where there is no counter', () => {
  const found = messages(
    typed((values) => {
      Object.assign(values.conditions, { socAs: 'window', socLowFraction: '20', socHighFraction: '' });
      Object.assign(values.conditions, { counterKind: 'none', counterValue: '12', cyclesPerDay: '' });
    }),
  );
  expect(found).toEqual({
    'conditions.socHighFraction': 'This is needed.',
    'conditions.cyclesPerDay': 'This is needed.',
  });
});

it('sends nothing of what was typed under a choice that was taken back', () => {
  const { conditions, uploadId } = checkFormSchema.parse(
    typed((values) => {
      Object.assign(values, { entry: 'typed', uploadId: id });
      Object.assign(values.conditions, { socAs: 'window', socLowFraction: '20', socHighFraction: '80' });
      Object.assign(values.conditions, { counterKind: 'none', counterValue: '12' });
    }),
  );
  expect(uploadId).toBeNull();
  expect(conditions).toMatchObject({
    socMeanFraction: null,
    socLowFraction: 0.2,
    socHighFraction: 0.8,
    counterKind: null,
    counterValue: null,
  });
});

it('asks for the file where a log was chosen, and that the cautions were read', () => {
  expect(
    messages(typed((values) => Object.assign(values, { entry: 'log', uploadId: '', isAware: false }))),
  ).toEqual({
    uploadId: 'Choose the file of the log, or type the figures.',
    isAware: 'Read the cautions, then confirm it here.',
  });
});

it('keeps the source of a field only while the field holds something', () => {
  const { sources } = checkFormSchema.parse(
    typed((values) => {
      Object.assign(values.sources, { peakIt: 'estimated', chargeIt: 'estimated' });
    }),
  );
  expect(sources).toEqual({ capacityAh: 'metered', temperatureMeanC: 'readOff', chargeIt: 'estimated' });
});

it('takes over the meter of the last check and none of its figures', () => {
  const { reading, conditions } = newCheckValues(sampleCheck(), id);
  const filled = Object.entries(reading).filter(([, value]) => value !== '');
  expect(Object.fromEntries(filled)).toEqual({
    instrument: 'Shunt of 300 A',
    gainErrorFraction: '0.5',
    readingNoiseFraction: '0.2',
  });
  expect(Object.values(conditions).filter((value) => value !== '')).toEqual(['cells', 'mean']);
});
