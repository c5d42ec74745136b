import { Link as RouterLink } from 'expo-router';
import { StyleSheet, View } from 'react-native';
import { color, space, target } from '../theme';
import { Divider, Icon, Text } from '../ui';
import { MarkLink } from './MarkLink';
import type { Place } from './places';

export interface SideRailProps {
  places: readonly Place[];
  /** Below the line: one's own things. */
  ownPlaces: readonly Place[];
  current: Place | undefined;
}

/** The places beside the page, from 900 px; narrow, with icons above short words, beside a workbench. */
export function SideRail({ places, ownPlaces, current }: SideRailProps) {
  const isNarrow = current?.isWorkbench ?? false;
  const RailLink = isNarrow ? NarrowLink : WideLink;
  const group = (list: readonly Place[]) =>
    list.map((place) => <RailLink key={place.href} place={place} isCurrent={place === current} />);
  return (
    <View style={[styles.rail, isNarrow && styles.narrow]} dataSet={{ look: 'rail', screenOnly: '' }}>
      <View role="banner">
        <MarkLink isBare={isNarrow} />
      </View>
      <View role="navigation" aria-label="Places" style={styles.places}>
        {group(places)}
        <View style={styles.line}>
          <Divider />
        </View>
        {group(ownPlaces)}
      </View>
    </View>
  );
}

interface RailLinkProps {
  place: Place;
  isCurrent: boolean;
}

function NarrowLink({ place, isCurrent }: RailLinkProps) {
  const tone = isCurrent ? 'tide' : 'quiet';
  return (
    <RouterLink href={place.href} aria-current={isCurrent ? 'page' : undefined} style={styles.place}>
      <View style={styles.innerNarrow}>
        <View style={[styles.here, isCurrent && styles.hereShown]} />
        <Icon name={place.icon} size={20} tone={tone} />
        <Text size="small" weight={isCurrent ? 'strong' : 'regular'} tone={tone}>
          {place.label}
        </Text>
      </View>
    </RouterLink>
  );
}

function WideLink({ place, isCurrent }: RailLinkProps) {
  return (
    <RouterLink href={place.href} aria-current={isCurrent ? 'page' : undefined} style={styles.place}>
      <View style={styles.inner}>
        <View style={[styles.here, isCurrent && styles.hereShown]} />
        <Text weight={isCurrent ? 'strong' : 'regular'} tone={isCurrent ? 'tide' : 'quiet'}>
          {place.label}
        </Text>
      </View>
    </RouterLink>
  );
}

const narrowWidth = 92;

const styles = StyleSheet.create({
  rail: {
    position: 'sticky',
    top: 0,
    width: 196,
    flexShrink: 0,
    overflowY: 'auto',
    paddingVertical: space.xl,
    borderRightWidth: 1,
    borderRightColor: color.line,
    gap: space.xl,
  },
  narrow: { width: narrowWidth },
  places: { minWidth: 0 },
  line: { marginVertical: space.m, marginHorizontal: 20 },
  place: { outlineOffset: -3 },
  inner: { minHeight: target - 4, justifyContent: 'center', paddingHorizontal: 20 },
  innerNarrow: {
    width: narrowWidth - 1,
    minHeight: 60,
    alignItems: 'center',
    justifyContent: 'center',
    gap: space.hair,
  },
  here: { position: 'absolute', left: 0, top: 8, bottom: 8, width: 4 },
  hereShown: { backgroundColor: color.tide },
});
