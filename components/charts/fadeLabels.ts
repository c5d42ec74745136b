import { size, type Color } from '../theme';
import { xOf, yOf, type PlotArea } from './chartScale';
import { endOfLifeFraction, type FadeClaim, type FadePoint } from './fadeSeries';
import { banksLabel, fadeX, lifeLabel, type FadeBanks, type FadeLife, type FadeUnit } from './fadeWords';
import { placeLabels, type Box, type LabelWish, type PlacedLabel } from './placeLabels';

interface FadeLabelInput {
  plot: PlotArea;
  curve: readonly FadePoint[];
  reachX: number | null;
  life: FadeLife | null;
  banks?: FadeBanks | null;
  claims: readonly FadeClaim[];
  xUnit: FadeUnit;
}

export interface FadeLabel extends PlacedLabel {
  tone: Color;
  isStrong: boolean;
}

const looks = {
  life: { tone: 'tide', isStrong: true },
  claim: { tone: 'brass', isStrong: true },
  reach: { tone: 'ink', isStrong: false },
  banks: { tone: 'tide', isStrong: false },
  level: { tone: 'quiet', isStrong: false },
} as const satisfies Record<string, { tone: Color; isStrong: boolean }>;

type Kind = keyof typeof looks;

const kindOf = (id: string): Kind =>
  id.startsWith('claim') ? 'claim' : id === 'life' || id === 'reach' || id === 'banks' ? id : 'level';

const besides = (dx: number, dy: number) =>
  [
    { dx: -dx, dy, anchor: 'end' },
    { dx, dy, anchor: 'start' },
  ] as const;

/** The dotted line from the crossing down to the axis. */
const dropBoxes = ({ plot, life }: FadeLabelInput): Box[] =>
  life && life.status !== 'extrapolated'
    ? [
        {
          x: xOf(plot, life.estimate) - 1,
          y: yOf(plot, endOfLifeFraction) + 30,
          width: 2,
          height: plot.height,
        },
      ]
    : [];

/** The curve as small boxes that labels keep clear of. */
const curveBoxes = (plot: PlotArea, curve: readonly FadePoint[]): Box[] =>
  curve.map((point) => ({ x: xOf(plot, point.x) - 4, y: yOf(plot, point.soh) - 5, width: 8, height: 10 }));

const wishesOf = ({ plot, curve, reachX, life, banks, claims, xUnit }: FadeLabelInput): LabelWish[] => {
  const fontSize = size.small;
  const level = yOf(plot, endOfLifeFraction);
  const foot = plot.height - plot.bottom;
  const edge = plot.width - plot.right;
  const atReach = reachX === null ? undefined : curve.filter((point) => point.x <= reachX).at(-1);
  const wishes: (LabelWish | false | null | undefined)[] = [
    life && {
      id: 'life',
      text: lifeLabel(life, xUnit),
      x: Math.min(edge, xOf(plot, life.estimate)),
      y: level,
      fontSize,
      offsets: [
        ...besides(10, 22),
        ...besides(10, -12),
        ...besides(10, 42),
        { dx: 0, dy: 22, anchor: 'middle' },
      ],
    },
    ...claims.map((claim, index): LabelWish => {
      const isBeyond = claim.x > plot.xDomain[1];
      return {
        id: `claim${index}`,
        text: isBeyond ? `${claim.label}: ${fadeX(claim.x, xUnit)}` : claim.label,
        x: Math.min(edge, xOf(plot, claim.x)),
        y: isBeyond ? level : foot,
        fontSize,
        offsets: isBeyond
          ? [...besides(0, -14), ...besides(0, 24), ...besides(0, 42)]
          : [...besides(8, -14), ...besides(8, -32), ...besides(8, -50), ...besides(8, -68)],
      };
    }),
    atReach &&
      reachX !== null && {
        id: 'reach',
        text: `readings reach ${fadeX(reachX, xUnit)}`,
        x: xOf(plot, reachX),
        y: yOf(plot, atReach.soh),
        fontSize,
        offsets: [
          { dx: 6, dy: -24, anchor: 'start' },
          { dx: -6, dy: -44, anchor: 'end' },
          { dx: 0, dy: -44, anchor: 'middle' },
        ],
      },
    banks && {
      id: 'banks',
      text: banksLabel(banks, xUnit),
      x: Math.min(edge, xOf(plot, banks.upper)),
      y: level,
      fontSize,
      offsets: [
        { dx: 0, dy: -10, anchor: 'end' },
        { dx: 0, dy: 18, anchor: 'end' },
        { dx: 0, dy: -28, anchor: 'end' },
        { dx: 0, dy: 38, anchor: 'end' },
      ],
    },
    {
      id: 'level',
      text: '80 %, end of life by convention',
      x: plot.left,
      y: level,
      fontSize,
      offsets: [
        { dx: 4, dy: 16, anchor: 'start' },
        { dx: 4, dy: -6, anchor: 'start' },
        { dx: edge - plot.left - 4, dy: -6, anchor: 'end' },
      ],
    },
  ];
  return wishes.filter((wish) => wish !== undefined && wish !== false && wish !== null);
};

/** The chart's direct labels where they meet neither each other nor the curve. */
export function fadeLabels(input: FadeLabelInput): FadeLabel[] {
  const { plot } = input;
  const bounds = { x: plot.left, y: 0, width: plot.width - plot.left, height: plot.height - plot.bottom };
  return placeLabels(wishesOf(input), bounds, [...curveBoxes(plot, input.curve), ...dropBoxes(input)]).map(
    (label) => ({
      ...label,
      ...looks[kindOf(label.id)],
    }),
  );
}
