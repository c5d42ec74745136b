export interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** A text near a point; `offsets` are the places tried in turn, from the point to the text's nearest edge. */
export interface LabelWish {
  id: string;
  text: string;
  x: number;
  y: number;
  fontSize: number;
  offsets: readonly { dx: number; dy: number; anchor: 'start' | 'middle' | 'end' }[];
}

export interface PlacedLabel {
  id: string;
  text: string;
  x: number;
  /** Baseline. */
  y: number;
  anchor: 'start' | 'middle' | 'end';
}

// The mean advance of our words face is 0.46 em (measured over English letter frequencies); strong text runs wider.
const meanAdvanceEm = 0.52;

export const textWidth = (text: string, fontSize: number) => text.length * fontSize * meanAdvanceEm;

const overlaps = (a: Box, b: Box) =>
  a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;

const overlapArea = (a: Box, b: Box) =>
  overlaps(a, b)
    ? (Math.min(a.x + a.width, b.x + b.width) - Math.max(a.x, b.x)) *
      (Math.min(a.y + a.height, b.y + b.height) - Math.max(a.y, b.y))
    : 0;

const boxOf = (label: PlacedLabel, fontSize: number): Box => {
  const width = textWidth(label.text, fontSize);
  const shift = label.anchor === 'start' ? 0 : label.anchor === 'end' ? width : width / 2;
  return { x: label.x - shift, y: label.y - fontSize, width, height: fontSize * 1.3 };
};

/** px of a box that lie outside the bounds, times a weight that outdoes any overlap. */
const outside = (box: Box, bounds: Box) => {
  const over =
    Math.max(0, bounds.x - box.x) +
    Math.max(0, box.x + box.width - bounds.x - bounds.width) +
    Math.max(0, bounds.y - box.y) +
    Math.max(0, box.y + box.height - bounds.y - bounds.height);
  return over * 1000;
};

/**
 * Finds each label, in order of importance, the first of its places that meets nothing; where none is free, the one
 * that covers least. Labels placed earlier and the obstacles are kept clear.
 */
export function placeLabels(
  wishes: readonly LabelWish[],
  bounds: Box,
  obstacles: readonly Box[] = [],
): PlacedLabel[] {
  const taken: Box[] = [...obstacles];
  return wishes.flatMap((wish) => {
    const options = wish.offsets.map(({ dx, dy, anchor }) => {
      const label = { id: wish.id, text: wish.text, x: wish.x + dx, y: wish.y + dy, anchor };
      const box = boxOf(label, wish.fontSize);
      const cost = outside(box, bounds) + taken.reduce((sum, other) => sum + overlapArea(box, other), 0);
      return { label, box, cost };
    });
    const best = options.reduce<(typeof options)[number] | undefined>(
      (least, option) => (least === undefined || option.cost < least.cost ? option : least),
      undefined,
    );
    if (!best) return [];
    taken.push(best.box);
    return [best.label];
  });
}
