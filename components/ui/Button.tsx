import type { ReactNode, Ref } from 'react';
import { ActivityIndicator, Pressable, StyleSheet, View } from 'react-native';
import { color, font, radius, space, target, type Color } from '../theme';
import { Icon, type IconName } from './Icon';
import { Text } from './Text';

type Kind = 'primary' | 'secondary' | 'danger' | 'quiet';

export interface ButtonProps {
  /** What it does, in words. */
  label: string;
  onPress: () => void;
  kind?: Kind;
  /** Work is under way: greyed, announced, not pressable. */
  busy?: boolean;
  disabled?: boolean;
  /** The single key that does the same, shown beside the label; the page listens for it (useHotkeys). */
  hotkey?: string;
  icon?: IconName;
  /** Takes the whole width it is given. */
  wide?: boolean;
  /** Says more than the label to screen readers, beginning with it. */
  description?: string;
  /** For buttons that open and close something. */
  expanded?: boolean;
  ref?: Ref<View>;
}

const tones: Record<Kind, Color> = { primary: 'onTide', secondary: 'ink', danger: 'rust', quiet: 'tide' };

export function Button({
  label,
  onPress,
  kind = 'secondary',
  busy = false,
  disabled = false,
  hotkey,
  icon,
  wide = false,
  description,
  expanded,
  ref,
}: ButtonProps) {
  const isOff = busy || disabled;
  const tone = isOff && kind === 'primary' ? 'quiet' : tones[kind];
  return (
    <Pressable
      ref={ref}
      role="button"
      aria-label={description}
      aria-busy={busy}
      aria-disabled={isOff}
      aria-expanded={expanded}
      aria-keyshortcuts={hotkey}
      disabled={isOff}
      onPress={onPress}
      style={({ hovered, pressed }) => [
        styles.box,
        kinds[kind],
        wide && styles.wide,
        !isOff && (hovered || pressed) && hovers[kind],
        isOff && (kind === 'primary' ? styles.offFilled : styles.off),
      ]}
    >
      {busy && (
        <View aria-hidden>
          <ActivityIndicator size="small" color={color[tone]} />
        </View>
      )}
      {icon && !busy && <Icon name={icon} size={18} tone={tone} />}
      <Text weight="strong" tone={tone}>
        {label}
      </Text>
      {hotkey && <KeyHint tone={tone}>{hotkey}</KeyHint>}
    </Pressable>
  );
}

function KeyHint({ children, tone }: { children: ReactNode; tone: Color }) {
  return (
    <View style={[styles.key, { borderColor: color[tone] }]} aria-hidden>
      <Text size="small" tone={tone} style={styles.keyText}>
        {children}
      </Text>
    </View>
  );
}

const styles = StyleSheet.create({
  box: {
    minHeight: target,
    paddingHorizontal: space.l,
    paddingVertical: space.s,
    flexDirection: 'row',
    gap: space.s,
    alignItems: 'center',
    justifyContent: 'center',
    alignSelf: 'flex-start',
    borderRadius: radius.control,
    borderWidth: 1,
  },
  wide: { alignSelf: 'stretch', minHeight: 48 },
  off: { opacity: 0.6 },
  offFilled: { backgroundColor: color.wash, borderColor: color.line },
  key: { borderWidth: 1, borderRadius: radius.small, paddingHorizontal: 5, opacity: 0.85 },
  keyText: { fontFamily: font.figures, lineHeight: 16 },
});

const kinds = StyleSheet.create({
  primary: { backgroundColor: color.tide, borderColor: color.tide },
  secondary: { backgroundColor: color.surface, borderColor: color.quiet },
  danger: { backgroundColor: color.surface, borderColor: color.rust },
  quiet: { backgroundColor: 'transparent', borderColor: 'transparent', paddingHorizontal: space.s },
});

const hovers = StyleSheet.create({
  primary: { borderColor: color.ink },
  secondary: { backgroundColor: color.wash },
  danger: { backgroundColor: color.rustWash },
  quiet: { backgroundColor: color.wash },
});
