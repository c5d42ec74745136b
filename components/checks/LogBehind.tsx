import { useQuery } from '@tanstack/react-query';

import { LogChart } from '@/components/charts';
import { QueryView } from '@/components/QueryView';
import { LoadingState, Quiet, Skeleton, Stack } from '@/components/ui';
import { uploadQuery } from '@/lib/client/uploads';

import { LogComputed, LogWarnings } from './LogResultView';
import { LogFigures } from './LogFigures';

/** The log a check stands on, as it was read. */
export function LogBehind({ uploadId, ratedAh }: { uploadId: string; ratedAh: number }) {
  const query = useQuery(uploadQuery(uploadId));
  return (
    <QueryView
      query={query}
      loading={
        <LoadingState label="Loading the log">
          <Skeleton height={460} />
        </LoadingState>
      }
    >
      {({ result, filename }) =>
        result ? (
          <Stack gap="m">
            <LogChart
              title="The log behind it"
              series={result.series}
              window={{ startS: result.windowStartS, endS: result.windowEndS }}
              computed={<LogComputed />}
            />
            <LogFigures result={result} ratedAh={ratedAh} />
            {result.warnings.length > 0 && <LogWarnings warnings={result.warnings} />}
          </Stack>
        ) : (
          <Quiet>{`${filename} is not read at the moment.`}</Quiet>
        )
      }
    </QueryView>
  );
}
