import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { useFormState, useWatch } from 'react-hook-form';
import type { Text as NativeText } from 'react-native';

import { QueryView } from '@/components/QueryView';
import { Banner, Button, LoadingState, Progress, Skeleton, Stack, Text } from '@/components/ui';
import { isBeingRead, uploadQuery } from '@/lib/client/uploads';
import type { Upload } from '@/lib/contract/uploads';

import { fileSize } from './fileSize';
import type { StepProps } from './formTypes';
import { LogColumns } from './LogColumns';
import { LogDrop } from './LogDrop';
import { LogQuestions } from './LogQuestions';
import { LogResultView } from './LogResultView';
import { useLogFigures } from './useLogFigures';

/** A log on its way: sent, read, asked about where it does not tell, and its figures taken over. */
export function LogPart({ form, bank }: StepProps) {
  const { control, setValue } = form;
  const uploadId = useWatch({ control, name: 'uploadId' });
  const { errors } = useFormState({ control, name: 'uploadId' });
  const keep = (id: string) => setValue('uploadId', id, { shouldDirty: true, shouldValidate: id !== '' });
  return (
    <Stack gap="m">
      {uploadId === '' ? (
        <LogDrop bankId={bank.id} onStored={keep} />
      ) : (
        <StoredLog key={uploadId} uploadId={uploadId} form={form} bank={bank} onDrop={() => keep('')} />
      )}
      {errors.uploadId && <LogProblem>{errors.uploadId.message ?? ''}</LogProblem>}
    </Stack>
  );
}

/** What holds up the step, brought into view: its cause lies above the fields that were just filled in. */
function LogProblem({ children }: { children: string }) {
  const place = useRef<NativeText>(null);
  useEffect(() => {
    const node: unknown = place.current;
    if (typeof HTMLElement !== 'undefined' && node instanceof HTMLElement)
      node.scrollIntoView({ block: 'center' });
  }, [children]);
  return (
    <Text ref={place} tone="rust" role="alert">
      {children}
    </Text>
  );
}

interface StoredLogProps extends StepProps {
  uploadId: string;
  onDrop: () => void;
}

function StoredLog({ uploadId, form, bank, onDrop }: StoredLogProps) {
  const query = useQuery(uploadQuery(uploadId));
  const { isFilled, fill } = useLogFigures(form);
  return (
    <Stack gap="m">
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading the log">
            <Skeleton height={320} />
          </LoadingState>
        }
      >
        {(upload) => (
          <LogState upload={upload} ratedAh={bank.ratedAh} isFilled={isFilled} onUse={() => fill(upload)} />
        )}
      </QueryView>
      <Button kind="quiet" label="Use another file" onPress={onDrop} />
    </Stack>
  );
}

interface LogStateProps {
  upload: Upload;
  ratedAh: number;
  isFilled: boolean;
  onUse: () => void;
}

function LogState({ upload, ...rest }: LogStateProps) {
  const { filename, bytes, recognised, result, problem, progressFraction } = upload;
  const file = `${filename}, ${fileSize(bytes)}`;
  if (isBeingRead(upload))
    return (
      <Progress
        label={`Reading ${file}`}
        fraction={progressFraction > 0 ? progressFraction : undefined}
        detail="You can go on below while it is read."
      />
    );
  if (upload.state === 'unclear' && recognised)
    return (
      <Stack gap="m">
        <LogQuestions
          key={recognised.questions.map(({ field }) => field).join()}
          upload={upload}
          recognised={recognised}
        />
        <LogColumns upload={upload} recognised={recognised} />
      </Stack>
    );
  if (upload.state === 'ready' && recognised && result)
    return <LogResultView {...rest} upload={upload} recognised={recognised} result={result} file={file} />;
  return (
    <Stack gap="m">
      <Banner kind="error" title={`No result from ${filename}`}>
        {problem ?? 'This log could not be read. Choose another file, or type the figures.'}
      </Banner>
      {recognised && <LogColumns upload={upload} recognised={recognised} isOpen />}
    </Stack>
  );
}
