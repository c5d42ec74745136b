import type { ReactNode, Ref } from 'react';
import {
  StyleSheet,
  Text as NativeText,
  type StyleProp,
  type TextProps as NativeTextProps,
  type TextStyle,
} from 'react-native';
import { color, font, lineHeight, size, type Color, type Size } from '../theme';

export interface TextProps extends Omit<NativeTextProps, 'style'> {
  children: ReactNode;
  size?: Size;
  tone?: Color;
  weight?: 'regular' | 'strong' | 'bold';
  align?: 'left' | 'center' | 'right';
  style?: StyleProp<TextStyle>;
  ref?: Ref<NativeText>;
}

const weights = {
  regular: { fontWeight: '400' },
  strong: { fontWeight: '600' },
  bold: { fontWeight: '700' },
} as const;

const sized = (px: number): TextStyle => ({ fontSize: px, lineHeight: lineHeight(px) });

/** Words. Every other text of the kit is this one with other defaults. */
export function Text({
  size: step = 'body',
  tone = 'ink',
  weight = 'regular',
  align,
  style,
  ...rest
}: TextProps) {
  return (
    <NativeText
      {...rest}
      style={[
        styles.words,
        sized(size[step]),
        { color: color[tone] },
        weights[weight],
        align && { textAlign: align },
        style,
      ]}
    />
  );
}

/** A heading of a part of the page; the page's own heading is PageHead's. */
export function Heading({ level = 2, ...rest }: TextProps & { level?: 2 | 3 | 4 }) {
  return (
    <Text
      size={level === 2 ? 'heading' : level === 3 ? 'lead' : 'body'}
      weight="strong"
      role="heading"
      aria-level={level}
      {...rest}
    />
  );
}

/** The opening sentence under a heading. */
export function Lead(props: TextProps) {
  return <Text size="lead" tone="quiet" {...props} />;
}

/** Words that explain beside those that matter. */
export function Quiet(props: TextProps) {
  return <Text size="small" tone="quiet" {...props} />;
}

export function Strong(props: TextProps) {
  return <Text weight="strong" {...props} />;
}

/** Figures in tables and readouts, of one width each. */
export function Figure({ strong = false, style, ...rest }: Omit<TextProps, 'weight'> & { strong?: boolean }) {
  return <Text {...rest} style={[styles.figures, strong && styles.figuresStrong, style]} />;
}

const styles = StyleSheet.create({
  words: { fontFamily: font.words },
  figures: { fontFamily: font.figures },
  figuresStrong: { fontWeight: '500' },
});
