import type { Release, ReleasePreview } from '@/lib/contract/releases';
import { formatCount, formatNumber, formatQuantity } from '@/lib/units';

const bytesPerKb = 1000;

/** "3,720 checks on 1,085 banks of 838 owners" */
export function evidenceWords({ evidence }: Pick<Release, 'evidence'>): string {
  const { owners, banks, checks } = evidence;
  return `${formatCount(checks)} checks on ${formatCount(banks)} banks of ${formatCount(owners)} owners`;
}

/** "1,085 banks came, none left, none changed" */
export function changeWords({ came, left, changed }: Release['changes']): string {
  const count = (value: number) => (value === 0 ? 'none' : formatCount(value));
  return `${count(came)} came, ${count(left)} left, ${count(changed)} with other checks than before`;
}

export const sizeWords = (bytes: number): string =>
  bytes < bytesPerKb * bytesPerKb
    ? formatQuantity(Math.max(1, Math.round(bytes / bytesPerKb)), 'kB', { decimals: 0 })
    : formatQuantity(bytes / bytesPerKb / bytesPerKb, 'MB', { decimals: 1 });

export const fileAddress = (number: number, name: string) =>
  `/api/releases/${number}/files/${encodeURIComponent(name)}` as const;

type Move = ReleasePreview['moves'][number];

/** Years to 80 % before and after, and by how much they move. */
export function moveWords({ before, after }: Move): string {
  const years = (value: number) => formatNumber(value, { decimals: 1 });
  if (!after) return 'no longer told';
  if (!before) return `new: ${years(after.estimate)} years`;
  const difference = after.estimate - before.estimate;
  const sign = difference < 0 ? 'less' : 'more';
  return `${years(before.estimate)} to ${years(after.estimate)} years, ${years(Math.abs(difference))} ${sign}`;
}

const kindWords = {
  came: 'new banks',
  left: 'banks whose checks were withdrawn or recalled',
  gained: 'banks with a new check',
  changed: 'banks whose checks changed',
} as const;

/** Why some changes are not in the release, and what would help. */
export function heldWords({ kind, reason, banks }: ReleasePreview['held'][number]): string {
  const what = `${formatCount(banks)} ${kindWords[kind]}`;
  return reason === 'tooFewAlike'
    ? `${what}: fewer than 5 owners of alike banks changed in this way. They wait for more.`
    : `${what}: fewer than 5 owners have banks that are alike in anything. They wait for more.`;
}
