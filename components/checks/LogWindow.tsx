import { useState } from 'react';

import { FieldPair } from '@/components/forms';
import { Banner, Button, Disclosure, Quiet, Row, Stack, Text, TextField } from '@/components/ui';
import { useRemapLog } from '@/lib/client/uploads';
import type { LogResult, RecognisedLog, Upload } from '@/lib/contract/uploads';
import { clockOfDuration, formatDuration, parseDuration } from '@/lib/units';

import { remapProblem } from './remapProblem';

interface ChosenWindow {
  startS: number;
  endS: number;
}

interface LogWindowProps {
  upload: Upload;
  recognised: RecognisedLog;
  result: LogResult;
  /** The part as it is chosen on the curve, or typed here. */
  chosen: ChosenWindow;
  onChoose: (window: ChosenWindow) => void;
}

/** Counts another part of the log than the discharge that was found: chosen on the curve, or typed. */
export function LogWindow({ upload, recognised: { mapping }, result, chosen, onChoose }: LogWindowProps) {
  const remap = useRemapLog(upload.id);
  const counted = { startS: result.windowStartS, endS: result.windowEndS };
  const isMoved =
    Math.round(chosen.startS) !== Math.round(counted.startS) ||
    Math.round(chosen.endS) !== Math.round(counted.endS);
  const count = (window: ChosenWindow | null) => remap.mutate({ ...mapping, window });
  return (
    <Stack gap="s">
      {isMoved ? (
        <Stack gap="s">
          <Text aria-live="polite">{`Chosen: ${spanWords(chosen)}. The figures below are still of ${spanWords(counted)}.`}</Text>
          <Row>
            <Button
              kind="primary"
              label="Count the chosen part"
              busy={remap.isPending}
              onPress={() => count(chosen)}
            />
            <Button kind="quiet" label="Leave it as it was" onPress={() => onChoose(counted)} />
          </Row>
        </Stack>
      ) : (
        <Quiet>
          {`${mapping.window === null ? 'The discharge was found in the log' : 'You chose this part'}: ${spanWords(counted)}. Drag the two handles on the curve, move them with the arrow keys, or type the times below.`}
        </Quiet>
      )}
      {remap.isError && <Banner kind="error">{remapProblem(remap.error)}</Banner>}
      {mapping.window !== null && (
        <Row>
          <Button kind="quiet" label="Find the discharge again" onPress={() => count(null)} />
        </Row>
      )}
      <Disclosure label="Type the times">
        <TypedWindow
          key={`${chosen.startS}-${chosen.endS}`}
          chosen={chosen}
          lastS={result.series.timeS.at(-1) ?? result.windowEndS}
          onChoose={onChoose}
        />
      </Disclosure>
    </Stack>
  );
}

const spanWords = ({ startS, endS }: ChosenWindow) =>
  `${clockOfDuration(startS)} to ${clockOfDuration(endS)} (${formatDuration(endS - startS)})`;

const howToType = 'Type hours and minutes, such as 0:25 or 0:25:30, or seconds.';

interface TypedWindowProps {
  chosen: ChosenWindow;
  lastS: number;
  onChoose: (window: ChosenWindow) => void;
}

function TypedWindow({ chosen, lastS, onChoose }: TypedWindowProps) {
  const [start, setStart] = useState(clockOfDuration(chosen.startS));
  const [end, setEnd] = useState(clockOfDuration(chosen.endS));
  const [isTried, setIsTried] = useState(false);
  const [startS, endS] = [start, end].map((text) => parseDuration(text, { plainUnit: 's' }));
  const startError = startS === undefined ? howToType : undefined;
  const endError = endErrorOf(startS, endS, lastS);
  const choose = () => {
    setIsTried(true);
    if (startError || endError || startS === undefined || endS === undefined) return;
    onChoose({ startS, endS: Math.min(endS, lastS) });
  };
  return (
    <Stack gap="m">
      <Quiet>Times are since the first stamp of the log.</Quiet>
      <FieldPair>
        <TextField
          label="Counted from"
          value={start}
          onChange={setStart}
          onSubmit={choose}
          unit="h:min"
          figures
          error={isTried ? startError : undefined}
        />
        <TextField
          label="to"
          value={end}
          onChange={setEnd}
          onSubmit={choose}
          unit="h:min"
          figures
          error={isTried ? endError : undefined}
        />
      </FieldPair>
      <Row>
        <Button label="Choose this part" onPress={choose} />
      </Row>
    </Stack>
  );
}

/** A minute past the end is taken for the end: times are typed in minutes. */
function endErrorOf(startS: number | undefined, endS: number | undefined, lastS: number): string | undefined {
  if (endS === undefined) return howToType;
  if (startS !== undefined && endS <= startS) return 'The end must lie after the start.';
  return endS > lastS + 60 ? `The log ends after ${formatDuration(lastS)}.` : undefined;
}
