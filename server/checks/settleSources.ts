import type { CheckFields } from '@/lib/contract/checks';
import type { LogResult } from '@/lib/contract/uploads';

type ReadingField = keyof CheckFields['reading'];

interface Comparison {
  field: ReadingField;
  logged: (log: LogResult) => number | null;
  /** How far rounding in the form may carry the entry from the log. */
  tolerance: (logged: number) => number;
}

const byHalfPercent = (logged: number) => 0.005 * Math.abs(logged);
const by = (limit: number) => () => limit;

const comparisons: Comparison[] = [
  { field: 'capacityAh', logged: ({ capacityAh }) => capacityAh, tolerance: byHalfPercent },
  { field: 'energyWh', logged: ({ energyWh }) => energyWh, tolerance: byHalfPercent },
  { field: 'meanCurrentA', logged: ({ meanCurrentA }) => meanCurrentA, tolerance: byHalfPercent },
  {
    field: 'durationS',
    logged: ({ durationS }) => durationS,
    tolerance: (logged) => Math.max(60, 0.005 * logged),
  },
  { field: 'temperatureStartC', logged: ({ startTemperatureC }) => startTemperatureC, tolerance: by(0.55) },
  { field: 'temperatureEndC', logged: ({ endTemperatureC }) => endTemperatureC, tolerance: by(0.55) },
  { field: 'lowestCellAtFullV', logged: ({ lowestCellAtFullV }) => lowestCellAtFullV, tolerance: by(0.011) },
  {
    field: 'highestCellAtFullV',
    logged: ({ highestCellAtFullV }) => highestCellAtFullV,
    tolerance: by(0.011),
  },
  { field: 'lowestCellAtEndV', logged: ({ lowestCellAtEndV }) => lowestCellAtEndV, tolerance: by(0.011) },
  { field: 'highestCellAtEndV', logged: ({ highestCellAtEndV }) => highestCellAtEndV, tolerance: by(0.011) },
];

export interface EditedField {
  field: ReadingField;
  logged: number;
  entered: number | null;
}

/**
 * Settles where each reading came from, against the log it is said to stand on: what agrees is metered; what differs
 * was changed by hand, so it cannot be metered and is named.
 */
export function settleSources(
  { reading, sources }: Pick<CheckFields, 'reading' | 'sources'>,
  log: LogResult,
): { sources: CheckFields['sources']; edited: EditedField[] } {
  const settled = { ...sources };
  const edited: EditedField[] = [];
  for (const { field, logged: read, tolerance } of comparisons) {
    const logged = read(log);
    if (logged === null) continue;
    const entered = reading[field] as number | null;
    if (entered !== null && Math.abs(entered - logged) <= tolerance(logged)) {
      settled[field] = 'metered';
      continue;
    }
    edited.push({ field, logged, entered });
    if (settled[field] !== 'estimated') settled[field] = 'readOff';
  }
  return { sources: settled, edited };
}
