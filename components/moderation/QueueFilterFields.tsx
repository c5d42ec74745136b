import { useRouter } from 'expo-router';

import { Button, Disclosure, SelectField, Stack } from '@/components/ui';
import type { QueueFilters } from '@/lib/client/moderation';
import type { CheckState, Severity } from '@/lib/contract/checks';
import type { Queue } from '@/lib/contract/moderation';
import { formatCount } from '@/lib/units';

import { writeFilters } from './queueFilters';
import { ruleWords } from './ruleWords';

const stateWords: Partial<Record<CheckState, string>> = {
  submitted: 'Waiting',
  sentBack: 'Sent back, with the owner',
  approved: 'Approved',
  turnedAway: 'Turned away',
  withdrawn: 'Withdrawn',
  recalled: 'Recalled',
};
const severities: readonly Severity[] = ['repairable', 'doubtful', 'look', 'fits'];
const all = '';

interface QueueFilterFieldsProps {
  filters: QueueFilters;
  queue: Queue | undefined;
}

/** What the queue shows, kept in the address so that it can be come back to and passed on. */
export function QueueFilterFields({ filters, queue }: QueueFilterFieldsProps) {
  const router = useRouter();
  const { counts, facets } = queue ?? {};
  const set = (changes: Partial<Record<keyof QueueFilters, string>>) => {
    const next = { ...filters, ...changes } as QueueFilters;
    const kept = writeFilters(next);
    // An empty text takes a filter out of the address.
    const params = { state: undefined, severity: undefined, cellType: undefined, rule: undefined, ...kept };
    router.setParams(params);
  };
  const named = (label: string, count: number | undefined) => `${label} (${formatCount(count ?? 0)})`;
  const active = [filters.severity, filters.cellType, filters.rule].filter(Boolean).length;
  return (
    <Stack gap="s">
      <SelectField
        label="Show"
        value={filters.state}
        options={Object.entries(stateWords).map(([value, label]) => ({
          value,
          label: named(label, counts?.[value as CheckState]),
        }))}
        onChange={(state) => set({ state, severity: all, cellType: all, rule: all })}
      />
      <Disclosure label={active === 0 ? 'Filter' : `Filter (${active} set)`} startsOpen={active > 0}>
        <Stack gap="m">
          <SelectField
            label="Finding"
            optional
            value={filters.severity ?? all}
            options={[
              { value: all, label: 'Any' },
              ...severities.map((value) => ({ value, label: named(value, facets?.severities[value]) })),
            ]}
            onChange={(severity) => set({ severity })}
          />
          <SelectField
            label="Cell type"
            optional
            value={filters.cellType ?? all}
            options={[
              { value: all, label: 'Any' },
              ...(facets?.cellTypes ?? []).map(({ id, name, count }) => ({
                value: id,
                label: named(name, count),
              })),
            ]}
            onChange={(cellType) => set({ cellType })}
          />
          <SelectField
            label="Rule"
            optional
            value={filters.rule ?? all}
            options={[
              { value: all, label: 'Any' },
              ...(facets?.rules ?? []).map(({ rule, count }) => ({
                value: rule,
                label: named(ruleWords[rule] ?? rule, count),
              })),
            ]}
            onChange={(rule) => set({ rule })}
          />
          {active > 0 && (
            <Button
              kind="quiet"
              label="Clear the filters"
              onPress={() => set({ severity: all, cellType: all, rule: all })}
            />
          )}
        </Stack>
      </Disclosure>
    </Stack>
  );
}
