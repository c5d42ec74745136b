import type { CSSProperties, ReactNode } from 'react';
import { color, font, size } from '../theme';

export interface Definition {
  label: string;
  value: ReactNode;
  /** Rust for a value that is in doubt; the words beside it say why. */
  tone?: 'ink' | 'rust' | 'brass';
  strong?: boolean;
}

export interface DefinitionListProps {
  items: readonly Definition[];
  /** Values in the mono face, as figures are. */
  figures?: boolean;
  /** Pairs side by side where the width allows it. */
  columns?: 1 | 2;
}

const list = (columns: 1 | 2): CSSProperties => ({
  display: 'grid',
  gridTemplateColumns: `repeat(auto-fill, minmax(min(100%, ${columns === 2 ? 240 : 600}px), 1fr))`,
  columnGap: 24,
  rowGap: 4,
  margin: 0,
  fontFamily: font.words,
  fontSize: size.body,
});

const pair: CSSProperties = {
  display: 'grid',
  gridTemplateColumns: 'minmax(104px, 2fr) 3fr',
  columnGap: 12,
  alignItems: 'baseline',
};
const term: CSSProperties = { color: color.quiet };

const description = ({ tone = 'ink', strong }: Definition, figures: boolean): CSSProperties => ({
  margin: 0,
  minWidth: 0,
  color: color[tone],
  fontFamily: figures ? font.figures : font.words,
  fontWeight: strong ? (figures ? 500 : 600) : 400,
});

/** Labels and their values, as on a filled-in form. */
export function DefinitionList({ items, figures = false, columns = 1 }: DefinitionListProps) {
  return (
    <dl style={list(columns)}>
      {items.map((item) => (
        <div key={item.label} style={pair}>
          <dt style={term}>{item.label}</dt>
          <dd style={description(item, figures)}>{item.value}</dd>
        </div>
      ))}
    </dl>
  );
}
