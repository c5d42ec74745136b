import { useState } from 'react';

import { FieldPair } from '@/components/forms';
import { Banner, Button, Disclosure, Quiet, Row, Stack, TextField } from '@/components/ui';
import { useRemapLog } from '@/lib/client/uploads';
import type { LogResult, RecognisedLog, Upload } from '@/lib/contract/uploads';
import { clockOfDuration, formatDuration, parseDuration } from '@/lib/units';

import { remapProblem } from './remapProblem';

interface LogWindowProps {
  upload: Upload;
  recognised: RecognisedLog;
  result: LogResult;
}

const howToType = 'Type hours and minutes, such as 0:25 or 0:25:30, or seconds.';

/** Counts another part of the log than the discharge that was found, by typing where it starts and ends. */
export function LogWindow({ upload, recognised, result }: LogWindowProps) {
  const { mapping } = recognised;
  const [start, setStart] = useState(clockOfDuration(result.windowStartS));
  const [end, setEnd] = useState(clockOfDuration(result.windowEndS));
  const [isTried, setIsTried] = useState(false);
  const remap = useRemapLog(upload.id);
  const [startS, endS] = [start, end].map((text) => parseDuration(text, { plainUnit: 's' }));
  const lastS = result.series.timeS.at(-1) ?? result.windowEndS;

  const startError = startS === undefined ? howToType : undefined;
  const endError =
    endS === undefined
      ? howToType
      : startS !== undefined && endS <= startS
        ? 'The end must lie after the start.'
        : endS > lastS + 60
          ? `The log ends after ${formatDuration(lastS)}.`
          : undefined;

  const count = () => {
    setIsTried(true);
    if (startError || endError || startS === undefined || endS === undefined) return;
    remap.mutate({ ...mapping, window: { startS, endS } });
  };

  return (
    <Disclosure label="Count another part of it" startsOpen={mapping.window !== null}>
      <Stack gap="m">
        <Quiet>
          {mapping.window === null
            ? 'The discharge was found in the log. Times are since its first stamp.'
            : 'You have set this part. Times are since the first stamp.'}
        </Quiet>
        <FieldPair>
          <TextField
            label="Counted from"
            value={start}
            onChange={setStart}
            onSubmit={count}
            unit="h:min"
            figures
            error={isTried ? startError : undefined}
          />
          <TextField
            label="to"
            value={end}
            onChange={setEnd}
            onSubmit={count}
            unit="h:min"
            figures
            error={isTried ? endError : undefined}
          />
        </FieldPair>
        {remap.isError && <Banner kind="error">{remapProblem(remap.error)}</Banner>}
        <Row>
          <Button label="Count this part" onPress={count} busy={remap.isPending} />
          {mapping.window !== null && (
            <Button
              kind="quiet"
              label="Find the discharge again"
              onPress={() => remap.mutate({ ...mapping, window: null })}
            />
          )}
        </Row>
      </Stack>
    </Disclosure>
  );
}
