import { Link, Stack, Text } from '@/components/ui';

/** How the curve came about, whole or in one band. */
export function HowComputed({ isBand }: { isBand: boolean }) {
  return (
    <Stack gap="s">
      <Text>
        Each circle is one approved capacity check, brought to 25 °C and 0.2 It.{' '}
        {isBand
          ? 'The line is a single curve through the banks of this band alone, q = k · nᶻ over n full cycles, without the calendar; its range holds 90 % of curves fitted again to banks drawn anew. It is there to look at the readings; lives are the pooled model’s.'
          : 'The line is the pooled model’s for this cell type at the use stated: one model over all cell types tells depth, rate, heat, charge level, age and cycles apart, and each cell type differs from the average as far as its own banks say. The band is the 90 % range of the typical bank; the bar on the 80 % line holds 8 of 10 banks. Circles are banks used in many ways, so they need not lie on the line.'}
      </Text>
      <Text>
        Readings reach to the 95 % quantile of the checks. Up to there the curve is measured, up to twice as
        far it is projected, up to three times extrapolated, and past that no figure is given. No sudden drop
        late in life is modelled, and banks that stopped reporting may have done worse.
      </Text>
      <Link href="/method">The method, with its equations</Link>
    </Stack>
  );
}
