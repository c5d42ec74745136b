import type { Option } from '@/components/ui';

import { dischargeEndWords, fullChargeEndWords } from './endWords';

/** What can end the full charge before a test. */
export const fullChargeEnds: readonly Option[] = [
  { value: 'voltageAndTail', label: fullChargeEndWords.voltageAndTail, hint: 'As the cells call for it.' },
  { value: 'bms', label: fullChargeEndWords.bms, hint: 'It stopped the charge by itself.' },
  { value: 'time', label: fullChargeEndWords.time, hint: 'A clock or a person stopped it.' },
];

/** What can end the discharge. */
export const dischargeEnds: readonly Option[] = [
  { value: 'lowestCell', label: dischargeEndWords.lowestCell, hint: 'The way a test should end.' },
  { value: 'bankVoltage', label: dischargeEndWords.bankVoltage },
  {
    value: 'bmsTrip',
    label: dischargeEndWords.bmsTrip,
    hint: 'It counts all the same. Next time stop the load before it.',
  },
  { value: 'load', label: dischargeEndWords.load, hint: 'Such as an inverter at its own limit.' },
];
