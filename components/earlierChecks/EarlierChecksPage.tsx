import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { FormSkeleton } from '@/components/banks/FormSkeleton';
import { QueryPage } from '@/components/QueryPage';
import {
  Banner,
  Button,
  ButtonLink,
  Divider,
  EmptyState,
  FileDrop,
  Heading,
  Page,
  PageHead,
  Row,
  Stack,
  Text,
} from '@/components/ui';
import { banksQuery } from '@/lib/client/banks';
import { usePreviewEarlier } from '@/lib/client/earlierChecks';
import { ApiError, keepFile } from '@/lib/client/http';
import type { Bank } from '@/lib/contract/banks';
import type { EarlierReport } from '@/lib/contract/earlierChecks';
import { limits } from '@/lib/contract/limits';

import { ReportTable } from './ReportTable';
import { countsSentence } from './reportWords';
import { SendPart } from './SendPart';
import { TemplatePart } from './TemplatePart';

/** Adds many earlier checks from one file, of one bank or of several. */
export function EarlierChecksPage({ bankId }: { bankId?: string }) {
  const banks = useQuery(banksQuery);
  return (
    <QueryPage
      query={banks}
      title="Add earlier checks"
      back={{ href: '/banks', label: 'My banks' }}
      loading={<FormSkeleton label="Loading your banks" />}
    >
      {(loaded) => <LoadedPage banks={loaded} bank={loaded.find(({ id }) => id === bankId)} />}
    </QueryPage>
  );
}

function LoadedPage({ banks, bank }: { banks: Bank[]; bank: Bank | undefined }) {
  const back = bank
    ? {
        href: { pathname: '/banks/[bankId]', params: { bankId: bank.id } } as const,
        label: bank.name,
      }
    : { href: '/banks' as const, label: 'My banks' };
  return (
    <Page>
      <PageHead
        title="Add earlier checks"
        documentTitle={bank ? `Add earlier checks, ${bank.name}` : 'Add earlier checks'}
        back={back}
        sub={
          bank
            ? `Tests of ${bank.name} from years before, all at once from a file.`
            : 'Tests from years before, of any of your banks, all at once from a file. The column "bank" says which.'
        }
      />
      {banks.length === 0 ? (
        <EmptyState
          title="No bank yet"
          action={<ButtonLink kind="primary" href="/banks/new" label="Add a bank" />}
        >
          A check belongs to a bank. Add the bank first, then its earlier checks.
        </EmptyState>
      ) : (
        <FileParts bankId={bank?.id ?? ''} />
      )}
    </Page>
  );
}

/** What was looked at, and whether it has been sent since. */
interface Looked {
  file: File;
  report: EarlierReport;
}

function FileParts({ bankId }: { bankId: string }) {
  const preview = usePreviewEarlier(bankId);
  const [looked, setLooked] = useState<Looked | null>(null);
  const [refusal, setRefusal] = useState<string | undefined>(undefined);

  const look = (file: File) => {
    const isLarge = file.size > limits.tableBytes.max;
    setRefusal(isLarge ? `${file.name} is larger than 1 MB. Send it in parts.` : undefined);
    setLooked(null);
    if (isLarge) return;
    preview.mutate(file, {
      onSuccess: (report) => setLooked({ file, report }),
      onError: (error) => setRefusal(sentence(error)),
    });
  };

  if (looked?.report.isStored)
    return <SentPart report={looked.report} bankId={bankId} onMore={() => setLooked(null)} />;
  return (
    <Stack gap="xl">
      <TemplatePart />
      <Divider />
      <Stack gap="m">
        <Heading>2. Look at the rows</Heading>
        <FileDrop
          label="File of earlier checks"
          hint={`CSV up to 1 MB, ${limits.tableRows.max} checks, ${limits.tableRowsOfBank.max} of one bank. Nothing is stored yet.`}
          accept=".csv,.txt,.tsv,text/csv,text/plain"
          onFile={look}
          error={refusal}
          progress={preview.isPending ? { label: 'Reading the rows' } : undefined}
        />
        {looked && <LookedAt {...looked} />}
      </Stack>
      {looked && looked.report.counts.good > 0 && (
        <>
          <Divider />
          <SendPart
            key={looked.report.digest}
            {...looked}
            bankId={bankId}
            onSent={(report) => setLooked({ ...looked, report })}
          />
        </>
      )}
    </Stack>
  );
}

function LookedAt({ file, report }: Looked) {
  return (
    <Stack gap="m">
      <Banner
        kind={report.counts.problem > 0 ? 'caution' : 'info'}
        title={`${file.name}: ${countsSentence(report)}`}
        actions={<LeftOver report={report} />}
      >
        <Stack gap="xs">
          {report.counts.good === 0 && report.counts.problem === 0 && (
            <Text>Every row stands there with the same figures, so there is nothing to send.</Text>
          )}
          {report.notes.map((note) => (
            <Text key={note}>{note}</Text>
          ))}
        </Stack>
      </Banner>
      <ReportTable report={report} />
    </Stack>
  );
}

/** The rows with a problem, to be corrected. */
function LeftOver({ report: { leftOver } }: { report: EarlierReport }) {
  if (leftOver === null) return null;
  const save = () =>
    keepFile(new Blob([leftOver], { type: 'text/csv;charset=utf-8' }), 'ebbline-rows-to-correct.csv');
  return <Button label="Save the rows with a problem" onPress={save} />;
}

function SentPart({ report, bankId, onMore }: { report: EarlierReport; bankId: string; onMore: () => void }) {
  return (
    <Stack gap="l">
      <Banner kind="done" title={countsSentence(report)} actions={<LeftOver report={report} />}>
        A moderator looks at the checks next. You get an e-mail when they are decided.
      </Banner>
      <ReportTable report={report} />
      <Row>
        {bankId === '' ? (
          <ButtonLink kind="primary" href="/banks" label="To my banks" />
        ) : (
          <ButtonLink
            kind="primary"
            href={{ pathname: '/banks/[bankId]', params: { bankId } }}
            label="To the bank"
          />
        )}
        <Button label="Add another file" onPress={onMore} />
      </Row>
    </Stack>
  );
}

const sentence = (error: Error): string =>
  error instanceof ApiError ? (error.fields.file ?? error.message) : 'The file could not be sent. Try again.';
