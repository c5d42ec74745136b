import { useState } from 'react';
import { StyleSheet, View, type PointerEvent } from 'react-native';
import type { WebKeyEvent } from '../keyEvent';
import { color, space, type Color } from '../theme';
import { Quiet } from '../ui';

/** One place along the chart that can be read. */
export interface Reading {
  /** px from the drawing's left. */
  x: number;
  /** Where its marks stand, px from the top. */
  marks: readonly { y: number; tone: Color }[];
  text: string;
}

export interface ReadingLayerProps {
  label: string;
  readings: readonly Reading[];
  width: number;
  height: number;
  /** Upper and lower end of the reading line, px. */
  top: number;
  bottom: number;
}

const nearest = (readings: readonly Reading[], x: number): number =>
  readings.reduce(
    (best, reading, index) =>
      Math.abs(reading.x - x) < Math.abs((readings[best]?.x ?? 0) - x) ? index : best,
    0,
  );

const keyStep = (key: string, last: number): ((index: number) => number) | undefined => {
  const page = Math.max(1, Math.round(last / 10));
  const steps: Record<string, (index: number) => number> = {
    ArrowRight: (index) => index + 1,
    ArrowUp: (index) => index + 1,
    ArrowLeft: (index) => index - 1,
    ArrowDown: (index) => index - 1,
    PageUp: (index) => index + page,
    PageDown: (index) => index - page,
    Home: () => 0,
    End: () => last,
  };
  return steps[key];
};

/** Lies over a drawing: pointing, touching or the arrow keys move a line along it, whose reading stands below. */
export function ReadingLayer({ label, readings, width, height, top, bottom }: ReadingLayerProps) {
  const [index, setIndex] = useState<number | null>(null);
  const last = readings.length - 1;
  if (last < 0) return <View style={styles.line} />;
  const shown = index === null ? undefined : readings[Math.min(index, last)];

  const point = (event: PointerEvent) => setIndex(nearest(readings, event.nativeEvent.offsetX));
  const press = (event: WebKeyEvent) => {
    if (event.key === 'Escape') setIndex(null);
    const step = keyStep(event.key, last);
    if (!step) return;
    event.preventDefault();
    setIndex(Math.min(last, Math.max(0, step(index ?? 0))));
  };

  return (
    <>
      <View
        role="slider"
        tabIndex={0}
        aria-label={`Readings: ${label}`}
        aria-valuemin={0}
        aria-valuemax={last}
        aria-valuenow={index ?? 0}
        aria-valuetext={(shown ?? readings[0])?.text}
        onKeyDown={press}
        onFocus={() => setIndex((current) => current ?? 0)}
        onBlur={() => setIndex(null)}
        onPointerMove={point}
        onPointerDown={point}
        onMouseLeave={() => setIndex(null)}
        style={[styles.layer, { width, height }]}
      >
        {shown && (
          <View style={styles.marks}>
            <View style={[styles.rule, { left: shown.x, top, height: bottom - top }]} />
            {shown.marks.map(({ y, tone }) => (
              <View
                key={y}
                style={[styles.mark, { left: shown.x - 5, top: y - 5, borderColor: color[tone] }]}
              />
            ))}
          </View>
        )}
      </View>
      <View style={styles.line} dataSet={{ screenOnly: '' }}>
        <Quiet tone={shown ? 'ink' : 'quiet'} aria-hidden>
          {shown?.text ?? 'Point at the chart, touch it or use the arrow keys to read it.'}
        </Quiet>
      </View>
    </>
  );
}

const styles = StyleSheet.create({
  layer: { position: 'absolute', left: 0, top: 0, touchAction: 'pan-y', cursor: 'pointer' },
  marks: { position: 'absolute', left: 0, top: 0, right: 0, bottom: 0, pointerEvents: 'none' },
  rule: { position: 'absolute', width: 1, backgroundColor: color.ink, opacity: 0.5 },
  mark: {
    position: 'absolute',
    width: 10,
    height: 10,
    borderRadius: 5,
    borderWidth: 2,
    backgroundColor: color.surface,
  },
  // Room for two lines on phones, so that nothing jumps when a reading appears.
  line: { minHeight: 40, justifyContent: 'flex-start', paddingTop: space.xs },
});
