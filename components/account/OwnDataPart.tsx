import { Heading, Row, Stack, Text } from '@/components/ui';
import { ownFiles } from '@/lib/client/ownData';

import { SaveFileButton } from './SaveFileButton';

/** Everything the exchange keeps about one, to take along. */
export function OwnDataPart() {
  return (
    <Stack gap="m">
      <Heading>Your data</Heading>
      <Text>
        Everything kept about you in one JSON file: the account, your banks with their events, every check
        with its fields, their sources, what was computed and each step of its screening, and the list of your
        uploads. The checks alone also come as a CSV table, one line each.
      </Text>
      <Row align="flex-start">
        <SaveFileButton path={ownFiles.everything} label="Save everything (JSON)" />
        <SaveFileButton path={ownFiles.checks} label="Save the checks (CSV)" />
      </Row>
    </Stack>
  );
}
