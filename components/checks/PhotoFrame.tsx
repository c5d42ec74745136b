import { type CSSProperties, useLayoutEffect, useRef, useState } from 'react';

import { color } from '@/components/theme';

const frame: CSSProperties = {
  containerType: 'size',
  height: '58vh',
  overflow: 'auto',
  display: 'grid',
  background: color.wash,
};

/** As large as the frame allows, times the zoom. */
const pictureAt = (aspect: number, zoom: number): CSSProperties => ({
  width: `calc(min(100cqw, 100cqh * ${aspect}) * ${zoom})`,
  maxWidth: 'none',
  margin: 'auto',
});

/** A photo in a frame it can be moved about in; what is in the middle stays there as it is zoomed. */
export function PhotoFrame({ address, zoom }: { address: string; zoom: number }) {
  const [aspect, setAspect] = useState(4 / 3);
  const box = useRef<HTMLDivElement>(null);
  /** What is in the middle, as shares of the whole. */
  const middle = useRef({ x: 0.5, y: 0.5 });

  useLayoutEffect(() => {
    const node = box.current;
    if (!node) return;
    const { x, y } = middle.current;
    node.scrollTo(x * node.scrollWidth - node.clientWidth / 2, y * node.scrollHeight - node.clientHeight / 2);
  }, [zoom, aspect]);

  return (
    <div
      ref={box}
      role="region"
      aria-label="The photo, to be moved about"
      tabIndex={0}
      style={frame}
      onScroll={({ currentTarget: at }) => {
        middle.current = {
          x: (at.scrollLeft + at.clientWidth / 2) / at.scrollWidth,
          y: (at.scrollTop + at.clientHeight / 2) / at.scrollHeight,
        };
      }}
    >
      <img
        src={address}
        alt="The meter as its owner photographed it"
        style={pictureAt(aspect, zoom)}
        onLoad={({ currentTarget: { naturalWidth, naturalHeight } }) =>
          setAspect(naturalWidth / naturalHeight)
        }
      />
    </div>
  );
}
