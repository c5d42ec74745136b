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

export interface CellPlace {
  isFirst: boolean;
  isLast: boolean;
  /** Figures stand at the right, in the mono face. */
  isFigures: boolean;
  /** Words that begin where figures end would run on from them: they stand further off. */
  isAfterFigures: boolean;
}

const cell = ({ isFirst, isLast, isFigures, isAfterFigures }: CellPlace): CSSProperties => ({
  textAlign: isFigures ? 'right' : 'left',
  padding: `8px ${isLast ? 0 : 10}px 8px ${isFirst ? 0 : isAfterFigures ? 24 : 10}px`,
  borderBottom: `1px solid ${color.line}`,
  fontWeight: 400,
});

export const headCell = (place: CellPlace): CSSProperties => ({
  ...cell(place),
  verticalAlign: 'bottom',
  fontSize: size.small,
  color: color.quiet,
});

export const bodyCell = (place: CellPlace): CSSProperties => ({
  ...cell(place),
  verticalAlign: 'baseline',
  ...(place.isFigures && { fontFamily: font.figures, whiteSpace: 'nowrap' }),
});

/** The box of a column's title; titles that sort are buttons of the same box. */
export const headTitle = (isRight: boolean): CSSProperties => ({
  display: 'inline-flex',
  flexDirection: isRight ? 'row-reverse' : 'row',
  alignItems: 'center',
  gap: 4,
  minHeight: 24,
  margin: 0,
  padding: 0,
  border: 0,
  background: 'none',
  font: 'inherit',
  color: 'inherit',
  textAlign: 'inherit',
});
