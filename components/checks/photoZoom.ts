/** How many times larger than the whole picture in its frame. */
export const photoZooms = [1, 1.5, 2, 3, 4, 6] as const;

export const lastZoom = photoZooms.length - 1;

/** The zoom that a key leads to, as a place in photoZooms; the same one for other keys. */
export function zoomByKey(key: string, place: number): number {
  if (key === '+' || key === '=') return Math.min(lastZoom, place + 1);
  if (key === '-' || key === '_') return Math.max(0, place - 1);
  return key === '0' ? 0 : place;
}
