import { useRouter } from 'expo-router';
import { useState } from 'react';

import { Button, DateField, Row, SelectField, Stack, TextField } from '@/components/ui';
import type { TrailFilters } from '@/lib/client/steward';

import { trailKinds } from './trailFilters';

const kinds = [
  { value: '', label: 'Everything' },
  ...Object.entries(trailKinds).map(([value, label]) => ({ value, label })),
];

/** Which part of the trail is shown, kept in the address. */
export function TrailFilterFields({ filters }: { filters: TrailFilters }) {
  const router = useRouter();
  const [record, setRecord] = useState(filters.record ?? '');
  const set = (changes: TrailFilters) => {
    const next = { ...filters, ...changes };
    const params = ['kind', 'record', 'from', 'to'] as const;
    router.setParams(Object.fromEntries(params.map((name) => [name, next[name] || undefined])));
  };
  const showRecord = () => set({ record: record.trim() });
  const isNarrowed = Object.values(filters).some(Boolean);
  return (
    <Stack gap="m">
      <SelectField
        label="Of what"
        optional
        value={filters.kind ?? ''}
        options={kinds}
        onChange={(kind) => set({ kind })}
      />
      <DateField
        label="From"
        hint="A day, by UTC"
        optional
        value={filters.from ?? ''}
        onChange={(from) => set({ from })}
      />
      <DateField
        label="Up to"
        hint="A day, by UTC"
        optional
        value={filters.to ?? ''}
        onChange={(to) => set({ to })}
      />
      <TextField
        label="Record"
        hint="The number of a check, bank, account, cell type or release"
        optional
        value={record}
        onChange={setRecord}
        onBlur={showRecord}
        onSubmit={showRecord}
        autoComplete="off"
        maxLength={80}
      />
      {isNarrowed && (
        <Row>
          <Button
            kind="quiet"
            label="Show everything"
            onPress={() => {
              setRecord('');
              set({ kind: '', record: '', from: '', to: '' });
            }}
          />
        </Row>
      )}
    </Stack>
  );
}
