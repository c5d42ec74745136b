import { StyleSheet, View, type DimensionValue } from 'react-native';
import { color, space } from '../theme';
import { positionOn, type GaugeScale } from './gaugeScale';
import { Figure, Quiet, Text } from './Text';

export interface EffectBarProps {
  scale: GaugeScale;
  /** The lever: "Heat". */
  name: string;
  /** What is compared with what: "25 → 35 °C". */
  change: string;
  /** The effect's verdict in its one wording; empty when it is simply shown. */
  verdict?: string;
  /** Ratio of lives with its 90 % range; left out while nothing is measured. */
  ratio?: { estimate: number; low: number; high: number };
  /** The ratio as text, "×0.71". */
  figure?: string;
  /** The range excludes 1: drawn in full colour, otherwise softly. */
  isShown: boolean;
  /** Below the bar: its range, and what stands behind it. */
  note?: string;
  /** The whole row in words. */
  summary: string;
}

const percent = (fraction: number): DimensionValue => `${fraction * 100}%`;

/** How much one lever moves the life, on a scale that all rows share; the tall mark is "no change". */
export function EffectBar(props: EffectBarProps) {
  const { scale, name, change, verdict, ratio, figure, isShown, note, summary } = props;
  const from = ratio ? positionOn(scale, ratio.low) : 0;
  const to = ratio ? positionOn(scale, ratio.high) : 0;
  return (
    <View role="group" aria-label={summary} style={styles.row}>
      <View style={styles.words}>
        <Text weight="strong" size="lead">
          {name}
          <Quiet>{`  ${change}`}</Quiet>
        </Text>
        <View style={styles.reading}>
          {verdict && <Quiet>{verdict}</Quiet>}
          {figure && <Figure>{figure}</Figure>}
        </View>
      </View>
      <View style={styles.bar} aria-hidden>
        <View style={styles.rule} />
        <View style={[styles.none, { left: percent(positionOn(scale, 1)) }]} />
        {ratio && (
          <>
            <View
              style={[
                styles.range,
                !isShown && styles.rangeSoft,
                { left: percent(from), width: percent(to - from) },
              ]}
            />
            <View style={[styles.estimate, { left: percent(positionOn(scale, ratio.estimate)) }]} />
          </>
        )}
      </View>
      {note && <Quiet>{note}</Quiet>}
    </View>
  );
}

const styles = StyleSheet.create({
  row: { borderBottomWidth: 1, borderBottomColor: color.line, paddingTop: space.s, paddingBottom: space.m },
  words: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    justifyContent: 'space-between',
    alignItems: 'baseline',
    columnGap: space.s,
  },
  reading: { flexDirection: 'row', gap: space.s, alignItems: 'baseline', marginLeft: 'auto' },
  bar: { height: 24, justifyContent: 'center' },
  rule: { height: 1, backgroundColor: color.line },
  none: {
    position: 'absolute',
    top: 2,
    height: 20,
    width: 1.5,
    marginLeft: -0.75,
    backgroundColor: color.ink,
  },
  range: { position: 'absolute', top: 8, height: 8, backgroundColor: color.tide },
  rangeSoft: { backgroundColor: color.tideSoft },
  estimate: {
    position: 'absolute',
    top: 4,
    height: 16,
    width: 4,
    marginLeft: -2,
    backgroundColor: color.paper,
    borderWidth: 1,
    borderColor: color.tide,
  },
});
