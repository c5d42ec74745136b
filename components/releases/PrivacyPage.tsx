import { StyleSheet } from 'react-native';

import { Heading, Link, Page, PageHead, Stack, Text } from '@/components/ui';

/** The rule by which nobody is to be found in what is public, its sources and its limits. */
export function PrivacyPage() {
  return (
    <Page>
      <PageHead
        title="What is kept private, and how"
        documentTitle="Privacy of the data"
        back={{ href: '/data', label: 'Data' }}
      />
      <Stack gap="xl" style={styles.words}>
        <Stack gap="s">
          <Heading>The rule</Heading>
          <Text>
            Every published number, curve, dot and range comes from the banks of at least 5 different owners,
            and no owner is more than half of the checks behind it. An owner with many banks counts once.
          </Text>
          <Text>
            Every published row shares what could identify its bank (cell type, year of commissioning, climate
            band, layout and clamping) with rows of at least 5 owners. Where it would not, these are made
            coarser in a fixed order: the kind of clamping goes first, then years become bands of three, then
            climate, layout, year and at last the cell type are left out. Rows that even this does not protect
            wait.
          </Text>
          <Text>
            Changes are published 5 owners at a time, too: from one curve to the next, and from one release to
            the next among banks that look alike. So nobody who knows when you sent a check can find it by
            what changed. Withdrawn checks leave in the same way: they drop out once those of 5 owners of
            alike banks can go together, since a row that went alone would be known by that.
          </Text>
          <Text>
            Parts are held back where the rest of a whole, less the parts that are shown, would be of fewer
            than 5 owners. Filters are fixed bands, one at a time on a cell type. Counts below 20 are given as
            ranges. Age is given in tenths of a year, other values rounded as the dictionary of each release
            says. Dates, places, photos, logs and names are never published. A bank has a new random name in
            each release.
          </Text>
        </Stack>
        <Stack gap="s">
          <Heading>Where it comes from</Heading>
          <Text>
            Thresholds of this kind are usual in official statistics, where cells of few contributors, or with
            one that outweighs the rest, are not published, and further cells are held back so that no hidden
            one follows from its totals (Hundepool and others, Statistical Disclosure Control, Wiley 2012).
            That rows are to share their identifying fields is k-anonymity (Sweeney, k-anonymity: a model for
            protecting privacy, 2002), here with 5 owners. That 5 is enough here is our judgement.
          </Text>
        </Stack>
        <Stack gap="s">
          <Heading>What it costs</Heading>
          <Text>
            The public fit is one of the rows as they are published. On the demonstration pool, where all
            1,085 banks could be published, no parameter moved by more than half of its standard error by
            that, and years to 80 % by at most 1 %.
          </Text>
        </Stack>
        <Stack gap="s">
          <Heading>What it can’t do</Heading>
          <Text>
            Rows of two releases can be matched by their values, though not by a name. Whoever has published
            their own figures elsewhere can be recognised by them. Sharing a class with 4 others hides which
            row is yours, not what all 5 have in common. And whoever knows for many releases who came and who
            left can rule out more than somebody who knows it for one.
          </Text>
          <Link href="/method">How the figures are made</Link>
        </Stack>
      </Stack>
    </Page>
  );
}

const styles = StyleSheet.create({ words: { maxWidth: 720 } });
