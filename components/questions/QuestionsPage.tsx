import { useQuery } from '@tanstack/react-query';
import { View } from 'react-native';

import { ratioWords, verdictWords } from '@/components/cells/effectWords';
import { Divider, Heading, Link, Page, PageHead, Quiet, Stack, Text } from '@/components/ui';
import { publicFitQuery } from '@/lib/client/fits';
import type { LeverEffect } from '@/lib/contract/effects';

import { allQuestions, clampingQuestion, leverQuestions } from './questions';

/** The questions of the trade, each with the verdict of the pool. */
export function QuestionsPage() {
  const { data } = useQuery(publicFitQuery());
  const effects = data?.fit?.effects ?? [];
  return (
    <Page>
      <PageHead
        title="Questions"
        documentTitle="Questions of the trade, answered by measurement"
        sub="What the pool says of each lever: how much life, how sure, and what that is worth."
      />
      <View role="list">
        {allQuestions.map(({ slug, title, about }) => (
          <View key={slug} role="listitem">
            <Stack gap="xs" style={{ paddingVertical: 16 }}>
              <Heading>
                <Link href={`/questions/${slug}`} size="heading" strong>
                  {title}
                </Link>
              </Heading>
              <Quiet>{about}</Quiet>
              {verdictsFor(slug, effects).map((line) => (
                <Text key={line}>{line}</Text>
              ))}
            </Stack>
            <Divider />
          </View>
        ))}
      </View>
    </Page>
  );
}

/** "×1.31, shown"; clamping in each of its rate classes. */
function verdictsFor(slug: string, effects: readonly LeverEffect[]): string[] {
  const words = (effect: LeverEffect) =>
    [ratioWords(effect), verdictWords(effect)].filter(Boolean).join(', ');
  if (slug === clampingQuestion.slug)
    return effects
      .filter(({ lever }) => lever.startsWith('clamping'))
      .map((effect) => `${effect.lever === 'clampingLowRate' ? 'Below' : 'Above'} 0.3 It: ${words(effect)}`);
  const question = leverQuestions.find((one) => one.slug === slug);
  const effect = effects.find(({ lever }) => lever === question?.lever);
  if (!question || !effect || typeof effect.from === 'boolean' || typeof effect.to === 'boolean') return [];
  return [`${question.show(effect.from)} → ${question.show(effect.to)}: life ${words(effect)}`];
}
