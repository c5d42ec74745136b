import { photoZooms, zoomByKey } from '@/components/checks/photoZoom';

it('grows by + or its unshifted key, shrinks by -, and stops at both ends', () => {
  const last = photoZooms.length - 1;
  expect([zoomByKey('+', 0), zoomByKey('=', 1), zoomByKey('-', 2)]).toEqual([1, 2, 1]);
  expect([zoomByKey('-', 0), zoomByKey('+', last)]).toEqual([0, last]);
});

it('shows the whole by 0 and leaves other keys alone', () => {
  expect([zoomByKey('0', 4), zoomByKey('a', 4), zoomByKey('Escape', 2)]).toEqual([0, 4, 2]);
});
