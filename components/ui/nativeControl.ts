import type { CSSProperties } from 'react';
import { color, font, radius, size, space } from '../theme';

// Select and date inputs are the browser's own: react-native-web has none, and their pickers suit each phone.
const control: CSSProperties = {
  appearance: 'none',
  boxSizing: 'border-box',
  width: '100%',
  minHeight: 48,
  margin: 0,
  padding: `0 ${space.l}px`,
  border: `1.5px solid ${color.quiet}`,
  borderRadius: radius.control,
  background: color.surface,
  color: color.ink,
  fontFamily: font.words,
  fontSize: size.lead,
};

export const nativeControl = (isInvalid: boolean, disabled: boolean): CSSProperties => ({
  ...control,
  ...(disabled && { background: color.wash, borderColor: color.line, color: color.quiet }),
  ...(isInvalid && { borderColor: color.rust }),
});

export const nativeDate = (isInvalid: boolean, disabled: boolean): CSSProperties => ({
  ...nativeControl(isInvalid, disabled),
  fontFamily: font.figures,
});

export const nativeSelect = {
  /** Room for the mark that says it opens. */
  padded: { paddingRight: 44, textOverflow: 'ellipsis' },
  inField: {
    border: 0,
    borderLeft: `1px solid ${color.line}`,
    borderRadius: `0 ${radius.control}px ${radius.control}px 0`,
    background: 'transparent',
    color: color.quiet,
    fontFamily: font.words,
    fontSize: size.body,
    padding: `0 ${space.s}px 0 ${space.m}px`,
    marginRight: space.s,
  },
} satisfies Record<string, CSSProperties>;
