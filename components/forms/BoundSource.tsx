import { Pressable, StyleSheet, View } from 'react-native';
import type { FieldValues } from 'react-hook-form';
import type { FieldSource } from '@/lib/contract/fields';
import { color, radius, space } from '../theme';
import { Quiet, Text } from '../ui';
import { useRovingFocus } from '../ui/useRovingFocus';
import { useBound, type Bound } from './binding';

const sources: readonly { value: FieldSource; label: string }[] = [
  { value: 'metered', label: 'metered' },
  { value: 'readOff', label: 'read off the BMS' },
  { value: 'estimated', label: 'estimated' },
];

export interface BoundSourceProps {
  /** The field it is about, as that one's label says it. */
  of: string;
}

/** How the value above came to be known; stands as the footer of its field. */
export function BoundSource<Form extends FieldValues, Read>({
  control,
  name,
  of,
}: Bound<Form, FieldSource | undefined | '', Read> & BoundSourceProps) {
  const { value, onChange, error } = useBound(control, name);
  const index = sources.findIndex((source) => source.value === value);
  const roving = useRovingFocus(sources.length, index, (next) => onChange(sources[next]?.value));
  return (
    <View>
      <View role="radiogroup" aria-label={`How ${of} is known`} style={styles.row}>
        {sources.map((source, position) => {
          const isChosen = position === index;
          return (
            <Pressable
              key={source.value}
              {...roving(position)}
              role="radio"
              aria-checked={isChosen}
              onPress={() => onChange(source.value)}
              style={[styles.choice, isChosen && styles.chosen]}
            >
              <Text size="small" tone={isChosen ? 'tide' : 'quiet'} weight={isChosen ? 'strong' : 'regular'}>
                {source.label}
              </Text>
            </Pressable>
          );
        })}
      </View>
      {error && <Quiet tone="rust">{error}</Quiet>}
    </View>
  );
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
  choice: {
    minHeight: 32,
    justifyContent: 'center',
    paddingHorizontal: space.s,
    borderWidth: 1,
    borderColor: color.line,
    borderRadius: radius.small,
  },
  chosen: { borderColor: color.tide, backgroundColor: color.tideWash },
});
