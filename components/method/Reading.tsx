import { DefinitionList, Heading, Stack, Text } from '@/components/ui';

/** What ranges, verdicts and standings mean. */
export function Reading() {
  return (
    <Stack gap="m">
      <Heading>How to read a figure</Heading>
      <Text>
        Three things are told apart. The capacity left where readings end is measured. The years to 80 % are
        the model’s, with a word for how far they lie past the readings. And the range of banks says how much
        banks of one kind differ, which no amount of data makes smaller.
      </Text>
      <DefinitionList
        items={[
          {
            label: '90 % range',
            value: 'holds the typical bank’s true value 9 times in 10, if the model is right',
          },
          { label: '8 of 10 banks', value: 'the life of 8 in 10 single banks lies between its ends' },
          {
            label: 'reach',
            value: 'the 95 % quantile of the checks’ years and full cycles, whichever comes first',
          },
          { label: 'measured', value: 'up to the reach' },
          { label: 'projected', value: 'up to twice the reach' },
          { label: 'extrapolated', value: 'up to three times the reach: only the range is printed' },
          {
            label: 'beyond',
            value: 'further: no number is printed, though the programming interface gives it',
          },
        ]}
      />
      <Text>An effect has one of four verdicts, always in these words.</Text>
      <DefinitionList
        items={[
          { label: 'shown', value: 'its 90 % range excludes no change' },
          { label: 'too small to matter', value: 'its whole range lies within 5 % of no change' },
          {
            label: 'could be none, or a to b',
            value: 'neither: the range holds no change and more than 5 %',
          },
          {
            label: 'not measured yet',
            value: 'more than half of it comes from published studies, so no number is printed',
          },
        ]}
      />
      <Text>
        Where 25 to 50 % comes from published studies, the figure is marked “leans on published studies”.
        Temperature and charge level are often guessed, and errors in them shrink an effect: their ranges are
        widened and read “at least”. Clamping is told apart below and above 0.3 It, since the trade argues
        about just that. A cell type with fewer than 10 banks or 5 owners is told by the pool’s figure, with
        its wider range.
      </Text>
    </Stack>
  );
}
