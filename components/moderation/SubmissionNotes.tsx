import { Banner, DefinitionList, Heading, Quiet, Stack } from '@/components/ui';
import type { Correction } from '@/lib/contract/checks';
import type { Submission } from '@/lib/contract/moderation';
import { formatInstant, formatNumber } from '@/lib/units';

import { correctionItems } from '../checks/correctionWords';
import { UndoNote } from './UndoNote';

/** What a moderator must know before deciding: who is at work, what another proposed, what hangs on it. */
export function SubmissionNotes({ submission }: { submission: Submission }) {
  const { claim, secondOpinion, isRealFailure, mergedIntoId, state } = submission;
  const { proposal, largest } = secondOpinion;
  return (
    <>
      <UndoNote />
      {claim?.by === 'other' && (
        <Banner kind="caution" title="Another moderator is at work on this one">
          {`Until ${formatInstant(claim.until)} at most. You can read it meanwhile.`}
        </Banner>
      )}
      {proposal && (
        <Banner
          kind="info"
          title={proposal.isMine ? 'You proposed to take it out' : 'A second opinion is asked'}
        >
          {`${proposal.isMine ? 'Another moderator has to agree.' : 'Another moderator would take it out:'} ${proposal.reason}`}
        </Banner>
      )}
      {!proposal && largest && (state === 'submitted' || state === 'approved') && (
        <Quiet>
          {`This bank moves a figure of the working fit by ${formatNumber(Math.abs(largest.shiftInSe), { decimals: 1 })} of its standard error: to take a check of it out takes two moderators.`}
        </Quiet>
      )}
      {isRealFailure && <Quiet>Kept as a real failure: it counts, and no screening takes it out.</Quiet>}
      {mergedIntoId && <Quiet>Put away as the same test as another check of this bank.</Quiet>}
    </>
  );
}

/** The owner's figures beside the corrected ones, and why. */
export function CorrectionNote({ correction }: { correction: Correction }) {
  return (
    <Stack gap="s">
      <Heading>Corrected</Heading>
      <DefinitionList items={correctionItems(correction)} />
      <Quiet>{correction.reason}</Quiet>
    </Stack>
  );
}
