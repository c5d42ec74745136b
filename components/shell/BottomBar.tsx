import { Link as RouterLink } from 'expo-router';
import { StyleSheet, View } from 'react-native';
import { color, space } from '../theme';
import { Icon, Text } from '../ui';
import type { Place } from './places';

export const bottomBarHeight = 64;
const mostPlaces = 5;

/** The places at the thumb, on phones and narrow windows. */
export function BottomBar({ places, current }: { places: readonly Place[]; current: Place | undefined }) {
  return (
    <View
      role="navigation"
      aria-label="Places"
      style={styles.bar}
      dataSet={{ look: 'safeBottom', screenOnly: '' }}
    >
      {places.slice(0, mostPlaces).map((place) => {
        const isCurrent = place === current;
        return (
          <RouterLink
            key={place.href}
            href={place.href}
            style={styles.place}
            aria-current={isCurrent ? 'page' : undefined}
          >
            <View style={styles.inner}>
              <View style={[styles.tide, isCurrent && styles.tideHere]} />
              <Icon name={place.icon} size={22} tone={isCurrent ? 'tide' : 'quiet'} />
              <Text
                size="small"
                weight={isCurrent ? 'strong' : 'regular'}
                tone={isCurrent ? 'tide' : 'quiet'}
                numberOfLines={1}
              >
                {place.label}
              </Text>
            </View>
          </RouterLink>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  bar: {
    position: 'fixed',
    left: 0,
    right: 0,
    bottom: 0,
    flexDirection: 'row',
    justifyContent: 'center',
    backgroundColor: color.surface,
    borderTopWidth: 1,
    borderTopColor: color.line,
    zIndex: 10,
  },
  place: { flex: 1, maxWidth: 140, minWidth: 0, outlineOffset: -4 },
  inner: {
    width: '100%',
    minHeight: bottomBarHeight - 1,
    alignItems: 'center',
    justifyContent: 'center',
    gap: space.hair,
  },
  tide: { position: 'absolute', top: -1, left: '20%', right: '20%', height: 3 },
  tideHere: { backgroundColor: color.tide },
});
