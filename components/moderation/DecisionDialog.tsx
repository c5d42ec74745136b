import { useState } from 'react';

import { Banner, Button, Dialog, Quiet, SelectField, Stack, TextArea } from '@/components/ui';
import { ApiError } from '@/lib/client/http';
import { useDecide } from '@/lib/client/moderation';
import { limits } from '@/lib/contract/limits';
import type { DecisionRequest, DecisionResult, Submission } from '@/lib/contract/moderation';
import { formatDate, formatPercent } from '@/lib/units';

import { type Corrections, CorrectionFields, readCorrections } from './CorrectionFields';
import { type AskedAction, decisionWords } from './decisionWords';
import { templatesFor } from './questionTemplates';

interface DecisionDialogProps {
  action: AskedAction;
  submission: Submission;
  onClose: () => void;
  onDone: (result: DecisionResult) => void;
}

/** Asks for what goes with a decision; nothing typed is lost when it fails. */
export function DecisionDialog({ action, submission, onClose, onDone }: DecisionDialogProps) {
  const { title, label, hint, button, done, field } = decisionWords[action];
  const { checkId, bank, findings, secondOpinion } = submission;
  const [text, setText] = useState(secondOpinion.proposal?.reason ?? '');
  const [corrections, setCorrections] = useState<Corrections>({});
  const [intoCheckId, setIntoCheckId] = useState('');
  const [unread, setUnread] = useState<Record<string, string>>({});
  const decide = useDecide(checkId, onDone);
  const errors = { ...(decide.error instanceof ApiError ? decide.error.fields : {}), ...unread };
  const isOfAField = Object.keys(errors).length > 0;

  const send = () => {
    const read = readCorrections(corrections);
    setUnread(action === 'correct' ? read.errors : {});
    if (action === 'correct' && Object.keys(read.errors).length > 0) return;
    const decision = requestOf(action, submission, { text, intoCheckId, corrections: read.values });
    decide.mutate({ decision, what: `Bank ${bank.pseudonym}: ${done}` });
  };
  const found = findings.filter(({ severity }) => severity !== 'fits');

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={title}
      actions={
        <>
          <Button label="Keep it open" onPress={onClose} />
          <Button
            label={button}
            kind={action === 'turnAway' || action === 'recall' ? 'danger' : 'primary'}
            onPress={send}
            busy={decide.isPending}
          />
        </>
      }
    >
      <Stack gap="m">
        {action === 'sendBack' && <TemplateField submission={submission} onChoose={setText} />}
        {action === 'correct' && (
          <CorrectionFields
            submission={submission}
            values={corrections}
            onChange={setCorrections}
            errors={errors}
          />
        )}
        {action === 'merge' ? (
          <>
            <TwinField
              submission={submission}
              value={intoCheckId}
              onChange={setIntoCheckId}
              error={errors.intoCheckId}
            />
            <Quiet>{hint}</Quiet>
          </>
        ) : (
          <TextArea
            label={label}
            hint={hint}
            value={text}
            onChange={setText}
            error={field ? errors[field] : undefined}
            optional={action === 'realFailure'}
            maxLength={limits.noteLength.max}
            lines={5}
          />
        )}
        {(action === 'turnAway' || action === 'recall') && secondOpinion.isNeeded && (
          <Banner kind="info" title="Takes a second opinion">
            {secondOpinion.proposal && !secondOpinion.proposal.isMine
              ? 'Another moderator has proposed it. With yours it is done.'
              : 'Much hangs on this bank: another moderator has to agree before it is done.'}
          </Banner>
        )}
        {found.length > 0 && (
          <Quiet>{`Found: ${found.map((finding) => finding.title.toLowerCase()).join(', ')}.`}</Quiet>
        )}
        {decide.isError && !isOfAField && <Banner kind="error">{decide.error.message}</Banner>}
      </Stack>
    </Dialog>
  );
}

function requestOf(
  action: AskedAction,
  { version }: Submission,
  given: { text: string; intoCheckId: string; corrections: ReturnType<typeof readCorrections>['values'] },
): DecisionRequest {
  const { text, intoCheckId, corrections } = given;
  switch (action) {
    case 'sendBack':
      return { action, version, question: text };
    case 'correct':
      return { action, version, corrections, reason: text };
    case 'realFailure':
      return { action, version, note: text };
    case 'merge':
      return { action, version, intoCheckId };
    default:
      return { action, version, reason: text };
  }
}

function TemplateField({
  submission,
  onChoose,
}: {
  submission: Submission;
  onChoose: (text: string) => void;
}) {
  const templates = templatesFor(submission);
  const [key, setKey] = useState('');
  return (
    <SelectField
      label="Begin with"
      hint="Change the words as you like before they are sent."
      optional
      value={key}
      prompt="An empty question"
      options={templates.map((one) => ({ value: one.key, label: one.label }))}
      onChange={(chosen) => {
        setKey(chosen);
        onChoose(templates.find((one) => one.key === chosen)?.text ?? '');
      }}
    />
  );
}

const standing = new Set(['submitted', 'sentBack', 'approved']);

function TwinField({
  submission: { history, checkId },
  value,
  onChange,
  error,
}: {
  submission: Submission;
  value: string;
  onChange: (checkId: string) => void;
  error: string | undefined;
}) {
  const others = history.filter((entry) => entry.checkId !== checkId && standing.has(entry.state));
  return (
    <SelectField
      label="The check that stays"
      value={value}
      error={error}
      options={others.map((entry) => ({
        value: entry.checkId,
        label: `${formatDate(entry.testedOn)}, ${formatPercent(entry.sohFraction, 1)} left, ${entry.state}`,
      }))}
      onChange={onChange}
    />
  );
}
