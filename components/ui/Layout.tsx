import type { ReactNode } from 'react';
import { StyleSheet, View, type StyleProp, type ViewStyle } from 'react-native';
import { breakpoint, color, space, useLayout, type Space } from '../theme';

/** Free space below every page's matter, px. */
export const pageFoot = 64;

interface StackProps {
  children: ReactNode;
  gap?: Space;
  style?: StyleProp<ViewStyle>;
}

/** Things below each other. */
export function Stack({ children, gap = 'l', style }: StackProps) {
  return <View style={[{ gap: space[gap], minWidth: 0 }, style]}>{children}</View>;
}

export interface RowProps extends StackProps {
  align?: 'center' | 'baseline' | 'flex-start' | 'stretch';
  justify?: 'flex-start' | 'center' | 'space-between' | 'flex-end';
}

/** Things beside each other, wrapping where the width ends. */
export function Row({ children, gap = 's', align = 'center', justify = 'flex-start', style }: RowProps) {
  return (
    <View style={[styles.row, { gap: space[gap], alignItems: align, justifyContent: justify }, style]}>
      {children}
    </View>
  );
}

/** A group of buttons that belong together, named for screen readers. */
export function Toolbar({ label, children }: { label: string; children: ReactNode }) {
  return (
    <View role="toolbar" aria-label={label} style={[styles.row, styles.toolbar]}>
      {children}
    </View>
  );
}

/** The main landmark of every page: at most 1200 px wide, with the page's own margins. */
export function Page({ children, narrow = false }: { children: ReactNode; narrow?: boolean }) {
  const { isPhone } = useLayout();
  return (
    <View
      role="main"
      id="content"
      tabIndex={-1}
      style={[styles.page, isPhone && styles.pagePhone, narrow && styles.narrow]}
    >
      {children}
    </View>
  );
}

/** The page's matter with a narrower part beside it when the window is wide, below it when not. */
export function Beside({
  children,
  aside,
  side = 'end',
  asideWidth = 290,
}: {
  children: ReactNode;
  aside: ReactNode;
  side?: 'start' | 'end';
  /** px, where the window is wide. */
  asideWidth?: number;
}) {
  const { isWide } = useLayout();
  const asideBox = <View style={isWide ? [styles.aside, { width: asideWidth }] : undefined}>{aside}</View>;
  return (
    <View style={isWide ? styles.beside : styles.below}>
      {side === 'start' && asideBox}
      <View style={isWide ? styles.matter : styles.below}>{children}</View>
      {side === 'end' && asideBox}
    </View>
  );
}

/** A part of the page with its own ground, as charts and previews have. */
export function Panel({
  children,
  label,
  padded = true,
}: {
  children: ReactNode;
  label?: string;
  padded?: boolean;
}) {
  return (
    <View
      role={label ? 'region' : undefined}
      aria-label={label}
      style={[styles.panel, padded && styles.panelPadded]}
    >
      {children}
    </View>
  );
}

/** What paper has no use for: fields and buttons. */
export function ScreenOnly({ children }: { children: ReactNode }) {
  return <View dataSet={{ screenOnly: '' }}>{children}</View>;
}

export function Divider({ strong = false }: { strong?: boolean }) {
  return <View role="none" style={strong ? styles.ruleStrong : styles.rule} />;
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', flexWrap: 'wrap', minWidth: 0 },
  toolbar: { gap: space.s, alignItems: 'center' },
  page: {
    width: '100%',
    maxWidth: breakpoint.content,
    marginHorizontal: 'auto',
    paddingHorizontal: space.xxl,
    paddingTop: 28,
    paddingBottom: pageFoot,
    gap: space.xl,
    flexGrow: 1,
  },
  pagePhone: { paddingHorizontal: 20, paddingTop: space.l, gap: 20 },
  narrow: { maxWidth: 720 },
  beside: { flexDirection: 'row', gap: space.xxl, alignItems: 'flex-start' },
  below: { gap: space.xl },
  matter: { flex: 1, minWidth: 0, gap: space.xl },
  aside: { flexShrink: 0, gap: space.l },
  panel: { backgroundColor: color.surface, borderWidth: 1, borderColor: color.line, minWidth: 0 },
  panelPadded: { padding: space.l, gap: space.m },
  rule: { height: 1, backgroundColor: color.line },
  ruleStrong: { height: 2, backgroundColor: color.ink },
});
