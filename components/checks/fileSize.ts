import { formatQuantity } from '@/lib/units';

const kilobyte = 1024;

/** The size of a file in words: "32 kB", "12.4 MB". */
export function fileSize(bytes: number): string {
  if (bytes < kilobyte * kilobyte) return formatQuantity(Math.ceil(bytes / kilobyte), 'kB', { decimals: 0 });
  return formatQuantity(bytes / kilobyte / kilobyte, 'MB', { decimals: 1 });
}
