import { DefinitionList, Heading, Stack } from '@/components/ui';
import type { Computed } from '@/lib/contract/checks';
import { budgetPartLabels } from '@/lib/measure';
import { formatPercent } from '@/lib/units';

const halves = [
  { half: 'newEachCheck', title: 'New at each check' },
  { half: 'sameEachCheck', title: 'The same at each check of this meter' },
] as const;

/** Every part of an uncertainty budget in its two halves: relative standard uncertainty, and share of its half. */
export function BudgetList({ budget }: { budget: Computed['budget'] }) {
  return (
    <Stack gap="m">
      {halves.map(({ half, title }) => (
        <Stack key={half} gap="xs">
          <Heading level={3} size="body">
            {title}
          </Heading>
          <DefinitionList
            figures
            items={budget[half].map(({ name, relSd, varianceShare }) => ({
              label: budgetPartLabels[name] ?? name,
              value: `u = ${formatPercent(relSd, 2)}, ${formatPercent(varianceShare)} of the variance`,
            }))}
          />
        </Stack>
      ))}
    </Stack>
  );
}
