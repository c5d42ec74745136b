import { useRef, useState } from 'react';
import { StyleSheet, View, type PointerEvent } from 'react-native';

import type { WebKeyEvent } from '../keyEvent';
import { color } from '../theme';
import { xOf, type PlotArea } from './chartScale';
import { secondsAt, stepBy, type TimeWindow, withEdge, type WindowEdge } from './timeWindow';

export interface WindowHandlesProps {
  plot: PlotArea;
  /** Lower end of the handles, px from the drawing's top. */
  bottom: number;
  window: TimeWindow;
  onChange: (window: TimeWindow) => void;
  /** An edge in words: "Counted from 0:25, 53.1 V, 0 A". */
  wordsOf: (edge: WindowEdge, window: TimeWindow) => string;
}

const labels: Record<WindowEdge, string> = { startS: 'Counted from', endS: 'Counted to' };
/** Wide enough for a thumb. */
const gripPx = 44;

/** Two lines over a drawing that bound a part of its time, moved by dragging or by the arrow keys. */
export function WindowHandles(props: WindowHandlesProps) {
  return (
    <>
      <Handle {...props} edge="startS" />
      <Handle {...props} edge="endS" />
    </>
  );
}

function Handle({
  edge,
  plot,
  bottom,
  window: chosen,
  onChange,
  wordsOf,
}: WindowHandlesProps & { edge: WindowEdge }) {
  const [isHeld, setIsHeld] = useState(false);
  const from = useRef<{ x: number; seconds: number } | null>(null);
  const [firstS, lastS] = plot.xDomain;
  const seconds = chosen[edge];

  const hold = (event: PointerEvent) => {
    (event.currentTarget as unknown as HTMLElement).setPointerCapture(event.nativeEvent.pointerId);
    from.current = { x: event.nativeEvent.clientX, seconds };
    setIsHeld(true);
  };
  const drag = (event: PointerEvent) => {
    if (!from.current) return;
    const moved = secondsAt(
      plot,
      xOf(plot, from.current.seconds) + event.nativeEvent.clientX - from.current.x,
    );
    onChange(withEdge(chosen, edge, moved, plot.xDomain));
  };
  const release = () => {
    from.current = null;
    setIsHeld(false);
  };
  const press = (event: WebKeyEvent) => {
    const next = stepBy(event.key, seconds, plot.xDomain);
    if (next === undefined) return;
    event.preventDefault();
    onChange(withEdge(chosen, edge, next, plot.xDomain));
  };

  return (
    <View
      role="slider"
      tabIndex={0}
      aria-label={labels[edge]}
      aria-valuemin={Math.round(firstS)}
      aria-valuemax={Math.round(lastS)}
      aria-valuenow={Math.round(seconds)}
      aria-valuetext={wordsOf(edge, chosen)}
      onKeyDown={press}
      onPointerDown={hold}
      onPointerMove={drag}
      onPointerUp={release}
      onPointerCancel={release}
      style={[
        styles.grip,
        // The grips lie outside of the part, so that both can be taken hold of however short it is.
        {
          left: xOf(plot, seconds) - (edge === 'startS' ? gripPx - 2 : 2),
          top: plot.top,
          height: bottom - plot.top,
        },
        edge === 'startS' ? styles.gripStart : styles.gripEnd,
      ]}
    >
      <View style={[styles.line, isHeld && styles.lineHeld]} />
      <View style={[styles.knob, edge === 'startS' ? styles.knobStart : styles.knobEnd]} />
    </View>
  );
}

const styles = StyleSheet.create({
  grip: { position: 'absolute', width: gripPx, touchAction: 'none', cursor: 'pointer', zIndex: 2 },
  gripStart: { alignItems: 'flex-end' },
  gripEnd: { alignItems: 'flex-start' },
  line: { width: 3, height: '100%', backgroundColor: color.tide },
  lineHeld: { width: 5 },
  knob: {
    position: 'absolute',
    bottom: 0,
    width: 22,
    height: 34,
    borderRadius: 4,
    borderWidth: 2,
    borderColor: color.tide,
    backgroundColor: color.surface,
  },
  knobStart: { right: 0 },
  knobEnd: { left: 0 },
});
