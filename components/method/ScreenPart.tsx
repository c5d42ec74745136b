import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { Heading, Link, Quiet, SkeletonRows, Stack, Table, Text } from '@/components/ui';
import { fitDetailQuery, fitListQuery } from '@/lib/client/fits';
import type { FitDetail } from '@/lib/contract/fits';
import { formatCount, formatNumber } from '@/lib/units';

import { parameterWords } from './parameterWords';

/** What the working fit found about single checks and banks: for moderators alone. */
export function ScreenPart() {
  const list = useQuery(fitListQuery());
  return (
    <Stack gap="m">
      <Heading>For moderators: checks and banks that stand out</Heading>
      <QueryView query={list} loading={<SkeletonRows count={4} height={40} />}>
        {({ fits }) => {
          const working = fits.find(({ kind, isCurrent }) => kind === 'working' && isCurrent);
          const failed = fits[0] && !fits[0].isGood ? fits[0] : undefined;
          return (
            <>
              {failed && (
                <Text>{`The latest run failed and the fit before it stands: ${failed.reason}`}</Text>
              )}
              {working ? <Findings fitId={working.id} /> : <Quiet>There is no working fit yet.</Quiet>}
            </>
          );
        }}
      </QueryView>
    </Stack>
  );
}

function Findings({ fitId }: { fitId: string }) {
  const query = useQuery(fitDetailQuery(fitId));
  return (
    <QueryView query={query} loading={<SkeletonRows count={4} height={40} />}>
      {({ findings }) => (findings ? <FindingTables findings={findings} /> : <Quiet>This run failed.</Quiet>)}
    </QueryView>
  );
}

const actionWords = { quarantine: 'left out of the fit', list: 'to be looked at' };

function FindingTables({ findings }: { findings: NonNullable<FitDetail['findings']> }) {
  const { screen, influence, statements, iterations, screenRounds } = findings;
  return (
    <>
      <Text>
        {`Working fit: ${formatCount(iterations)} iterations, ${formatCount(screenRounds)} rounds of the screen, ${formatCount(screen.length)} checks stand out.`}
      </Text>
      <Table
        caption="Checks that their bank’s other checks contradict"
        showCaption
        rows={screen}
        rowKey={({ checkId }) => checkId}
        empty="No check stands out."
        columns={[
          {
            key: 'bank',
            title: 'Check of bank',
            cell: ({ checkId, bank }) => (
              <Link href={{ pathname: '/screening/[checkId]', params: { checkId } }}>{bank}</Link>
            ),
          },
          { key: 'cell', title: 'Cell type', cell: ({ cellType }) => cellType },
          {
            key: 't',
            title: 'Off by, sd',
            figures: true,
            cell: ({ t }) => formatNumber(t, { decimals: 1 }),
            sortValue: ({ t }) => Math.abs(t),
          },
          { key: 'action', title: 'What became of it', cell: ({ action }) => actionWords[action] },
        ]}
      />
      <Table
        caption="Banks that move a parameter by more than 0.3 standard errors"
        showCaption
        rows={influence}
        rowKey={({ bank, parameter }) => `${bank} ${parameter}`}
        empty="No single bank moves a parameter by more than 0.3 standard errors."
        columns={[
          { key: 'bank', title: 'Bank', cell: ({ bank }) => bank },
          { key: 'parameter', title: 'Parameter', cell: ({ parameter }) => parameterWords(parameter) },
          {
            key: 'shift',
            title: 'Moves it by, se',
            figures: true,
            cell: ({ shiftInSe }) => formatNumber(shiftInSe, { decimals: 2 }),
          },
        ]}
      />
      {statements.map((sentence) => (
        <Quiet key={sentence}>{sentence}</Quiet>
      ))}
    </>
  );
}
