import { useEffect, useRef, useState } from 'react';
import { View } from 'react-native';

import { Banner, Button, Figure, Quiet, Row, Stack } from '@/components/ui';
import { keepFile } from '@/lib/client/http';
import { calendarFile } from '@/lib/units/calendarFile';
import { formatDuration } from '@/lib/units';

import { ring } from './ring';

interface StageTimerProps {
  /** Instant at which the stage began. */
  startedAt: string;
  /** Seconds after it at which it rings. */
  ringsAfterS: number;
  /** What is timed: "Rest", "Discharge". */
  label: string;
  /** Said, and written into the calendar, when it rings. */
  due: { title: string; text: string };
  /** Stays the same for the same stage of the same bank. */
  uid: string;
}

const tickMs = 1000;

/** Time since an instant, on the device's own clock: right after a locked phone or a reload, as nothing is counted down. */
export function StageTimer({ startedAt, ringsAfterS, label, due, uid }: StageTimerProps) {
  const nowMs = useNow();
  const startMs = Date.parse(startedAt);
  const elapsedS = Math.max(0, (nowMs - startMs) / 1000);
  const leftS = ringsAfterS - elapsedS;
  const ringsAt = new Date(startMs + ringsAfterS * 1000);
  const isDue = leftS <= 0;
  useRing(isDue);
  const saveAlarm = () => {
    const at = { start: ringsAt, minutes: 5, alarmMinutesBefore: 0 };
    const entry = { uid, title: due.title, description: due.text, url: window.location.href, at };
    keepFile(new Blob([calendarFile(entry, new Date())], { type: 'text/calendar' }), `${uid}.ics`);
  };
  return (
    <Stack gap="s">
      <View role="timer" aria-label={`${label}: ${formatDuration(elapsedS)}`}>
        <Figure size="readout" strong>
          {clockText(elapsedS)}
        </Figure>
        <Quiet>
          {`${label} since ${timeOfDay(new Date(startMs))}${isDue ? '' : `; rings at ${timeOfDay(ringsAt)}, in ${formatDuration(Math.ceil(leftS / 60) * 60)}`}.`}
        </Quiet>
      </View>
      {isDue ? (
        <Banner kind="caution" title={due.title}>
          {due.text}
        </Banner>
      ) : (
        <>
          <Row>
            <Button label="Alarm into the calendar" onPress={saveAlarm} />
          </Row>
          <Quiet>
            This page rings while it is open and the device awake. The calendar&apos;s alarm rings where it
            can&apos;t.
          </Quiet>
        </>
      )}
    </Stack>
  );
}

function useNow(): number {
  const [nowMs, setNowMs] = useState(Date.now);
  useEffect(() => {
    const tick = () => setNowMs(Date.now());
    const timer = setInterval(tick, tickMs);
    // Timers sleep with the device: the time is right at the first look.
    document.addEventListener('visibilitychange', tick);
    return () => {
      clearInterval(timer);
      document.removeEventListener('visibilitychange', tick);
    };
  }, []);
  return nowMs;
}

/** Rings when the time comes, not when the page is opened after it. */
function useRing(isDue: boolean) {
  const wasDue = useRef(isDue);
  useEffect(() => {
    if (isDue && !wasDue.current) ring();
    wasDue.current = isDue;
  }, [isDue]);
}

const pair = (value: number) => String(Math.floor(value)).padStart(2, '0');
const clockText = (seconds: number) =>
  `${Math.floor(seconds / 3600)}:${pair((seconds % 3600) / 60)}:${pair(seconds % 60)}`;

/** On the reader's own clock. */
const timeOfDay = (instant: Date) => `${pair(instant.getHours())}:${pair(instant.getMinutes())}`;
