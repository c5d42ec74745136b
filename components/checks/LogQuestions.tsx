import { useState } from 'react';

import { Banner, Button, RadioGroup, Stack } from '@/components/ui';
import { useRemapLog } from '@/lib/client/uploads';
import type { RecognisedLog, Upload } from '@/lib/contract/uploads';
import { timeFormatLabels } from '@/lib/measure';

import { withAnswers } from './logMapping';
import { remapProblem } from './remapProblem';

interface LogQuestionsProps {
  upload: Upload;
  recognised: RecognisedLog;
}

/** A choice in words: a column by its name, a way of writing times by what it means. */
function choiceLabel(field: string, choice: string, { header, sampleRows }: RecognisedLog): string {
  if (field.startsWith('column:')) {
    const index = Number(choice);
    const sample = sampleRows[0]?.[index]?.trim();
    const name = header[index] ?? `Column ${index + 1}`;
    return sample ? `${name}, such as ${sample}` : name;
  }
  if (field === 'dischargeSign')
    return `${choice === 'positive' ? 'Positive' : 'Negative'} while discharging`;
  const format = Object.entries(timeFormatLabels).find(([key]) => key === choice);
  return format && field === 'timeFormat' ? format[1] : choice;
}

/** Asks what the log itself does not tell; nothing is guessed. */
export function LogQuestions({ upload, recognised }: LogQuestionsProps) {
  const { questions, mapping } = recognised;
  const [answers, setAnswers] = useState<Record<string, string>>({});
  const [isTried, setIsTried] = useState(false);
  const remap = useRemapLog(upload.id);
  const isAnswered = questions.every(({ field }) => answers[field] !== undefined);

  return (
    <Banner kind="caution" title={`${upload.filename} leaves something open`}>
      <Stack gap="l">
        {questions.map(({ field, text, choices }) => (
          <RadioGroup
            key={field}
            label={text}
            value={answers[field] ?? ''}
            onChange={(choice) => setAnswers({ ...answers, [field]: choice })}
            options={choices.map((choice) => ({
              value: choice,
              label: choiceLabel(field, choice, recognised),
            }))}
            error={isTried && answers[field] === undefined ? 'Choose one.' : undefined}
          />
        ))}
        {remap.isError && <Banner kind="error">{remapProblem(remap.error)}</Banner>}
        <Button
          label="Read it so"
          busy={remap.isPending}
          onPress={() => {
            setIsTried(true);
            if (isAnswered) remap.mutate(withAnswers(mapping, questions, answers));
          }}
        />
      </Stack>
    </Banner>
  );
}
