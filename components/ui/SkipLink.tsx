import type { CSSProperties } from 'react';
import { color, font, space } from '../theme';

const shape: CSSProperties = {
  position: 'absolute',
  top: space.s,
  left: space.s,
  zIndex: 30,
  padding: `${space.m}px ${space.l}px`,
  background: color.surface,
  color: color.tide,
  border: `1px solid ${color.tide}`,
  fontFamily: font.words,
  fontWeight: 600,
};

/** The first stop of the Tab key: leads past the places to the page's matter. */
export function SkipLink() {
  return (
    <a
      className="ebb-skip"
      href="#content"
      style={shape}
      onClick={(event) => {
        event.preventDefault();
        document.getElementById('content')?.focus();
      }}
    >
      Skip to the page
    </a>
  );
}
