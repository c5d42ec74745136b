import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { type GaugeScale, Quiet } from '@/components/ui';
import type { CellEntry, Use } from '@/lib/contract/cells';

import { cyclesWords, EntryGauge, EntryName, EntryYears, priceWords } from './LifetimeParts';
import { reachWords } from './lifeWords';

interface LifetimeRowProps {
  entry: CellEntry;
  use: Use;
  scale: GaugeScale;
}

/** One cell type of the list on a narrow window: its life on the shared scale, or why it has none yet. */
export function LifetimeRow({ entry, use, scale }: LifetimeRowProps) {
  return (
    <View role="listitem" style={styles.row}>
      <View style={styles.line}>
        <EntryName entry={entry} use={use} />
        <EntryYears entry={entry} />
      </View>
      <EntryGauge entry={entry} scale={scale} />
      {entry.life && (
        <>
          <View style={styles.line}>
            <Quiet style={styles.shrink}>{reachWords(entry.evidence, entry.life)}</Quiet>
            <Quiet align="right">{cyclesWords(entry)}</Quiet>
          </View>
          <Quiet>{priceSentence(entry)}</Quiet>
        </>
      )}
    </View>
  );
}

/** "€0.021 per kWh delivered", or that owners gave too few prices. */
function priceSentence(entry: CellEntry): string {
  const words = priceWords(entry);
  if (words === '–') return 'Price per kWh delivered: not told for this life';
  return /\d/.test(words) ? `${words} per kWh delivered` : `Price per kWh delivered: ${words}`;
}

const styles = StyleSheet.create({
  row: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline', gap: space.m },
  shrink: { flexShrink: 1, minWidth: 0 },
});
