/**
 * Physical and practical limits of what can be entered, written once: the forms show them, the schemas refuse
 * beyond them, the database's check constraints repeat the hard ones. Inclusive, in the stored units.
 */
export const limits = {
  parallel: { min: 1, max: 64 },
  series: { min: 1, max: 64 },
  ratedAh: { min: 1, max: 2000 },
  nominalV: { min: 3.0, max: 3.4 },
  cellV: { min: 2.0, max: 4.0 },
  faceAreaMm2: { min: 100, max: 500_000 },
  massKg: { min: 0.01, max: 50 },
  clampForceN: { min: 0, max: 50_000 },
  clampTorqueNm: { min: 0, max: 100 },
  spacingMm: { min: 0, max: 100 },
  depthFraction: { min: 0.05, max: 1 },
  rateIt: { min: 0.005, max: 2 },
  peakIt: { min: 0.005, max: 5 },
  temperatureC: { min: -30, max: 70 },
  socFraction: { min: 0, max: 1 },
  efc: { min: 0, max: 20_000 },
  counterAh: { min: 0, max: 100_000_000 },
  counterKwh: { min: 0, max: 10_000_000 },
  cyclesPerDay: { min: 0, max: 10 },
  idleDays: { min: 0, max: 366 },
  capacityAh: { min: 0.1, max: 200_000 },
  energyWh: { min: 0.1, max: 20_000_000 },
  meanCurrentA: { min: 0.01, max: 20_000 },
  durationS: { min: 60, max: 14 * 86_400 },
  restMinutes: { min: 0, max: 7 * 1440 },
  gainErrorFraction: { min: 0, max: 0.2 },
  readingNoiseFraction: { min: 0, max: 0.2 },
  priceMinor: { min: 0, max: 100_000_000 },
  claimCycles: { min: 1, max: 50_000 },
  endOfLifeFraction: { min: 0.5, max: 0.95 },
  noteLength: { max: 2000 },
  nameLength: { max: 80 },
  logBytes: { max: 64 * 1024 * 1024 },
  /** That a recorder split one log into. */
  logFiles: { max: 6 },
  logRows: { max: 1_000_000 },
  /** A file of earlier checks; each check is screened beside all others of its bank. */
  tableBytes: { max: 1024 * 1024 },
  tableRows: { max: 200 },
  tableRowsOfBank: { max: 40 },
  photoBytes: { max: 20 * 1024 * 1024 },
  photoPixels: { max: 50_000_000 },
  passwordLength: { min: 10, max: 200 },
} as const;

/** Lives and counts stand behind at least this many different owners, or are not shown. */
export const minimumOwners = 5;
