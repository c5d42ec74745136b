import { open } from 'node:fs/promises';

import sharp from 'sharp';

import { limits } from '@/lib/contract/limits';

import { AppError } from '../errors';
import { differenceHash, hashedSize } from './differenceHash';
import { sniffedBytes, sniffPicture } from './sniffPicture';

export interface PreparedPhoto {
  /** WebP, upright, sRGB, nothing but pixels. */
  full: Buffer;
  thumb: Buffer;
  width: number;
  height: number;
  perceptualHash: string;
}

const fullEdge = 2000;
const thumbEdge = 320;
const decodeSeconds = 20;
const formatWords = 'Choose a JPEG, PNG or WebP picture.';

// Only what is asked for is ever decoded, whatever a file turns out to be further inside.
sharp.block({ operation: ['VipsForeignLoad'] });
sharp.unblock({
  operation: ['Jpeg', 'Png', 'Webp', 'Heif'].flatMap((format) => [
    `VipsForeignLoad${format}File`,
    `VipsForeignLoad${format}Buffer`,
  ]),
});
sharp.cache(false);

let last: Promise<unknown> = Promise.resolve();

/** One picture after the other: decoding takes threads that the database needs too. */
function inTurn<T>(work: () => Promise<T>): Promise<T> {
  const run = last.then(work);
  last = run.catch(() => undefined);
  return run;
}

/**
 * A received file as a photo to be kept: turned upright, without anything but its pixels (no EXIF, position, XMP or
 * colour profile), scaled and encoded anew. Works in the decoder's own threads.
 * @throws AppError invalid (empty, damaged), unsupportedType (no picture, or one that can't be read here), tooLarge
 */
export async function preparePhoto(path: string): Promise<PreparedPhoto> {
  const format = sniffPicture(await headOf(path));
  if (!format) throw refuse('unsupportedType', `This is not a picture that can be read here. ${formatWords}`);
  return inTurn(async () => {
    try {
      await refuseTooManyPixels(path);
      return await convert(path);
    } catch (error) {
      if (error instanceof AppError) throw error;
      throw format === 'heif'
        ? refuse('unsupportedType', `This kind of HEIC picture can't be read here. ${formatWords}`)
        : refuse('invalid', 'This picture is damaged or did not arrive whole. Take it or choose it again.');
    }
  });
}

async function refuseTooManyPixels(path: string): Promise<void> {
  const { width, height } = await sharp(path, { limitInputPixels: false }).metadata();
  if (width * height <= limits.photoPixels.max) return;
  const [found, most] = [width * height, limits.photoPixels.max].map((pixels) => Math.round(pixels / 1e6));
  throw refuse(
    'tooLarge',
    `This picture has ${found} megapixels; at most ${most} can be read. Scale it down.`,
  );
}

async function convert(path: string): Promise<PreparedPhoto> {
  const { data: full, info } = await sharp(path, {
    limitInputPixels: limits.photoPixels.max,
    failOn: 'error',
  })
    .timeout({ seconds: decodeSeconds })
    .autoOrient()
    .resize({ width: fullEdge, height: fullEdge, fit: 'inside', withoutEnlargement: true })
    .flatten({ background: 'white' })
    .webp({ quality: 82 })
    .toBuffer({ resolveWithObject: true });
  const thumb = await sharp(full)
    .resize({ width: thumbEdge, height: thumbEdge, fit: 'inside', withoutEnlargement: true })
    .webp({ quality: 76 })
    .toBuffer();
  const greys = await sharp(full)
    .resize({ ...hashedSize, fit: 'fill' })
    .toColourspace('b-w')
    .raw()
    .toBuffer();
  return { full, thumb, width: info.width, height: info.height, perceptualHash: differenceHash(greys) };
}

async function headOf(path: string): Promise<Buffer> {
  const handle = await open(path, 'r');
  const { buffer, bytesRead } = await handle
    .read({ buffer: Buffer.alloc(sniffedBytes), length: sniffedBytes })
    .finally(() => handle.close());
  if (bytesRead === 0) throw refuse('invalid', 'This file is empty.');
  return buffer.subarray(0, bytesRead);
}

const refuse = (code: 'invalid' | 'unsupportedType' | 'tooLarge', message: string) =>
  new AppError(code, message, { file: message });
