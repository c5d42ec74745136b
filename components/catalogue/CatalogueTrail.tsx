import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Link, Quiet, Strong, Text } from '@/components/ui';
import type { CataloguePage } from '@/lib/contract/catalogue';
import { formatInstant } from '@/lib/units';

import { changeWords, trailTitle } from './catalogueWords';

/** What happened to a cell type, the newest first. */
export function CatalogueTrail({ lines }: { lines: CataloguePage['trail'] }) {
  if (lines.length === 0) return <Quiet>Nothing was changed since it was entered.</Quiet>;
  return (
    <View role="list" aria-label="Trail">
      {lines.map((line, index) => (
        <View key={index} role="listitem" style={styles.line}>
          <View style={styles.head}>
            <Strong>{trailTitle(line)}</Strong>
            <Quiet>{formatInstant(line.at)}</Quiet>
          </View>
          {line.otherId && <Link href={`/screening/cell-types/${line.otherId}`}>{line.otherId}</Link>}
          {line.reason !== '' && <Text>{line.reason}</Text>}
          {line.changes.map((change) => (
            <Quiet key={change.field}>{changeWords(change)}</Quiet>
          ))}
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  line: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  head: { flexDirection: 'row', flexWrap: 'wrap', justifyContent: 'space-between', columnGap: space.m },
});
