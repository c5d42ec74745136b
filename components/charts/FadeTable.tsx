import { formatPercent, formatRange } from '@/lib/units';
import { Quiet, Table } from '../ui';
import { niceTicks } from './chartScale';
import { fadeAt, type FadeBin, type FadeClaim, type FadePoint } from './fadeSeries';
import { fadeX, type FadeUnit } from './fadeWords';

const columnTitles = { years: 'Years', efc: 'Full cycles', energy: 'Energy delivered' } as const;

interface FadeTableProps {
  title: string;
  curve: readonly FadePoint[];
  bins: readonly FadeBin[];
  claims: readonly FadeClaim[];
  unit: FadeUnit;
}

/** The curve's figures as a table, with the medians of the raw checks below it. */
export function FadeTable({ title, curve, bins, claims, unit }: FadeTableProps) {
  const points = niceTicks([curve[0]?.x ?? 0, curve.at(-1)?.x ?? 0], 12)
    .map((x) => fadeAt(curve, x))
    .filter((point) => point !== undefined);
  return (
    <>
      <Table
        caption={title}
        rows={points}
        rowKey={(point) => String(point.x)}
        empty="There is no curve to list."
        columns={[
          {
            key: 'x',
            title: columnTitles[unit],
            cell: (point) => fadeX(point.x, unit),
          },
          {
            key: 'soh',
            title: 'Left, %',
            figures: true,
            cell: (point) => (point.status === 'extrapolated' ? null : formatPercent(point.soh, 1)),
          },
          {
            key: 'range',
            title: '90 % range, %',
            figures: true,
            cell: (point) => formatRange(point.lower * 100, point.upper * 100, { decimals: 1 }),
          },
          { key: 'status', title: 'Standing', cell: (point) => point.status },
        ]}
      />
      {bins.length > 0 && <BinTable bins={bins} unit={unit} title={title} />}
      {claims.map((claim) => (
        <Quiet
          key={`${claim.x} ${claim.label}`}
        >{`${claim.label}: ${fadeX(claim.x, unit)} to 80 %, quoted.`}</Quiet>
      ))}
    </>
  );
}

function BinTable({ bins, unit, title }: Pick<FadeTableProps, 'bins' | 'unit' | 'title'>) {
  return (
    <Table
      caption={`${title}: single checks summed up`}
      showCaption
      rows={bins}
      rowKey={(bin) => String(bin.from)}
      columns={[
        {
          key: 'x',
          title: columnTitles[unit],
          cell: (bin) => `${fadeX(bin.from, unit)} to ${fadeX(bin.to, unit)}`,
        },
        { key: 'median', title: 'Median, %', figures: true, cell: (bin) => formatPercent(bin.median, 1) },
        {
          key: 'range',
          title: 'Middle 80 %, %',
          figures: true,
          cell: (bin) => formatRange(bin.lower * 100, bin.upper * 100, { decimals: 1 }),
        },
      ]}
    />
  );
}
