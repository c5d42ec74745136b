import { SecondFactorNotice } from '@/components/secondFactor/SecondFactorNotice';
import { Beside, EmptyState, Page, PageHead } from '@/components/ui';
import { useLayout } from '@/components/theme';

import { FitNote } from './FitNote';
import { QueuePanel } from './QueuePanel';
import { ScreeningTabs } from './ScreeningTabs';

/** The moderators' queue; on a wide screen the submission chosen stands beside it. */
export function ScreeningPage() {
  const { isWide } = useLayout();
  return (
    <Page>
      <PageHead title="Screening" sub="Each reading is looked at before it joins the pool." />
      <ScreeningTabs />
      <SecondFactorNotice />
      {isWide ? (
        <Beside side="start" aside={<QueuePanel />}>
          <EmptyState title="Choose a submission">
            Its figures, findings and history are shown here.
          </EmptyState>
          <FitNote />
        </Beside>
      ) : (
        <>
          <FitNote />
          <QueuePanel />
        </>
      )}
    </Page>
  );
}
