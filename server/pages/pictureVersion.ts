import type { PoolSummary } from '@/lib/contract/cells';

/** Stands for the fit a picture is of, so that previews change with it. */
export const pictureVersion = ({ fittedAt }: Pick<PoolSummary, 'fittedAt'>): string =>
  fittedAt === null ? 'none' : String(Math.round(Date.parse(fittedAt) / 1000));
