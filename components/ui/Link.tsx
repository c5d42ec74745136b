import { Link as RouterLink, type Href } from 'expo-router';
import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, font, lineHeight, radius, size, space, target, type Color, type Size } from '../theme';
import { Text } from './Text';

/** An address of the server's own, outside the app's routes. */
type ServerAddress = `/api/${string}`;

export interface LinkProps {
  href: Href | ServerAddress;
  children: ReactNode;
  size?: Size;
  tone?: Color;
  strong?: boolean;
  /** Leaves the page's style of underlining to the surrounding list or bar. */
  bare?: boolean;
  /** Saves the answer as a file instead of opening it. */
  download?: string;
  /** What screen readers say instead, beginning with the visible words. */
  description?: string;
}

/** A real anchor: opens in the app, in a new tab with the usual keys, and is followed by search engines. */
export function Link({
  href,
  children,
  size: step = 'body',
  tone = 'tide',
  strong = false,
  bare = false,
  download,
  description,
}: LinkProps) {
  return (
    <RouterLink
      href={href as Href}
      download={download}
      aria-label={description}
      style={{
        fontFamily: font.words,
        fontSize: size[step],
        lineHeight: lineHeight(size[step]),
        fontWeight: strong ? '600' : '400',
        color: color[tone],
        textDecorationLine: bare ? 'none' : 'underline',
      }}
    >
      {children}
    </RouterLink>
  );
}

/** A link in the shape of a button, for going to a place where something is done. */
export function ButtonLink({
  href,
  label,
  kind = 'secondary',
  wide = false,
}: {
  href: Href;
  label: string;
  kind?: 'primary' | 'secondary';
  /** Takes the whole width it is given. */
  wide?: boolean;
}) {
  return (
    <RouterLink href={href} style={[styles.anchor, styles[kind], wide && styles.wide]}>
      <View style={[styles.inner, wide && styles.innerWide]}>
        <Text weight="strong" tone={kind === 'primary' ? 'onTide' : 'ink'}>
          {label}
        </Text>
      </View>
    </RouterLink>
  );
}

const styles = StyleSheet.create({
  anchor: { borderRadius: radius.control, borderWidth: 1, alignSelf: 'flex-start' },
  primary: { backgroundColor: color.tide, borderColor: color.tide },
  secondary: { backgroundColor: color.surface, borderColor: color.quiet },
  wide: { alignSelf: 'stretch' },
  // An anchor's children do not stretch by themselves.
  innerWide: { minHeight: 46, width: '100%' },
  inner: {
    minHeight: target - 2,
    paddingHorizontal: space.l,
    justifyContent: 'center',
    alignItems: 'center',
  },
});
