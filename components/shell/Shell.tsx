import { usePathname, type Href } from 'expo-router';
import { useState, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { breakpoint, color, space, useLayout } from '../theme';
import { ActionBarContext, Link, SkipLink } from '../ui';
import { BottomBar, bottomBarHeight } from './BottomBar';
import { MarkLink } from './MarkLink';
import { placeOf, type Place } from './places';
import { SideRail } from './SideRail';
import { useScrollPlace } from './useScrollPlace';

export interface ShellProps {
  /** What the bar leads to on phones: at most five. */
  barPlaces: readonly Place[];
  /** What the rail leads to on wide windows, above and below its line. */
  railPlaces: readonly Place[];
  ownPlaces: readonly Place[];
  /** At the upper right on phones: "Sign in", or one's account. */
  corner: { href: Href; label: string };
  /** At the foot of every page: method, privacy, glossary. */
  footLinks?: readonly { href: Href; label: string }[];
  children: ReactNode;
}

/** What stands around every page: the places, the mark, the foot. */
export function Shell({ barPlaces, railPlaces, ownPlaces, corner, footLinks = [], children }: ShellProps) {
  const { isWide } = useLayout();
  const pathname = usePathname();
  const [hasActionBar, setHasActionBar] = useState(false);
  useScrollPlace(pathname);

  const current = placeOf(isWide ? [...railPlaces, ...ownPlaces] : barPlaces, pathname);
  // Pages within a place begin with their own way back.
  const hasHeader = !isWide && (current === undefined || current.href === pathname);
  const hasBar = !isWide && !hasActionBar;

  return (
    <ActionBarContext value={setHasActionBar}>
      <View dataSet={{ look: 'viewHeight' }} style={[styles.all, isWide && styles.allWide]}>
        <SkipLink />
        {isWide && <SideRail places={railPlaces} ownPlaces={ownPlaces} current={current} />}
        {hasHeader && (
          <View role="banner" style={styles.header} dataSet={{ screenOnly: '' }}>
            <MarkLink />
            <View style={styles.corner}>
              <Link href={corner.href} tone="quiet" bare>
                {corner.label}
              </Link>
            </View>
          </View>
        )}
        <View style={[styles.matter, hasBar && styles.aboveBar]}>
          {children}
          {footLinks.length > 0 && !hasActionBar && (
            <View role="contentinfo" style={styles.footPlace} dataSet={{ screenOnly: '' }}>
              <View style={[styles.foot, isWide && styles.footWide]}>
                {footLinks.map(({ href, label }) => (
                  <Link key={label} href={href} size="small" tone="quiet">
                    {label}
                  </Link>
                ))}
              </View>
            </View>
          )}
        </View>
        {hasBar && <BottomBar places={barPlaces} current={current} />}
      </View>
    </ActionBarContext>
  );
}

const styles = StyleSheet.create({
  all: { flexGrow: 1 },
  allWide: { flexDirection: 'row', alignItems: 'stretch' },
  header: {
    flexDirection: 'row',
    justifyContent: 'space-between',
    alignItems: 'center',
    paddingTop: space.s,
  },
  corner: { paddingRight: 20, paddingVertical: space.s },
  matter: { flexGrow: 1, flexShrink: 1, flexBasis: 'auto', minWidth: 0 },
  aboveBar: { paddingBottom: bottomBarHeight },
  foot: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    gap: space.l,
    marginHorizontal: 20,
    paddingVertical: space.l,
    borderTopWidth: 1,
    borderTopColor: color.line,
  },
  // As the pages above it: their margins, and no wider.
  footPlace: { width: '100%', maxWidth: breakpoint.content, marginHorizontal: 'auto' },
  footWide: { marginHorizontal: space.xxl },
});
