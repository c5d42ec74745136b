import { useMemo } from 'react';
import { useWatch } from 'react-hook-form';
import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Banner, Button, DefinitionList, Heading, Quiet } from '@/components/ui';

import { type BankFacts, factGroups } from './bankFacts';
import type { BankFieldsProps } from './bankFormTypes';
import { bankStepOf, bankSteps } from './bankSteps';
import { bankFormSchema, type BankFormValues } from './bankValues';

interface BankLookOverProps extends BankFieldsProps {
  /** Goes back to a step. */
  onChange: (step: number) => void;
}

/** Everything that was entered, by step, with the way back to each. */
export function BankLookOver({ form: { control }, cellTypes, onChange }: BankLookOverProps) {
  const values = useWatch({ control }) as BankFormValues;
  const read = useMemo(() => bankFormSchema.safeParse(values), [values]);
  const cellType = cellTypes.find(({ id }) => id === values.cellTypeId);
  if (!read.success || !cellType) {
    const paths = read.success ? ['cellTypeId'] : read.error.issues.map(({ path }) => path.join('.'));
    const step = bankStepOf(paths);
    return (
      <Banner
        kind="caution"
        title="Something is still missing"
        actions={<Button label="Go there" onPress={() => onChange(step)} />}
      >
        {`Look at "${bankSteps[step]?.title ?? ''}" again.`}
      </Banner>
    );
  }
  const bank: BankFacts = { ...read.data, cellType };
  return (
    <View>
      {factGroups.map((factsOf, step) => {
        const { title } = bankSteps[step] ?? { title: '' };
        const items = factsOf(bank);
        return (
          <View key={step} style={styles.part}>
            <View style={styles.line}>
              <Heading>{title}</Heading>
              <Button
                kind="quiet"
                label="Change"
                description={`Change: ${title}`}
                onPress={() => onChange(step)}
              />
            </View>
            {items.length > 0 ? <DefinitionList items={items} /> : <Quiet>Nothing said.</Quiet>}
          </View>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  part: { paddingVertical: space.m, gap: space.s, borderBottomWidth: 1, borderBottomColor: color.line },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'center', gap: space.m },
});
