import { useState } from 'react';
import { View } from 'react-native';

import { LogChart } from '@/components/charts';
import { Banner, Button, Quiet, Row, Stack, Text } from '@/components/ui';
import type { LogResult, RecognisedLog, Upload } from '@/lib/contract/uploads';
import { formatCount } from '@/lib/units';

import { LogColumns } from './LogColumns';
import { LogFigures } from './LogFigures';
import { LogWindow } from './LogWindow';

interface LogResultViewProps {
  upload: Upload;
  recognised: RecognisedLog;
  result: LogResult;
  ratedAh: number;
  /** Name and size, in words. */
  file: string;
  isFilled: boolean;
  onUse: () => void;
}

/** A log that was read: its curve with the counted part, its figures, what was noticed, and taking them over. */
export function LogResultView({
  upload,
  recognised,
  result,
  ratedAh,
  file,
  isFilled,
  onUse,
}: LogResultViewProps) {
  const { warnings, rowsRead, rowsSkipped } = result;
  const counted = { startS: result.windowStartS, endS: result.windowEndS };
  const [chosen, setChosen] = useState(counted);
  return (
    <Stack gap="m">
      <Quiet>
        {`${file}: ${formatCount(rowsRead)} rows read${rowsSkipped > 0 ? `, ${formatCount(rowsSkipped)} left out` : ''}.`}
      </Quiet>
      <LogChart
        title="The discharge in the log"
        series={result.series}
        window={chosen}
        onWindow={setChosen}
        computed={<LogComputed />}
      />
      <LogWindow
        upload={upload}
        recognised={recognised}
        result={result}
        chosen={chosen}
        onChoose={setChosen}
      />
      <LogFigures result={result} ratedAh={ratedAh} />
      {warnings.length > 0 && <LogWarnings warnings={warnings} />}
      {isFilled ? (
        <Banner kind="done" title="These figures are in the form">
          The day and the readings are filled in from the log. The next steps show them.
        </Banner>
      ) : (
        <Row>
          <Button kind="primary" label="Use these figures" onPress={onUse} />
        </Row>
      )}
      <View>
        <LogColumns upload={upload} recognised={recognised} />
      </View>
    </Stack>
  );
}

/** What was noticed while reading, in words. */
export function LogWarnings({ warnings }: Pick<LogResult, 'warnings'>) {
  return (
    <Banner kind="caution" title="Noticed in the log">
      <View role="list">
        {warnings.map(({ code, text, atRow }) => (
          <View key={`${code} ${text}`} role="listitem">
            <Text>{atRow === undefined ? text : `${text} First at line ${formatCount(atRow)}.`}</Text>
          </View>
        ))}
      </View>
    </Banner>
  );
}

export function LogComputed() {
  return (
    <Text>
      Charge is the integral of the current over the true time stamps by the trapezoid rule, energy that of
      voltage times current, both over the counted part. The counted part is the run under load with most
      charge; runs with a pause but no charging between them are joined, and that is said. The mean current is
      over the time under load, the pauses left out.
    </Text>
  );
}
