import { deflateSync } from 'node:zlib';

import sharp, { type Sharp } from 'sharp';

/** Draws a meter's face as noise-free stripes of a gradient, so that pictures of different seeds look different. */
export function drawPicture(width = 640, height = 480, seed = 1): Sharp {
  const pixels = Buffer.alloc(width * height * 3);
  for (let row = 0; row < height; row += 1)
    for (let column = 0; column < width; column += 1) {
      const [x, y] = [column / width, row / height];
      const at = (row * width + column) * 3;
      pixels[at] = 128 + 127 * Math.sin(seed * (5 * x + 3 * y));
      pixels[at + 1] = 128 + 127 * Math.cos(seed * 7 * x * y);
      pixels[at + 2] = 255 * y;
    }
  return sharp(pixels, { raw: { width, height, channels: 3 } });
}

const chunk = (type: string, content: Buffer) => {
  const length = Buffer.alloc(4);
  length.writeUInt32BE(content.length);
  const named = Buffer.concat([Buffer.from(type, 'latin1'), content]);
  const sum = Buffer.alloc(4);
  sum.writeUInt32BE(crc32(named));
  return Buffer.concat([length, named, sum]);
};
const pngStart = Buffer.from('\x89PNG\r\n\x1a\n', 'latin1');

/** A PNG of any size that says it is white, without its pixels being drawn first. */
export function hugePng(width: number, height: number): Buffer {
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([1, 0, 0, 0, 0], 8);
  const lines = deflateSync(Buffer.alloc((Math.ceil(width / 8) + 1) * height));
  return Buffer.concat([
    pngStart,
    chunk('IHDR', header),
    chunk('IDAT', lines),
    chunk('IEND', Buffer.alloc(0)),
  ]);
}

/** The checksum of PNG's parts (ISO 3309), bit by bit. */
function crc32(bytes: Buffer): number {
  let rest = 0xffffffff;
  for (const byte of bytes) {
    rest ^= byte;
    for (let bit = 0; bit < 8; bit += 1) rest = (rest >>> 1) ^ (rest & 1 ? 0xedb88320 : 0);
  }
  return (rest ^ 0xffffffff) >>> 0;
}
