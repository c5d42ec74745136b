import { Beside, CheckStateChip, Divider, Heading, Page, PageHead, Row, Stack, Text } from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';
import type { Check } from '@/lib/contract/checks';
import { formatDate } from '@/lib/units';

import { AnswerForm } from './AnswerForm';
import { CheckActions } from './CheckActions';
import { stateSentences } from './checkWords';
import { Comparison } from './Comparison';
import type { ComputedCase } from './computedCase';
import { ComputedView } from './ComputedView';
import { ConversationList } from './ConversationList';
import { CorrectionPart } from './CorrectionPart';
import { EnteredOverview } from './EnteredOverview';
import { OwnFindings } from './OwnFindings';
import { previousCheck } from './previousCheck';
import { LogBehind } from './LogBehind';

interface CheckViewProps {
  bank: Bank;
  check: Check;
  checks: Check[];
}

/** A check whole, for its owner. */
export function CheckView({ bank, check, checks }: CheckViewProps) {
  const { reading, conditions, computed, state, uploadId, note } = check;
  const previous = previousCheck(checks, reading.testedOn, check.id);
  const computedCase: ComputedCase = { bank, reading, conditions, previous, computed };
  return (
    <Page>
      <PageHead
        title={`Check of ${formatDate(reading.testedOn)}`}
        documentTitle={`Check of ${formatDate(reading.testedOn)}, ${bank.name}`}
        back={{ href: { pathname: '/banks/[bankId]', params: { bankId: bank.id } }, label: bank.name }}
        sub={
          <Row gap="s">
            <CheckStateChip state={state} />
            <Text tone="quiet">{stateSentences[state]}</Text>
          </Row>
        }
      />
      <Beside
        aside={
          <Stack gap="xl">
            <OwnFindings findings={check.findings} />
            <Stack gap="s">
              <Heading>Conversation</Heading>
              <ConversationList messages={check.history} isOwn />
            </Stack>
          </Stack>
        }
      >
        {check.correction && <CorrectionPart check={check} correction={check.correction} />}
        {state === 'sentBack' && <AnswerForm key={check.version} check={check} />}
        <ComputedView computedCase={computedCase} />
        <Divider />
        <Comparison computedCase={computedCase} />
        {uploadId !== null && <LogBehind uploadId={uploadId} ratedAh={bank.ratedAh} />}
        <Stack gap="s">
          <Heading>What you entered</Heading>
          <EnteredOverview entered={check} />
          {note !== '' && <Text>{`Your note: ${note}`}</Text>}
        </Stack>
      </Beside>
      <CheckActions check={check} />
    </Page>
  );
}
