import { useQuery } from '@tanstack/react-query';
import { Pressable, StyleSheet } from 'react-native';

import { QueryView } from '@/components/QueryView';
import { color, space, target } from '@/components/theme';
import { Heading, LoadingState, Panel, Quiet, SkeletonRows, Stack, Text } from '@/components/ui';
import { demoAccountsQuery } from '@/lib/client/accounts';

interface DemoAccountsProps {
  onChoose: (account: { email: string; password: string }) => void;
}

/** The accounts of the demo; choosing one fills in the form. */
export function DemoAccounts({ onChoose }: DemoAccountsProps) {
  const query = useQuery(demoAccountsQuery);
  return (
    <Panel label="Demo accounts">
      <Stack gap="xs">
        <Heading size="lead">Demo accounts</Heading>
        <Quiet>This exchange runs on invented data. Choose one to fill in the form.</Quiet>
      </Stack>
      <QueryView query={query} loading={<ListSkeleton />}>
        {({ accounts }) => (
          <Stack gap="hair">
            {accounts.map(({ email, password, note }) => (
              <Pressable
                key={email}
                role="button"
                onPress={() => onChoose({ email, password })}
                style={({ hovered, pressed }) => [styles.account, (hovered || pressed) && styles.hovered]}
              >
                <Text weight="strong" tone="tide">
                  {email}
                </Text>
                <Quiet>{note}</Quiet>
              </Pressable>
            ))}
          </Stack>
        )}
      </QueryView>
    </Panel>
  );
}

function ListSkeleton() {
  return (
    <LoadingState label="Loading demo accounts">
      <SkeletonRows count={7} height={52} />
    </LoadingState>
  );
}

const styles = StyleSheet.create({
  account: {
    minHeight: target,
    paddingVertical: space.s,
    // The ground under the pointer reaches beyond the words, which stay in line with the heading.
    paddingHorizontal: space.s,
    marginHorizontal: -space.s,
    borderTopWidth: 1,
    borderTopColor: color.line,
  },
  hovered: { backgroundColor: color.wash },
});
