import { Link as RouterLink } from 'expo-router';
import { StyleSheet, View } from 'react-native';
import { space, target } from '../theme';
import { Text } from '../ui';
import { Mark } from './Mark';

/** Mark and name, or the mark alone; leads to the first page. */
export function MarkLink({ isBare = false }: { isBare?: boolean }) {
  return (
    <RouterLink href="/" aria-label="Ebbline, first page" style={styles.link}>
      <View style={styles.inner}>
        <Mark />
        {!isBare && (
          <Text size="heading" weight="bold" style={styles.name}>
            Ebbline
          </Text>
        )}
      </View>
    </RouterLink>
  );
}

const styles = StyleSheet.create({
  link: { alignSelf: 'flex-start' },
  inner: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.m,
    minHeight: target,
    paddingHorizontal: 20,
  },
  name: { letterSpacing: -0.4 },
});
