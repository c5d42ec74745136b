import { StyleSheet } from 'react-native';

import { space } from '@/components/theme';

/** Columns of the list on a wide screen; the scale above stands over the gauges. */
export const listColumns = StyleSheet.create({
  name: { width: 270, flexShrink: 0 },
  gauge: { flex: 1, minWidth: 0 },
  value: { width: 150, flexShrink: 0, alignItems: 'flex-end' },
  head: { flexDirection: 'row', gap: space.xl, alignItems: 'flex-end' },
});
