import type { Check } from '@/lib/contract/checks';

type Reading = Check['reading'];

export const methodWords: Record<Reading['method'], string> = {
  countedDischarge: 'counted while discharging',
  countedCharge: 'counted while charging',
};

export const fullChargeEndWords: Record<Reading['fullChargeEndedBy'], string> = {
  voltageAndTail: "The maker's voltage and tail current",
  bms: 'The BMS',
  time: 'Time',
};

export const dischargeEndWords: Record<Reading['dischargeEndedBy'], string> = {
  lowestCell: 'The lowest cell at its voltage',
  bankVoltage: 'The bank at its voltage',
  bmsTrip: 'A trip of the BMS',
  load: 'The load',
};
