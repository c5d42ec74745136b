import { Heading, Stack, Strong, Table, Text } from '@/components/ui';

interface Simulated {
  truth: string;
  effects: string;
  lives: string;
  check: string;
}

// As `npm run bench:calibrate` printed it for this code: 200 pools, then 50 of each kind, of 300 banks; the effects that are published.
const simulated: Simulated[] = [
  { truth: 'as the priors expect', effects: '92 to 97 %', lives: '87 to 92 %', check: '89 %' },
  { truth: 'two prior widths off in five effects', effects: '82 to 90 %', lives: '90 %', check: '90 %' },
  {
    truth: 'as expected, every condition guessed',
    effects: '88 to 100 %',
    lives: '84 to 92 %',
    check: '91 %',
  },
  { truth: 'another calendar exponent', effects: '90 to 98 %', lives: '84 to 96 %', check: '86 %' },
];

/** What simulation showed, and what the figures can't tell. */
export function Limits() {
  return (
    <Stack gap="m">
      <Heading>What simulation showed</Heading>
      <Text>
        Pools of 300 banks were made up from known truths and fitted as the real one is. How often the 90 %
        ranges held the truth:
      </Text>
      <Table
        caption="How often 90 % ranges held the truth, in simulated pools of 300 banks"
        rows={simulated}
        rowKey={({ truth }) => truth}
        columns={[
          { key: 'truth', title: 'The truth', cell: ({ truth }) => truth },
          { key: 'effects', title: 'Effects', figures: true, cell: ({ effects }) => effects },
          { key: 'lives', title: 'Years to 80 %', figures: true, cell: ({ lives }) => lives },
          { key: 'check', title: 'A new bank’s check', figures: true, cell: ({ check }) => check },
        ]}
      />
      <Text>
        So where the truth lies far from published studies in several things at once, the ranges of effects
        hold it about 8 times in 10, not 9. Of gross mistakes planted in 2 % of checks, 95 % were found and
        0.03 % of honest checks were taken for mistakes. Where a bank has one check only, errors below about
        10 % can’t be seen.
      </Text>
      <Heading>What the figures can’t tell</Heading>
      <Text>
        <Strong>A late drop.</Strong> No sudden drop late in life is modelled, so every long life is
        optimistic if there is one.
      </Text>
      <Text>
        <Strong>Who stopped.</Strong> Banks that stopped reporting may have done worse than those that went
        on.
      </Text>
      <Text>
        <Strong>Why.</Strong> Banks were not dealt their uses by lot. The model compares like with like as far
        as the conditions asked for go; what nobody asked is not in it.
      </Text>
      <Text>
        <Strong>Elsewhere.</Strong> A use outside the middle 95 % of any condition in the pool is answered
        “the pool does not reach there”.
      </Text>
    </Stack>
  );
}
