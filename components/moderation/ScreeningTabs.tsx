import { Link as RouterLink, usePathname } from 'expo-router';
import { StyleSheet, View } from 'react-native';

import { color, space, target } from '@/components/theme';
import { Text } from '@/components/ui';

const tabs = [
  { href: '/screening', label: 'Queue' },
  { href: '/screening/cell-types', label: 'Cell types' },
  { href: '/screening/agreement', label: 'Agreement' },
] as const;

/** The parts of the screening, under its title. */
export function ScreeningTabs() {
  const pathname = usePathname();
  return (
    <View role="navigation" aria-label="Screening" style={styles.row}>
      {tabs.map(({ href, label }) => {
        const isHere = pathname === href;
        return (
          <RouterLink
            key={href}
            href={href}
            aria-current={isHere ? 'page' : undefined}
            style={StyleSheet.flatten([styles.tab, isHere && styles.here])}
          >
            <Text weight={isHere ? 'strong' : undefined} tone={isHere ? 'ink' : 'quiet'}>
              {label}
            </Text>
          </RouterLink>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  row: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    columnGap: space.l,
    borderBottomWidth: 1,
    borderBottomColor: color.line,
  },
  tab: {
    display: 'flex',
    alignItems: 'center',
    minHeight: target,
    borderBottomWidth: 3,
    borderBottomColor: 'transparent',
  },
  here: { borderBottomColor: color.tide },
});
