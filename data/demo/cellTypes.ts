import type { ClaimTemplate } from './claims';

/** A cell type of the demo: its listing, how many banks have it, and what is true of it. */
export interface DemoCellType {
  id: string;
  maker: string;
  name: string;
  format: 'prismatic' | 'cylindrical' | 'pouch';
  ratedAh: number;
  nominalV: number;
  faceAreaMm2: number | null;
  massKg: number | null;
  /** Price of a cell when new, minor units of EUR. */
  priceMinor: number;
  banks: number;
  /** m: added to ln of the fade; 0.1 fades 10 % faster. */
  effect: number;
  /** Life at the standard use over the life the label implies there: below 1 the label is optimistic. */
  labelRatio: number;
  claims: readonly ClaimTemplate[];
}

type Listing = [ratedAh: number, faceAreaMm2: number, massKg: number];

const cellType = (
  maker: string,
  name: string,
  [ratedAh, faceAreaMm2, massKg]: Listing,
  facts: Pick<DemoCellType, 'banks' | 'effect' | 'labelRatio' | 'claims'> & {
    format?: DemoCellType['format'];
  },
): DemoCellType => ({
  id: name.toLowerCase().replaceAll(' ', '-'),
  ...{ maker, name, format: 'prismatic', ratedAh, nominalV: 3.2 },
  // A cylinder has no large face to press on.
  faceAreaMm2: facts.format === 'cylindrical' ? null : faceAreaMm2,
  massKg,
  priceMinor: Math.round(ratedAh * 24 + 600),
  ...facts,
});

/** Makers and names are invented. Effects average to nothing over the banks. */
export const cellTypes: readonly DemoCellType[] = [
  cellType('Halmund', 'Skerry 240', [240, 35_600, 4.3], {
    ...{ banks: 112, effect: 0, labelRatio: 0.86 },
    claims: ['held', 'free'],
  }),
  cellType('Halmund', 'Skerry 320', [320, 35_600, 5.6], {
    ...{ banks: 86, effect: -0.08, labelRatio: 0.95 },
    claims: ['held', 'headline'],
  }),
  cellType('Halmund', 'Skerry 160', [160, 24_900, 2.9], {
    ...{ banks: 60, effect: 0.06, labelRatio: 0.92 },
    claims: ['held'],
  }),
  cellType('Halmund', 'Skerry P60', [60, 31_200, 1.1], {
    ...{ banks: 7, effect: 0.1, labelRatio: 0.9, format: 'pouch' },
    claims: ['held'],
  }),
  cellType('Quorrel', 'Tarnholt 100', [100, 19_100, 1.95], {
    ...{ banks: 78, effect: -0.05, labelRatio: 1.06 },
    claims: ['free', 'shallow'],
  }),
  cellType('Quorrel', 'Tarnholt 200', [200, 29_800, 3.8], {
    ...{ banks: 66, effect: 0.04, labelRatio: 0.98 },
    claims: ['free'],
  }),
  cellType('Quorrel', 'Tarnholt 280', [280, 34_900, 5.2], {
    ...{ banks: 92, effect: -0.14, labelRatio: 1.04 },
    claims: ['held', 'shallow'],
  }),
  cellType('Quorrel', 'Tarnholt S', [230, 34_900, 4.4], {
    ...{ banks: 31, effect: -0.33, labelRatio: 1.6 },
    claims: ['free'],
  }),
  cellType('Isseby', 'Marram LX', [230, 35_100, 4.2], {
    ...{ banks: 70, effect: 0.03, labelRatio: 0.97 },
    claims: ['held', 'to70'],
  }),
  cellType('Isseby', 'Marram RX', [150, 24_100, 2.8], {
    ...{ banks: 42, effect: -0.2, labelRatio: 1.5 },
    claims: ['held', 'free'],
  }),
  cellType('Isseby', 'Marram 90', [90, 17_600, 1.8], {
    ...{ banks: 38, effect: 0.15, labelRatio: 0.78 },
    claims: ['shallow'],
  }),
  cellType('Isseby', 'Marram 310', [310, 35_100, 5.5], {
    ...{ banks: 58, effect: 0, labelRatio: 0.88 },
    claims: ['held', 'headline'],
  }),
  cellType('Vanterfleet', 'Sallow 105', [105, 19_300, 2.0], {
    ...{ banks: 72, effect: 0.2, labelRatio: 0.6 },
    claims: ['held', 'headline'],
  }),
  cellType('Vanterfleet', 'Sallow 210', [210, 30_400, 3.9], {
    ...{ banks: 51, effect: 0.1, labelRatio: 0.75 },
    claims: ['held', 'fast'],
  }),
  cellType('Vanterfleet', 'Sallow 300', [300, 34_700, 5.4], {
    ...{ banks: 64, effect: -0.02, labelRatio: 0.82 },
    claims: ['held'],
  }),
  cellType('Vanterfleet', 'Sallow 52', [52, 14_800, 1.05], {
    ...{ banks: 24, effect: 0.5, labelRatio: 0.8 },
    claims: ['fast'],
  }),
  cellType('Osmarrow', 'Corrie C50', [50, 14_200, 1.0], {
    ...{ banks: 4, effect: 0.05, labelRatio: 1 },
    claims: ['free'],
  }),
  cellType('Osmarrow', 'Corrie C105', [105, 19_700, 2.05], {
    ...{ banks: 45, effect: 0.12, labelRatio: 0.94 },
    claims: ['free'],
  }),
  cellType('Osmarrow', 'Corrie C272', [272, 35_400, 5.1], {
    ...{ banks: 75, effect: -0.1, labelRatio: 1.08 },
    claims: ['free', 'held'],
  }),
  cellType('Osmarrow', 'Corrie C180', [180, 27_300, 3.4], {
    ...{ banks: 3, effect: 0, labelRatio: 1 },
    claims: ['free'],
  }),
  cellType('Dunnerel', 'Shingle 125', [125, 21_800, 2.4], {
    ...{ banks: 37, effect: -0.06, labelRatio: 0.99 },
    claims: ['shallow'],
  }),
  cellType('Dunnerel', 'Shingle 250', [250, 33_900, 4.6], {
    ...{ banks: 50, effect: 0.08, labelRatio: 0.84 },
    claims: ['held'],
  }),
  cellType('Dunnerel', 'Shingle 305', [305, 34_800, 5.5], {
    ...{ banks: 33, effect: 0.22, labelRatio: 0.56 },
    claims: ['held', 'to70'],
  }),
  cellType('Dunnerel', 'Shingle 20', [20, 0, 0.42], {
    ...{ banks: 2, effect: 0.1, labelRatio: 1, format: 'cylindrical' },
    claims: ['headline'],
  }),
];

/** The cell type of a key. @throws RangeError when there is none. */
export function cellTypeOf(id: string): DemoCellType {
  const found = cellTypes.find((entry) => entry.id === id);
  if (!found) throw new RangeError(`cellTypeOf requires a cell type of the demo, got ${id}`);
  return found;
}
