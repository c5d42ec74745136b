import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, radius, space, type Color } from '../theme';
import { Icon, type IconName } from './Icon';
import { Text } from './Text';

type BannerKind = 'info' | 'done' | 'caution' | 'error';

const kinds: Record<BannerKind, { tone: Color; ground: Color; icon: IconName; word: string }> = {
  info: { tone: 'tide', ground: 'tideWash', icon: 'info', word: 'Note' },
  done: { tone: 'moss', ground: 'mossWash', icon: 'check', word: 'Done' },
  caution: { tone: 'brass', ground: 'brassWash', icon: 'caution', word: 'Caution' },
  error: { tone: 'rust', ground: 'rustWash', icon: 'error', word: 'Problem' },
};

export interface BannerProps {
  kind: BannerKind;
  title?: string;
  children?: ReactNode;
  /** Buttons or links that answer it. */
  actions?: ReactNode;
}

/** A message that stays on the page until its cause is gone. Errors are announced at once. */
export function Banner({ kind, title, children, actions }: BannerProps) {
  const { tone, ground, icon, word } = kinds[kind];
  return (
    <View
      role={kind === 'error' ? 'alert' : kind === 'done' ? 'status' : 'note'}
      style={[styles.box, { backgroundColor: color[ground], borderLeftColor: color[tone] }]}
    >
      <Icon name={icon} tone={tone} />
      <View style={styles.words}>
        <Text weight="strong" tone={tone}>
          {title ?? word}
        </Text>
        {typeof children === 'string' ? <Text>{children}</Text> : children}
        {actions && <View style={styles.actions}>{actions}</View>}
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  box: {
    flexDirection: 'row',
    gap: space.m,
    padding: space.m,
    borderLeftWidth: 4,
    borderTopRightRadius: radius.small,
    borderBottomRightRadius: radius.small,
  },
  words: { flex: 1, minWidth: 0, gap: space.xs },
  actions: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s, marginTop: space.xs },
});
