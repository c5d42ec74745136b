import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Button, type Definition, DefinitionList, Figure, Heading, Quiet } from '@/components/ui';
import type { CheckFields } from '@/lib/contract/checks';

import { checkSteps } from './checkSteps';
import { conditionItems, endItems, type EnteredItem, meterItems, testItems } from './enteredItems';
import { PhotoView } from './PhotoView';

type Entered = Pick<CheckFields, 'reading' | 'conditions' | 'sources' | 'photoId'>;

const meterStep = 2;

const parts = [
  { step: 1, items: testItems },
  { step: meterStep, items: meterItems },
  { step: 3, items: endItems },
  { step: 4, items: conditionItems },
] as const;

const definition = ({ label, value, isWords, source }: EnteredItem): Definition => ({
  label,
  value: (
    <>
      {isWords ? value : <Figure>{value}</Figure>}
      {source !== undefined && <Quiet>{`  ${source}`}</Quiet>}
    </>
  ),
});

interface EnteredOverviewProps {
  entered: Entered;
  /** Goes back to a step; without it the figures are only shown. */
  onChange?: (step: number) => void;
}

/** Everything that was entered, by step, with the way back to each. */
export function EnteredOverview({ entered, onChange }: EnteredOverviewProps) {
  return (
    <View>
      {parts.map(({ step, items }) => {
        const { title } = checkSteps[step] ?? { title: '' };
        const heading = step === 1 ? 'The day and the meter' : title;
        return (
          <View key={step} style={styles.part}>
            <View style={styles.line}>
              <Heading level={3}>{heading}</Heading>
              {onChange && (
                <Button
                  kind="quiet"
                  label="Change"
                  description={`Change: ${heading}`}
                  onPress={() => onChange(step)}
                />
              )}
            </View>
            <DefinitionList items={items(entered).map(definition)} columns={2} />
            {step === meterStep && entered.photoId !== null && <PhotoView photoId={entered.photoId} />}
          </View>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  part: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.s },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'center', minHeight: 44 },
});
