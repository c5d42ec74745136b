export type PictureFormat = 'jpeg' | 'png' | 'webp' | 'heif';

/** Enough to tell what a file is. */
export const sniffedBytes = 64;

const startsWith = (head: Buffer, text: string, at = 0) =>
  head.subarray(at, at + text.length).toString('latin1') === text;

const signatures: Record<PictureFormat, (head: Buffer) => boolean> = {
  jpeg: (head) => startsWith(head, '\xff\xd8\xff'),
  png: (head) => startsWith(head, '\x89PNG\r\n\x1a\n'),
  webp: (head) => startsWith(head, 'RIFF') && startsWith(head, 'WEBP', 8),
  heif: (head) =>
    startsWith(head, 'ftyp', 4) && /^(hei[cmsx]|hev[cmsx]|mif1|msf1|avif)/.test(head.toString('latin1', 8)),
};

/** What a file is by its first bytes, whatever it is called; null = no picture that is taken here. */
export function sniffPicture(head: Buffer): PictureFormat | null {
  const formats = Object.keys(signatures) as PictureFormat[];
  return formats.find((format) => signatures[format](head)) ?? null;
}
