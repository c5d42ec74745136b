import { useWatch } from 'react-hook-form';

import { Banner, Button } from '@/components/ui';
import type { Check } from '@/lib/contract/checks';
import { formatDate } from '@/lib/units';

import { hasConditions, lastAnswers } from './checkValues';
import type { CheckFormHandle } from './formTypes';
import { previousCheck } from './previousCheck';

interface LastAnswersProps {
  form: CheckFormHandle;
  checks: Check[];
}

/** Offers the conditions of the check before as a start, while nothing is filled in; the counter is read anew. */
export function LastAnswers({ form: { control, setValue, getValues }, checks }: LastAnswersProps) {
  const [conditions, testedOn] = useWatch({ control, name: ['conditions', 'reading.testedOn'] });
  const previous = previousCheck(checks, testedOn);
  if (!previous || hasConditions(conditions)) return null;
  const fill = () => {
    const { conditions: filled, sources } = lastAnswers(previous);
    setValue('conditions', filled, { shouldDirty: true });
    setValue('sources', { ...getValues('sources'), ...sources }, { shouldDirty: true });
  };
  return (
    <Banner
      kind="info"
      title={`Much the same as up to ${formatDate(previous.reading.testedOn)}?`}
      actions={<Button label="Start with those answers" onPress={fill} />}
    >
      What you said then of how the bank was used comes into the fields, for you to change. The counter and
      the days it stood idle stay empty.
    </Banner>
  );
}
