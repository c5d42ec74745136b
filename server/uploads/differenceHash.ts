/** Columns and rows of the picture a hash is taken of. */
export const hashedSize = { width: 9, height: 8 } as const;

/**
 * Hash of how a picture looks: for each of 8 x 8 neighbouring pairs whether it grows lighter from left to right. The
 * same picture scaled, compressed or lightened again differs in a few of the 64 bits, another one in about half.
 * @param greys 9 x 8 grey levels, row by row
 * @returns 16 hexadecimal digits
 */
export function differenceHash(greys: Uint8Array): string {
  const { width, height } = hashedSize;
  if (greys.length !== width * height) throw new RangeError('differenceHash requires 9 x 8 grey levels');
  let bits = 0n;
  for (let row = 0; row < height; row += 1)
    for (let column = 0; column < width - 1; column += 1) {
      const at = row * width + column;
      bits = (bits << 1n) | (greys[at]! < greys[at + 1]! ? 1n : 0n);
    }
  return bits.toString(16).padStart(16, '0');
}
