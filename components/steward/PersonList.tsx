import { useState } from 'react';

import { Button, Chip, Quiet, Row, Table } from '@/components/ui';
import type { PersonAct } from '@/lib/client/steward';
import { useSession } from '@/lib/client/session';
import type { Person } from '@/lib/contract/steward';
import { formatDate } from '@/lib/units';

import { ActDialog } from './ActDialog';
import { actWords, nameOf, roleWords } from './personWords';

interface PersonListProps {
  caption: string;
  people: readonly Person[];
  onDone?: () => void;
}

/** Accounts with what the steward can do to each; never to oneself. */
export function PersonList({ caption, people, onDone }: PersonListProps) {
  const { user } = useSession();
  const [asking, setAsking] = useState<{ person: Person; act: PersonAct } | null>(null);
  return (
    <>
      <Table
        caption={caption}
        rows={people}
        rowKey={({ id }) => id}
        empty="Nobody."
        columns={[
          { key: 'name', title: 'Account', cell: nameOf },
          {
            key: 'role',
            title: 'Role',
            cell: ({ role, lockedAt }) => (
              <Row gap="s">
                {roleWords[role]}
                {lockedAt && <Chip tone="rust">locked</Chip>}
              </Row>
            ),
          },
          {
            key: 'code',
            title: 'Code at sign-in',
            cell: ({ hasSecondFactor }) => (hasSecondFactor ? 'on' : 'off'),
          },
          { key: 'since', title: 'Account since', cell: ({ since }) => formatDate(since.slice(0, 10)) },
          {
            key: 'acts',
            title: 'Act',
            cell: (person) =>
              person.id === user?.id ? (
                <Quiet>This is you.</Quiet>
              ) : (
                <Row gap="s">
                  {actsOn(person).map((act) => (
                    <Button
                      key={act}
                      label={actWords[act].label}
                      description={`${actWords[act].label}: ${nameOf(person)}`}
                      onPress={() => setAsking({ person, act })}
                    />
                  ))}
                </Row>
              ),
          },
        ]}
      />
      {asking && <ActDialog {...asking} onDone={onDone} onClose={() => setAsking(null)} />}
    </>
  );
}

const actsOn = ({ role, lockedAt, hasSecondFactor }: Person): PersonAct[] => [
  ...(role === 'owner' ? [] : (['dismiss'] as const)),
  ...(hasSecondFactor ? (['clear-second-factor'] as const) : []),
  lockedAt ? 'unlock' : 'lock',
];
