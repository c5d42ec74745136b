import type { BankFormValues } from './bankValues';

/** The fields of a bank in words, with the unit they are held in. */
export const fieldLabels: Record<Exclude<keyof BankFormValues, 'sources' | 'step' | 'version'>, string> = {
  name: 'Name',
  cellTypeId: 'Cell type',
  parallel: 'Cells in parallel',
  series: 'Groups in series',
  firstUseMonth: 'First use',
  madeMonth: 'Month of manufacture',
  bought: 'Bought',
  startCapacityAh: 'Capacity at the start, Ah',
  clamping: 'How the cells are held',
  clampForceN: 'Clamping force, N',
  clampTorqueNm: 'Torque, N·m',
  spacingMm: 'Gap between cells, mm',
  place: 'Place',
  climateBand: 'Climate',
  chargeLimitV: 'Charge ends at, V',
  dischargeLimitV: 'Discharge ends at, V',
  bmsHighTripV: 'BMS trips above, V',
  bmsLowTripV: 'BMS trips below, V',
  priceMinor: 'Price of one cell',
  priceCurrency: 'Currency',
  priceMonth: 'Month it was paid',
};
