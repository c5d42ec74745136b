import { StyleSheet, View } from 'react-native';

import { space } from '@/components/theme';
import { Checkbox, Disclosure, SelectField, TextField } from '@/components/ui';

import { type ListView, sortKeys, sortNames } from './listView';

interface ListToolsProps {
  view: ListView;
  onChange: (view: ListView) => void;
  /** On phones they stand behind a word, so that the lives are on the first screen. */
  isFolded: boolean;
}

const forms = [
  { value: 'all', label: 'Every form' },
  { value: 'prismatic', label: 'Prismatic' },
  { value: 'cylindrical', label: 'Cylindrical' },
  { value: 'pouch', label: 'Pouch' },
] as const;

/** Search, order and choice of the list. */
export function ListTools({ view, onChange, isFolded }: ListToolsProps) {
  const fields = (
    <View role="group" aria-label="Find, order, choose" style={styles.tools}>
      <View style={styles.wide}>
        <TextField
          label="Find by name, maker or Ah"
          optional
          value={view.find}
          onChange={(find) => onChange({ ...view, find })}
        />
      </View>
      <View style={styles.field}>
        <SelectField
          label="In order of"
          value={view.sort}
          options={sortKeys.map((key) => ({ value: key, label: sortNames[key] }))}
          onChange={(sort) => onChange({ ...view, sort, turned: undefined })}
        />
      </View>
      <View style={styles.field}>
        <SelectField
          label="Form"
          value={view.form}
          options={forms}
          onChange={(form) => onChange({ ...view, form })}
        />
      </View>
      <View style={styles.field}>
        <Checkbox
          label="Only those with a figure of their own"
          checked={view.own === 'yes'}
          onChange={(isOn) => onChange({ ...view, own: isOn ? 'yes' : undefined })}
        />
      </View>
    </View>
  );
  return isFolded ? <Disclosure label="Find, order, choose">{fields}</Disclosure> : fields;
}

const styles = StyleSheet.create({
  tools: { flexDirection: 'row', flexWrap: 'wrap', gap: space.l, alignItems: 'flex-end' },
  wide: { flexGrow: 2, flexBasis: 240 },
  field: { flexGrow: 1, flexBasis: 190 },
});
