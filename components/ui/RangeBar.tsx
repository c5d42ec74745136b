import { StyleSheet, View, type DimensionValue } from 'react-native';
import { color } from '../theme';
import { isBeyond, positionOn, type GaugeScale } from './gaugeScale';
import { Quiet, Text } from './Text';

const percent = (fraction: number): DimensionValue => `${fraction * 100}%`;

const spanStyle = (scale: GaugeScale, [from, to]: readonly [number, number]) => {
  const start = positionOn(scale, from);
  return { left: percent(start), width: percent(Math.max(0.004, positionOn(scale, to) - start)) };
};

/** The numbers and title above a list of gauges that share one scale. */
export function ScaleHead({
  scale,
  ticks,
  title,
}: {
  scale: GaugeScale;
  ticks: readonly number[];
  /** Left out where what stands above says it. */
  title?: string;
}) {
  return (
    <View aria-hidden>
      {title && <Quiet align="right">{title}</Quiet>}
      <View style={styles.head}>
        {ticks.map((tick) => (
          <View key={tick} style={[styles.tick, { left: percent(positionOn(scale, tick)) }]}>
            <Text size="small" tone="quiet" style={positionOn(scale, tick) > 0 && styles.tickMiddle}>
              {String(tick)}
            </Text>
          </View>
        ))}
      </View>
    </View>
  );
}

export interface RangeBarProps {
  scale: GaugeScale;
  /** Says the whole gauge in words: estimate, ranges, label, unit. */
  summary: string;
  /** Range of single banks: the thin line. */
  banks?: readonly [number, number];
  /** 90 % interval of the estimate: the thick bar. */
  interval?: readonly [number, number];
  estimate?: number;
  /** What the label says, at the same use: the brass diamond. */
  quoted?: number;
  /** Solid bar for measured and projected; outlined and without a tick for extrapolated, which has a range only. */
  status?: 'measured' | 'projected' | 'extrapolated';
  /** The figure is of a wider whole than the row's own: drawn softly. */
  isOfAll?: boolean;
}

/** A life on the scale its whole list shares. */
export function RangeBar({
  scale,
  summary,
  banks,
  interval,
  estimate,
  quoted,
  status = 'projected',
  isOfAll = false,
}: RangeBarProps) {
  const isExtrapolated = status === 'extrapolated';
  return (
    <View role="img" aria-label={summary} style={styles.bar}>
      <View style={styles.rule} />
      {banks && <View style={[styles.banks, spanStyle(scale, banks)]} />}
      {interval && (
        <View
          style={[
            styles.interval,
            isOfAll && styles.intervalSoft,
            isExtrapolated && styles.intervalOpen,
            spanStyle(scale, interval),
          ]}
        />
      )}
      {estimate !== undefined && !isExtrapolated && (
        <View style={[styles.estimate, { left: percent(positionOn(scale, estimate)) }]} />
      )}
      {quoted !== undefined && (
        <View style={[styles.diamondPlace, { left: percent(positionOn(scale, quoted)) }]}>
          {isBeyond(scale, quoted) ? <View style={styles.beyond} /> : <View style={styles.diamond} />}
        </View>
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  head: { height: 26, borderBottomWidth: 1.5, borderBottomColor: color.ink },
  tick: { position: 'absolute', top: 0, width: 0 },
  tickMiddle: { transform: [{ translateX: '-50%' }], alignSelf: 'flex-start' },
  bar: { height: 32, justifyContent: 'center', minWidth: 0 },
  rule: { height: 1, backgroundColor: color.line },
  banks: { position: 'absolute', height: 2, top: 15, backgroundColor: color.tideSoft },
  interval: { position: 'absolute', height: 10, top: 11, backgroundColor: color.tide },
  intervalSoft: { backgroundColor: color.tideSoft },
  intervalOpen: {
    backgroundColor: 'transparent',
    borderWidth: 1.5,
    borderColor: color.tide,
    borderStyle: 'dotted',
  },
  estimate: {
    position: 'absolute',
    top: 8,
    height: 16,
    width: 4,
    marginLeft: -2,
    backgroundColor: color.paper,
    borderWidth: 1,
    borderColor: color.tide,
  },
  diamondPlace: { position: 'absolute', top: 10, width: 12, height: 12, marginLeft: -6 },
  diamond: {
    width: 11,
    height: 11,
    borderWidth: 2,
    borderColor: color.brass,
    backgroundColor: color.paper,
    transform: [{ rotate: '45deg' }],
  },
  // Half a diamond, pointing on: the label lies beyond the end of the scale.
  beyond: {
    width: 11,
    height: 11,
    borderTopWidth: 2,
    borderRightWidth: 2,
    borderColor: color.brass,
    transform: [{ rotate: '45deg' }],
  },
});
