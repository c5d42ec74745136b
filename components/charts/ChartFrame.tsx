import { useState, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, space, useLayout } from '../theme';
import { Button, Heading, VisuallyHidden } from '../ui';
import { ChartSkeleton } from './ChartSkeleton';

export interface ChartFrameProps {
  title: string;
  /** Shows the title; else it is for screen readers only. */
  hasHeading?: boolean;
  /** The chart in words, for screen readers. */
  summary: string;
  height: number;
  /** What the chart can be switched between. */
  controls?: ReactNode;
  /** The same figures as a table; built when asked for. */
  table: () => ReactNode;
  /** How this was computed. */
  computed?: ReactNode;
  /** Draws at the width the frame was given, px. */
  children: (width: number) => ReactNode;
}

type Opened = 'none' | 'table' | 'computed';

/** What all charts share: title, controls, the drawing at its width, its table and how it was computed. */
export function ChartFrame({
  title,
  hasHeading = false,
  summary,
  height,
  controls,
  table,
  computed,
  children,
}: ChartFrameProps) {
  const [width, setWidth] = useState(0);
  const [opened, setOpened] = useState<Opened>('none');
  const { isPhone } = useLayout();
  const toggle = (which: Opened) => setOpened(opened === which ? 'none' : which);

  return (
    <View role="figure" aria-label={title} style={[styles.frame, isPhone && styles.framePhone]}>
      {(hasHeading || controls) && (
        <View style={styles.head}>
          {hasHeading && <Heading size="lead">{title}</Heading>}
          {controls}
        </View>
      )}
      <VisuallyHidden>{summary}</VisuallyHidden>
      <View
        style={{ minHeight: height }}
        onLayout={(event) => setWidth(Math.floor(event.nativeEvent.layout.width))}
      >
        {width > 0 ? children(width) : <ChartSkeleton height={height} />}
      </View>
      <View style={styles.foot} dataSet={{ screenOnly: '' }}>
        <Button
          kind="quiet"
          label={opened === 'table' ? 'Hide the table' : 'Show as table'}
          description={`${opened === 'table' ? 'Hide the table' : 'Show as table'}: ${title}`}
          expanded={opened === 'table'}
          onPress={() => toggle('table')}
        />
        {computed && (
          <Button
            kind="quiet"
            label="How this was computed"
            expanded={opened === 'computed'}
            onPress={() => toggle('computed')}
          />
        )}
      </View>
      {opened !== 'none' && <View style={styles.opened}>{opened === 'table' ? table() : computed}</View>}
    </View>
  );
}

const styles = StyleSheet.create({
  frame: {
    backgroundColor: color.surface,
    borderWidth: 1,
    borderColor: color.line,
    padding: space.l,
    gap: space.s,
    minWidth: 0,
  },
  framePhone: { padding: space.m, marginHorizontal: -space.s },
  head: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    alignItems: 'center',
    justifyContent: 'space-between',
    gap: space.m,
  },
  foot: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    justifyContent: 'space-between',
    marginHorizontal: -space.s,
  },
  opened: { paddingTop: space.m, borderTopWidth: 1, borderTopColor: color.line, gap: space.m },
});
