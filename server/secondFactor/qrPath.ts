import { create } from 'qrcode';

/** A QR code as an SVG path of its dark squares, one unit each, row by row; `size` squares along an edge. */
export function qrPath(text: string): { size: number; path: string } {
  const { size, data } = create(text, { errorCorrectionLevel: 'M' }).modules;
  let path = '';
  for (let row = 0; row < size; row += 1)
    for (let column = 0; column < size; column += 1) {
      let run = 0;
      while (column + run < size && data[row * size + column + run]) run += 1;
      if (run > 0) path += `M${column} ${row}h${run}v1h-${run}z`;
      column += run;
    }
  return { size, path };
}
