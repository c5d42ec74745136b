import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';

import { publishedFitOf } from '@/components/chosenUse/publishedModel';
import { QueryView } from '@/components/QueryView';
import { EmptyState, Link, LoadingState, Page, PageHead, Row, Skeleton, Stack } from '@/components/ui';
import { cellListQuery } from '@/lib/client/cells';
import { publicFitQuery } from '@/lib/client/fits';
import type { PublishedFitReport } from '@/lib/contract/fits';
import type { PublicModel } from '@/lib/contract/model';
import { formatCount } from '@/lib/units';

import { ClampingAnswer } from './ClampingAnswer';
import { EndAnswer } from './EndAnswer';
import { LeverAnswer } from './LeverAnswer';
import { allQuestions, clampingQuestion, endQuestion, leverQuestions } from './questions';

/** One question of the trade, answered by the pool. */
export function QuestionPage({ slug }: { slug: string }) {
  const question = allQuestions.find((one) => one.slug === slug);
  const fitQuery = useQuery(publicFitQuery());
  const listQuery = useQuery(cellListQuery());
  if (!question) return <UnknownQuestion />;
  const report = fitQuery.data?.fit;
  return (
    <Page>
      <PageHead
        back={{ href: '/questions', label: 'Questions' }}
        title={question.title}
        documentTitle={question.title}
        sub={
          report
            ? `What ${formatCount(report.evidence.checks)} checks on ${formatCount(report.evidence.banks)} banks of ${formatCount(report.evidence.owners)} owners say.`
            : question.about
        }
      />
      <QueryView query={listQuery} loading={<Waiting />}>
        {({ model }) => (
          <QueryView query={fitQuery} loading={<Waiting />}>
            {({ fit }) =>
              fit && model ? (
                <Answer slug={slug} report={fit} model={model} />
              ) : (
                <EmptyState title="Nothing is measured yet">
                  An answer needs checks of at least five owners. There are none published yet.
                </EmptyState>
              )
            }
          </QueryView>
        )}
      </QueryView>
      <Row gap="l">
        {allQuestions
          .filter((one) => one.slug !== slug)
          .map((one) => (
            <Link key={one.slug} href={`/questions/${one.slug}`}>
              {one.title}
            </Link>
          ))}
        <Link href="/method">How the figures are made</Link>
      </Row>
    </Page>
  );
}

function Answer({ slug, report, model }: { slug: string; report: PublishedFitReport; model: PublicModel }) {
  const fit = useMemo(() => publishedFitOf(model), [model]);
  if (slug === clampingQuestion.slug) return <ClampingAnswer fit={fit} report={report} />;
  if (slug === endQuestion.slug) return <EndAnswer fit={fit} />;
  const question = leverQuestions.find((one) => one.slug === slug)!;
  const effect = report.effects.find(({ lever }) => lever === question.lever);
  return <LeverAnswer question={question} effect={effect} fit={fit} report={report} />;
}

function UnknownQuestion() {
  return (
    <Page>
      <PageHead title="No such question" back={{ href: '/questions', label: 'Questions' }} />
      <Stack gap="s">
        {allQuestions.map(({ slug, title }) => (
          <Link key={slug} href={`/questions/${slug}`}>
            {title}
          </Link>
        ))}
      </Stack>
    </Page>
  );
}

const Waiting = () => (
  <LoadingState label="Loading the answer">
    <Skeleton height={96} />
    <Skeleton height={380} />
  </LoadingState>
);
