import { useEffect, useRef } from 'react';
import { StyleSheet, type Text as NativeText, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Heading, Link, Quiet, Text } from '@/components/ui';
import type { Bank, BankEvent } from '@/lib/contract/banks';
import { formatCount, formatDate, formatYears, yearsBetween } from '@/lib/units';

interface BankEndedProps {
  bank: Bank;
  ending: BankEvent;
  /** It was noted just now: the reader is led here. */
  isNew: boolean;
}

/** In place of the next check of a bank that was sold or retired: what it leaves behind, and thanks. */
export function BankEnded({ bank, ending, isNew }: BankEndedProps) {
  const heading = useRef<NativeText>(null);

  useEffect(() => {
    if (!isNew) return;
    window.scrollTo(0, 0);
    const node: unknown = heading.current;
    if (node instanceof HTMLElement) node.focus({ preventScroll: true });
  }, [isNew]);

  const age = formatYears(yearsBetween(`${bank.firstUseMonth}-01`, ending.happenedOn));
  const verb = ending.kind === 'sold' ? 'Sold' : 'Retired';
  return (
    <View role="region" aria-label="How this bank ended" style={styles.box}>
      <Heading ref={heading} tabIndex={-1}>
        Thank you: this bank has done its part
      </Heading>
      <Text>{`${verb} on ${formatDate(ending.happenedOn)}, ${age} after its first use. ${leftBehind(bank)}`}</Text>
      <Text>
        How and when it ended counts too. A bank that failed or was given up early says as much about its
        cells as one that lasted; without it every life would look too good.
      </Text>
      <Quiet>
        {'No further check is asked for and no reminder is mailed. '}
        <Link
          href={{ pathname: '/banks/[bankId]/check', params: { bankId: bank.id } }}
          size="small"
          description="Add a check that was made before it ended"
        >
          Add a check that was made before
        </Link>
      </Quiet>
    </View>
  );
}

const leftBehind = ({ checkCount, bought }: Bank): string => {
  if (checkCount === 0) return 'No check was made of it.';
  const count = checkCount === 1 ? 'Its check stays' : `Its ${formatCount(checkCount)} checks stay`;
  return bought === 'new'
    ? `${count}, and those that were approved stay in the pool.`
    : `${count}; pooled lives leave out banks that were not bought new.`;
};

const styles = StyleSheet.create({
  box: {
    gap: space.s,
    padding: space.l,
    borderTopWidth: 2,
    borderTopColor: color.tide,
    backgroundColor: color.tideWash,
  },
});
