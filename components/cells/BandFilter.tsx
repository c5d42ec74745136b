import { Pressable, StyleSheet, View } from 'react-native';

import { color, radius, space } from '@/components/theme';
import { Heading, Quiet, Stack, Text } from '@/components/ui';
import type { Band, BandKind, CellPage } from '@/lib/contract/cells';

const kindWords: Record<BandKind, string> = {
  depth: 'Depth',
  rate: 'Rate',
  temperature: 'Heat',
  clamping: 'Clamping',
};
const kinds = Object.keys(kindWords) as BandKind[];

interface BandFilterProps {
  page: CellPage;
  onChange: (band: string | undefined) => void;
}

/** One band at a time; those with fewer than five owners are there but can't be chosen. */
export function BandFilter({ page, onChange }: BandFilterProps) {
  return (
    <Stack gap="m">
      <Heading level={2}>Only banks used like this</Heading>
      {kinds.map((kind) => (
        <View key={kind} role="group" aria-label={kindWords[kind]} style={styles.line}>
          <Quiet style={styles.kind}>{kindWords[kind]}</Quiet>
          <View style={styles.choices}>
            {page.bands
              .filter((band) => band.kind === kind)
              .map((band) => (
                <BandChoice
                  key={band.key}
                  band={band}
                  isChosen={band.key === page.band}
                  onPress={() => onChange(band.key === page.band ? undefined : band.key)}
                />
              ))}
          </View>
        </View>
      ))}
      <Quiet>One band at a time. Grey: fewer than 5 owners stand behind it.</Quiet>
    </Stack>
  );
}

interface BandChoiceProps {
  band: Band;
  isChosen: boolean;
  onPress: () => void;
}

function BandChoice({ band, isChosen, onPress }: BandChoiceProps) {
  const isThin = !band.hasEnoughOwners;
  return (
    <Pressable
      role="button"
      aria-pressed={isChosen}
      aria-disabled={isThin}
      aria-label={isThin ? `${band.label}: too few owners yet` : band.label}
      disabled={isThin}
      onPress={onPress}
      style={[styles.choice, isChosen && styles.chosen, isThin && styles.thin]}
    >
      <Text
        size="small"
        tone={isChosen ? 'onTide' : isThin ? 'quiet' : 'ink'}
        weight={isChosen ? 'strong' : 'regular'}
      >
        {band.label}
      </Text>
    </Pressable>
  );
}

const styles = StyleSheet.create({
  line: { gap: space.xs },
  kind: { minWidth: 72 },
  choices: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
  choice: {
    minHeight: 32,
    justifyContent: 'center',
    paddingHorizontal: space.m,
    borderWidth: 1,
    borderColor: color.quiet,
    borderRadius: radius.control,
    backgroundColor: color.surface,
  },
  chosen: { backgroundColor: color.tide, borderColor: color.tide },
  thin: { backgroundColor: 'transparent', borderColor: color.line, borderStyle: 'dashed' },
});
