import type { CSSProperties } from 'react';
import { color, font, size } from '../theme';

// Tables are the browser's own, so that columns find their widths and screen readers their way.
export const table: CSSProperties = {
  width: '100%',
  borderCollapse: 'collapse',
  fontFamily: font.words,
  fontSize: size.body,
  color: color.ink,
};

export const caption: CSSProperties = {
  textAlign: 'left',
  paddingBottom: 8,
  fontSize: size.small,
  color: color.quiet,
};

export const headCell = (isRight: boolean): CSSProperties => ({
  textAlign: isRight ? 'right' : 'left',
  verticalAlign: 'bottom',
  padding: isRight ? '8px 0 8px 16px' : '8px 16px 8px 0',
  borderBottom: `1px solid ${color.line}`,
  fontWeight: 400,
  fontSize: size.small,
  color: color.quiet,
});

export const bodyCell = (isRight: boolean, isFigures: boolean): CSSProperties => ({
  textAlign: isRight ? 'right' : 'left',
  verticalAlign: 'baseline',
  padding: isRight ? '8px 0 8px 16px' : '8px 16px 8px 0',
  borderBottom: `1px solid ${color.line}`,
  fontWeight: 400,
  ...(isFigures && { fontFamily: font.figures, whiteSpace: 'nowrap' }),
});

export const sortButton = (isRight: boolean): CSSProperties => ({
  display: 'inline-flex',
  flexDirection: isRight ? 'row-reverse' : 'row',
  alignItems: 'center',
  gap: 4,
  minHeight: 28,
  margin: 0,
  padding: 0,
  border: 0,
  background: 'none',
  font: 'inherit',
  color: 'inherit',
  textAlign: 'inherit',
  cursor: 'pointer',
});
