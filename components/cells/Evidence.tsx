import { Heading, Link, Quiet, Stack, Text } from '@/components/ui';
import type { CellPage } from '@/lib/contract/cells';
import { formatCount, formatYears } from '@/lib/units';

import { FailureRate } from './FailureRate';
import { sourceSentence } from './lifeWords';

/** Who stands behind the figures, how much is the pool's word, and what they leave out. */
export function Evidence({ page: { view, pool, failures } }: { page: CellPage }) {
  const { life, evidence } = view;
  if (!life) return null;
  const behind = life.basis === 'pool' ? pool.evidence : evidence;
  const source = sourceSentence(life);
  const oldest = Math.max(0, ...view.dots.map(({ years }) => years));
  return (
    <Stack gap="s">
      <Heading level={2}>Evidence</Heading>
      <Text>
        {behind &&
          `${formatCount(behind.banks)} banks of ${formatCount(behind.owners)} owners, ${formatCount(behind.checks)} checks. `}
        {oldest > 0 && `The oldest reading is of ${formatYears(oldest)}. `}
        {source && `${source} `}
        <Link href="/method">Method</Link>
      </Text>
      <FailureRate failures={failures} />
      <Quiet>
        No sudden drop late in life is modelled: a long life is too long if there is one. Banks that stopped
        reporting may have done worse. Temperature and charge level are often guessed by owners, so their
        effects are “at least”.
      </Quiet>
    </Stack>
  );
}
