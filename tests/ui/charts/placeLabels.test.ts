import { placeLabels, textWidth, type LabelWish } from '@/components/charts/placeLabels';

const bounds = { x: 0, y: 0, width: 300, height: 200 };

const wish = (id: string, x: number, y: number): LabelWish => ({
  id,
  text: 'about this wide',
  x,
  y,
  fontSize: 13,
  offsets: [
    { dx: 8, dy: 0, anchor: 'start' },
    { dx: -8, dy: 0, anchor: 'end' },
    { dx: 8, dy: 20, anchor: 'start' },
  ],
});

it('takes the first place when it is free', () => {
  expect(placeLabels([wish('a', 50, 100)], bounds)).toEqual([
    { id: 'a', text: 'about this wide', x: 58, y: 100, anchor: 'start' },
  ]);
});

it('moves the later of two labels that would meet', () => {
  const [first, second] = placeLabels([wish('a', 150, 100), wish('b', 155, 104)], bounds);
  expect(first?.anchor).toBe('start');
  expect(second?.anchor).toBe('end');
});

it('stays within the drawing', () => {
  const [label] = placeLabels([wish('a', 290, 100)], bounds);
  expect(label?.anchor).toBe('end');
  expect((label?.x ?? 0) - textWidth('about this wide', 13)).toBeGreaterThanOrEqual(0);
});

it('keeps clear of obstacles', () => {
  const [label] = placeLabels([wish('a', 150, 100)], bounds, [{ x: 160, y: 85, width: 60, height: 20 }]);
  expect(label?.anchor).toBe('end');
});

it('covers as little as it can where no place is free', () => {
  const [label] = placeLabels([wish('a', 150, 100)], bounds, [
    { x: 0, y: 80, width: 300, height: 24 },
    { x: 158, y: 108, width: 20, height: 4 },
  ]);
  expect(label?.y).toBe(120);
});
