import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { QueryView } from '@/components/QueryView';
import { Button, Heading, LoadingState, Page, Quiet, Row, SkeletonRows, Stack } from '@/components/ui';
import { peopleQuery } from '@/lib/client/steward';

import { AppointDialog } from './AppointDialog';
import { FindPerson } from './FindPerson';
import { PersonList } from './PersonList';
import { StewardHead } from './StewardHead';

/** Who moderates and who runs the exchange; appointing, taking a role away, locking. */
export function PeoplePage() {
  const query = useQuery(peopleQuery);
  const [isAppointing, setIsAppointing] = useState(false);
  return (
    <Page>
      <StewardHead
        title="People"
        sub="Moderators, stewards, and accounts that are locked. What is done here holds at once and stands in the trail."
      />
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading moderators and stewards">
            <SkeletonRows count={4} height={60} />
          </LoadingState>
        }
      >
        {({ staff, locked }) => (
          <>
            <Stack gap="m">
              <Row justify="space-between">
                <Heading>Moderators and stewards</Heading>
                <Button kind="primary" label="Appoint someone" onPress={() => setIsAppointing(true)} />
              </Row>
              <PersonList caption="Moderators and stewards" people={staff} />
            </Stack>
            <FindPerson />
            <Stack gap="m">
              <Heading>Locked accounts of owners</Heading>
              {locked.length === 0 ? (
                <Quiet>None. An account found above can be locked.</Quiet>
              ) : (
                <PersonList caption="Locked accounts of owners" people={locked} />
              )}
            </Stack>
          </>
        )}
      </QueryView>
      {isAppointing && <AppointDialog onClose={() => setIsAppointing(false)} />}
    </Page>
  );
}
