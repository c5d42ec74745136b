import type { PoolCheck } from './poolCheck';

/** The levers a check can be sorted by in the stratified views. */
export type BandLever = 'depth' | 'rate' | 'heat' | 'clamping';

/** One preset class of a lever. Numeric edges are null where the band is open or not numeric. */
export interface Band {
  key: string;
  lever: BandLever;
  /** In plain words, with the unit. */
  label: string;
  lowerEdge: number | null;
  upperEdge: number | null;
  /** Unit of the edges; depth is a fraction of rated capacity. */
  unit: 'fraction' | 'It' | '°C' | null;
  includes(check: PoolCheck): boolean;
}

interface NumericLever {
  lever: Exclude<BandLever, 'clamping'>;
  unit: 'fraction' | 'It' | '°C';
  value(check: PoolCheck): number;
  lowEdge: number;
  highEdge: number;
  keys: readonly [string, string, string];
  labels: readonly [string, string, string];
}

// Three bands per lever; a check on an edge belongs to the middle one. The edges are preset, not
// chosen from the data, so that a filter means the same in every release.
function threeBands(spec: NumericLever): Band[] {
  const { lever, unit, value, lowEdge, highEdge, keys, labels } = spec;
  const common = { lever, unit };
  return [
    {
      ...common,
      key: keys[0],
      label: labels[0],
      lowerEdge: null,
      upperEdge: lowEdge,
      includes: (check) => value(check) < lowEdge,
    },
    {
      ...common,
      key: keys[1],
      label: labels[1],
      lowerEdge: lowEdge,
      upperEdge: highEdge,
      includes: (check) => value(check) >= lowEdge && value(check) <= highEdge,
    },
    {
      ...common,
      key: keys[2],
      label: labels[2],
      lowerEdge: highEdge,
      upperEdge: null,
      includes: (check) => value(check) > highEdge,
    },
  ];
}

const depthBands = threeBands({
  lever: 'depth',
  unit: 'fraction',
  value: (check) => check.depthFraction,
  lowEdge: 0.45,
  highEdge: 0.65,
  keys: ['depth-shallow', 'depth-middle', 'depth-deep'],
  labels: ['depth below 45 %', 'depth 45 to 65 %', 'depth above 65 %'],
});

const rateBands = threeBands({
  lever: 'rate',
  unit: 'It',
  value: (check) => check.dischargeIt,
  lowEdge: 0.15,
  highEdge: 0.3,
  keys: ['rate-slow', 'rate-middle', 'rate-fast'],
  labels: ['discharge below 0.15 It', 'discharge 0.15 to 0.3 It', 'discharge above 0.3 It'],
});

const heatBands = threeBands({
  lever: 'heat',
  unit: '°C',
  value: (check) => check.temperatureC,
  lowEdge: 18,
  highEdge: 28,
  keys: ['heat-cool', 'heat-middle', 'heat-warm'],
  labels: ['cells below 18 °C', 'cells 18 to 28 °C', 'cells above 28 °C'],
});

const clampingBand = (key: string, label: string, isClamped: boolean): Band => ({
  key,
  lever: 'clamping',
  label,
  lowerEdge: null,
  upperEdge: null,
  unit: null,
  includes: (check) => check.isClamped === isClamped,
});

/** The preset bands of every lever. Within a lever they cover every check once. */
export const bandsByLever: Readonly<Record<BandLever, readonly Band[]>> = {
  depth: depthBands,
  rate: rateBands,
  heat: heatBands,
  clamping: [
    clampingBand('clamping-none', 'not clamped', false),
    clampingBand('clamping-held', 'clamped', true),
  ],
};

/** All preset bands in the order they are shown. */
export const allBands: readonly Band[] = Object.values(bandsByLever).flat();
