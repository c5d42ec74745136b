import { useState } from 'react';

import { BinChart } from '@/components/charts';
import { Heading, SelectField, Stack, Text } from '@/components/ui';
import {
  type PublishedFitReport,
  type ResidualCondition,
  residualConditionSchema,
} from '@/lib/contract/fits';

import { pointOf, residualFinding, residualWords } from './fitWords';

const choices = residualConditionSchema.options.map((value) => ({
  value,
  label: residualWords[value].label,
}));

/** What is left over, against each condition and time: a slope here would be something the model has missed. */
export function ResidualPart({ fit }: { fit: PublishedFitReport }) {
  const [condition, setCondition] = useState<ResidualCondition>('ageYears');
  const words = residualWords[condition];
  const bins = fit.residuals.find((one) => one.condition === condition)?.bins ?? [];
  return (
    <Stack gap="m">
      <Heading>What is left over</Heading>
      <Text>
        Measured less predicted, in classes of one condition at a time. Medians near 0 all along say that the
        model has the shape right; a slope would be something it has missed. A class is shown once at least 5
        owners stand in it, and it moves by at least 5 owners at a time.
      </Text>
      <BinChart
        title={`Left over against ${words.label.toLowerCase()}`}
        series={[{ label: 'checks', mark: 'circle', points: bins.map(pointOf) }]}
        xName={words.xName}
        unitX={words.unitX}
        formatX={words.format}
        yTitle="measured less predicted, %: median and middle 80 %"
        yTitleShort="measured less predicted, %"
        reference={0}
        finding={residualFinding(bins, words)}
        controls={<SelectField label="Against" value={condition} options={choices} onChange={setCondition} />}
      />
    </Stack>
  );
}
