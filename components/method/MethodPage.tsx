import { useQuery } from '@tanstack/react-query';

import { StyleSheet, View } from 'react-native';

import { QueryView } from '@/components/QueryView';
import { space } from '@/components/theme';
import { Heading, Link, LoadingState, Page, PageHead, SkeletonRows, Stack, Text } from '@/components/ui';
import { publicFitQuery } from '@/lib/client/fits';

import { Limits } from './Limits';
import { ModelPart } from './ModelPart';
import { PriorsPart } from './PriorsPart';
import { Reading } from './Reading';

/** How the figures come about, from plain words to equations. */
export function MethodPage() {
  const query = useQuery(publicFitQuery());
  return (
    <Page>
      <PageHead
        title="How the figures are made"
        documentTitle="Method"
        sub="From what owners measure to years of life: first in plain words, then exactly."
        actions={<Link href="/method/diagnostics">Diagnostics of the fit</Link>}
      />
      <Stack gap="xl">
        <Stack gap="m" style={styles.plain}>
          <Heading>In plain words</Heading>
          <Text>
            Owners of home storage banks measure the capacity of their bank about once a year and say how it
            lived. Moderators look at every check. One model is then fitted to all checks at once. It says how
            much of the capacity goes with time alone and how much with use, and how depth, rate, heat, charge
            level and clamping hasten or slow that. Banks of one cell type share what is special to it; a cell
            type with few banks is drawn towards the average of all.
          </Text>
          <Text>
            The fit begins from what published laboratory studies of LFP cells found, held loosely, and moves
            away from it as far as the checks say. Beside every figure stands how much of it still comes from
            those studies.
          </Text>
        </Stack>
        <View style={styles.words}>
          <Reading />
          <ModelPart />
        </View>
        <QueryView query={query} loading={<LoadingPriors />}>
          {({ fit }) => <PriorsPart fit={fit} />}
        </QueryView>
        <View style={styles.words}>
          <Limits />
        </View>
      </Stack>
    </Page>
  );
}

const LoadingPriors = () => (
  <LoadingState label="Loading the parameters">
    <SkeletonRows count={6} height={40} />
  </LoadingState>
);

const styles = StyleSheet.create({ plain: { maxWidth: 720 }, words: { maxWidth: 720, gap: space.xl } });
