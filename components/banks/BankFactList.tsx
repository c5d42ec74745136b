import { DefinitionList, Heading, Stack } from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';

import { factsOf } from './bankFacts';

/** What is known of a bank; what was not given is left out. */
export function BankFactList({ bank }: { bank: Bank }) {
  return (
    <Stack gap="m">
      <Heading>The bank</Heading>
      <DefinitionList items={factsOf(bank)} />
    </Stack>
  );
}
