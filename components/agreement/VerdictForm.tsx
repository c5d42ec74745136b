import { useState } from 'react';

import { Banner, Button, Heading, Link, RadioGroup, Stack, Text, TextArea } from '@/components/ui';
import { useGiveVerdict } from '@/lib/client/agreement';
import { ApiError } from '@/lib/client/http';
import { type BlindOutcome, type Verdict, verdictSchema } from '@/lib/contract/agreement';
import { limits } from '@/lib/contract/limits';

import { verdictWords } from './verdictWords';

const options = verdictSchema.options.map((value) => ({ value, label: verdictWords[value] }));

/** The second verdict; the first is told once it is given. */
export function VerdictForm({ reviewId }: { reviewId: string }) {
  const [verdict, setVerdict] = useState<Verdict | ''>('');
  const [words, setWords] = useState('');
  const [isAsked, setIsAsked] = useState(false);
  const give = useGiveVerdict(reviewId);
  if (give.data) return <Outcome outcome={give.data} />;
  const fields = give.error instanceof ApiError ? give.error.fields : {};
  const missing = isAsked && verdict === '' ? 'Choose what you would have decided.' : undefined;
  const send = () => {
    setIsAsked(true);
    if (verdict !== '') give.mutate({ verdict, words });
  };
  return (
    <Stack gap="m">
      <Heading level={2}>What would you have decided?</Heading>
      <RadioGroup
        label="Your verdict"
        value={verdict}
        options={options}
        onChange={setVerdict}
        error={missing ?? fields.verdict}
      />
      <TextArea
        label="Why"
        hint="For the other moderators; the owner does not get it."
        optional
        value={words}
        onChange={setWords}
        error={fields.words}
        maxLength={limits.noteLength.max}
        lines={3}
      />
      {give.isError && Object.keys(fields).length === 0 && <Banner kind="error">{give.error.message}</Banner>}
      <Button label="Give the verdict" kind="primary" onPress={send} busy={give.isPending} />
    </Stack>
  );
}

function Outcome({ outcome: { first, second, words } }: { outcome: BlindOutcome }) {
  const isSame = first === second;
  return (
    <Banner kind="info" title={isSame ? 'You both found the same' : 'The first decision was another one'}>
      <Stack gap="s">
        <Text>{`First: ${verdictWords[first]}${words === '' ? '' : ` (${words})`}. Yours: ${verdictWords[second]}.`}</Text>
        <Link href="/screening/agreement">To the agreement</Link>
      </Stack>
    </Banner>
  );
}
