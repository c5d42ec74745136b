import { fadeChartData, rawChecks } from '@/components/cells/fadeChartData';
import { FadeChart, HistoryChart, LogChart } from '@/components/charts';
import { Disclosure, Quiet, Stack } from '@/components/ui';
import type { Submission } from '@/lib/contract/moderation';
import { formatCount, formatDate, formatInstant } from '@/lib/units';

import { proposedCapacityAh } from './submissionWords';

const leftOut = new Set(['turnedAway', 'withdrawn', 'recalled']);

/** The bank's checks over the years, the log behind this one, and the working fit it would join. */
export function SubmissionCharts({ submission }: { submission: Submission }) {
  const { history, log, checkId, fields, expected } = submission;
  const proposed = proposedCapacityAh(submission);
  // A slip of scale would flatten the years before it: this check is drawn as it was likely meant, and says so.
  const repair = proposed === undefined ? 1 : proposed / fields.reading.capacityAh;
  const remark = proposed === undefined ? 'this check' : 'this check, as likely meant';
  return (
    <Stack gap="l">
      <HistoryChart
        title="Checks of this bank"
        checks={history.map((entry) => ({
          id: entry.checkId,
          x: entry.ageYears,
          soh: entry.checkId === checkId ? entry.sohFraction * repair : entry.sohFraction,
          plusMinus: entry.expandedFraction,
          when: formatDate(entry.testedOn),
          remark: entry.checkId === checkId ? remark : undefined,
          isLeftOut: leftOut.has(entry.state),
        }))}
        expected={expected.map(({ years, inner, outer }) => ({ x: years, inner, outer }))}
      />
      {log && (
        <LogChart
          title="The log behind this check"
          series={log.series}
          window={{ startS: log.windowStartS, endS: log.windowEndS }}
        />
      )}
      <Disclosure label={`Working fit of ${submission.bank.cellType.name}`}>
        <WorkingFit submission={submission} />
      </Disclosure>
    </Stack>
  );
}

function WorkingFit({ submission: { working, workingFittedAt, bank } }: { submission: Submission }) {
  if (!working.evidence || !workingFittedAt)
    return <Quiet>Too few owners stand behind this cell type for a fit.</Quiet>;
  const { checks, banks, owners } = working.evidence;
  return (
    <Stack gap="s">
      <Quiet>
        {`All approved checks, fitted ${formatInstant(workingFittedAt)}: ${formatCount(checks)} checks on ${formatCount(banks)} banks of ${formatCount(owners)} owners.`}
      </Quiet>
      <FadeChart
        title={`Working fit of ${bank.cellType.name}`}
        {...rawChecks({ view: working, cellType: bank.cellType }, 'efc')}
        {...fadeChartData({ view: working, claims: [], cellType: bank.cellType }, 'efc')}
      />
    </Stack>
  );
}
