import { standardUse, type Use } from '@/lib/contract/cells';

/** A use by its name. */
export interface UsePreset {
  key: string;
  name: string;
  hint: string;
  use: Use;
}

/** Uses as people speak of them. Their figures are common practice, no source: a start, to be changed word by word. */
export const usePresets: readonly UsePreset[] = [
  {
    key: 'standard',
    name: 'The standard use',
    hint: 'Every night, at room temperature: what lists and labels here are stated at.',
    use: standardUse,
  },
  {
    key: 'warmShed',
    name: 'A shaded shed in a warm climate',
    hint: 'Every night, cells near 30 °C over the year.',
    use: { ...standardUse, temperatureC: 30, socMeanFraction: 0.6 },
  },
  {
    key: 'cellar',
    name: 'A cool cellar',
    hint: 'Every night, cells near 16 °C.',
    use: { ...standardUse, temperatureC: 16 },
  },
  {
    key: 'cabin',
    name: 'A weekend cabin',
    hint: 'Two nights a week, kept rather full in between.',
    use: { ...standardUse, depthFraction: 0.7, temperatureC: 18, socMeanFraction: 0.65, cyclesPerDay: 0.3 },
  },
  {
    key: 'boat',
    name: 'A boat',
    hint: 'In season most nights, about half the days of a year, discharged faster.',
    use: {
      ...{ depthFraction: 0.5, dischargeIt: 0.2, temperatureC: 22, socMeanFraction: 0.65 },
      ...{ isClamped: true, cyclesPerDay: 0.5 },
    },
  },
  {
    key: 'backup',
    name: 'Backup only',
    hint: 'Kept nearly full and cycled about once a month.',
    use: {
      ...{ depthFraction: 0.8, dischargeIt: 0.2, temperatureC: 22, socMeanFraction: 0.9 },
      ...{ isClamped: false, cyclesPerDay: 0.03 },
    },
  },
];
