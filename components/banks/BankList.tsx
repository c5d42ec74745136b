import { StyleSheet, View } from 'react-native';

import { openQuestion, sohLine } from '@/components/checks/checkWords';
import { color, space } from '@/components/theme';
import { CheckStateChip, Chip, Figure, Link, Quiet, Skeleton, Text } from '@/components/ui';
import { type Bank, endingOf } from '@/lib/contract/banks';
import type { Check } from '@/lib/contract/checks';
import { formatCount, formatDate } from '@/lib/units';

import { bankEventWords, bankLine } from './bankWords';

export interface ListedBank {
  bank: Bank;
  /** In order of their day; undefined while they are on their way. */
  checks: Check[] | undefined;
}

/** Banks with the state of their last check; what asks for an answer comes first. */
export function BankList({ banks }: { banks: readonly ListedBank[] }) {
  const asked = ({ checks = [] }: ListedBank) => checks.some(({ state }) => state === 'sentBack');
  const ordered = [...banks].sort((one, other) => Number(asked(other)) - Number(asked(one)));
  return (
    <View role="list" aria-label="My banks" style={styles.list}>
      {ordered.map(({ bank, checks }) => (
        <View key={bank.id} role="listitem" style={styles.row}>
          <View style={styles.line}>
            <View style={styles.shrink}>
              <Link
                href={{ pathname: '/banks/[bankId]', params: { bankId: bank.id } }}
                size="lead"
                tone="ink"
                strong
                bare
              >
                {bank.name}
              </Link>
            </View>
            <BankState bank={bank} checks={checks} />
          </View>
          <Quiet>{bankLine(bank)}</Quiet>
          <LastCheck bank={bank} checks={checks} />
          <Questions bank={bank} checks={checks ?? []} />
        </View>
      ))}
    </View>
  );
}

function BankState({ bank, checks }: ListedBank) {
  const last = checks?.at(-1);
  const ending = endingOf(bank.events);
  if (ending) return <Chip>{bankEventWords[ending.kind].toLowerCase()}</Chip>;
  if (!checks) return <Skeleton width={72} height={20} />;
  return last ? <CheckStateChip state={last.state} /> : <Chip>no check yet</Chip>;
}

function LastCheck({ bank: { checkCount, events }, checks }: ListedBank) {
  const last = checks?.at(-1);
  const count = `${formatCount(checkCount)} ${checkCount === 1 ? 'check' : 'checks'}`;
  if (!last)
    return (
      <Quiet>
        {checkCount === 0 && !endingOf(events) ? 'Add its first check to start its curve.' : count}
      </Quiet>
    );
  return (
    <Text size="small">
      {`${count}, the last on ${formatDate(last.reading.testedOn)}: `}
      <Figure size="small" strong>
        {sohLine(last.computed)}
      </Figure>
      {' of rated'}
    </Text>
  );
}

/** Every question that waits, with the way to its answer. */
function Questions({ bank, checks }: { bank: Bank; checks: Check[] }) {
  return checks.map((check) => {
    const question = openQuestion(check);
    if (question === undefined) return null;
    return (
      <View key={check.id} style={styles.question}>
        <Text tone="brass" weight="strong">
          A moderator asks
        </Text>
        <Text>{question}</Text>
        <Link
          href={{
            pathname: '/banks/[bankId]/checks/[checkId]',
            params: { bankId: bank.id, checkId: check.id },
          }}
          description={`Answer about the check of ${formatDate(check.reading.testedOn)}`}
          strong
        >
          Answer
        </Link>
      </View>
    );
  });
}

const styles = StyleSheet.create({
  list: { marginTop: -space.s },
  row: { paddingVertical: space.l, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline', gap: space.m },
  shrink: { flexShrink: 1, minWidth: 0 },
  question: {
    marginTop: space.s,
    paddingLeft: space.m,
    borderLeftWidth: 4,
    borderLeftColor: color.brass,
    gap: space.xs,
  },
});
