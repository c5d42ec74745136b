import { Op } from 'sequelize';
import type { z } from 'zod';

import type { apiChecksQuerySchema, apiChecksSchema } from '@/lib/contract/publicApi';

import { ReleaseBank } from '../db/models';
import { AppError } from '../errors';
import { generalise } from '../publicView/identity';
import { asRecord, csvHeader, csvLine, type ReleaseRow } from '../publicView/releaseFields';
import { findLastRelease, findRelease } from '../releases/queries';

export interface ChecksPage {
  body: z.infer<typeof apiChecksSchema>;
  csv: () => string;
}

/** A page of a release's rows: whole banks, in the order of their names. */
export async function readChecks({
  release: number,
  after = '',
  limit,
}: z.infer<typeof apiChecksQuerySchema>): Promise<ChecksPage> {
  const release = number === undefined ? await findLastRelease() : await findRelease(number);
  if (!release) throw new AppError('notFound', 'There is no such release.');
  const banks = await ReleaseBank.findAll({
    where: { number: release.number, pseudonym: { [Op.gt]: after } },
    order: [['pseudonym', 'ASC']],
    limit: limit + 1,
  });
  const page = banks.slice(0, limit);
  const rows = page.flatMap(({ pseudonym, identity, level, rows: checks }) =>
    checks.map(({ row }): ReleaseRow => ({ bank: pseudonym, identity: generalise(identity, level), row })),
  );
  return {
    body: {
      release: release.number,
      checks: rows.map(asRecord),
      next: banks.length > limit ? page.at(-1)!.pseudonym : null,
    },
    csv: () => `${[csvHeader, ...rows.map(csvLine)].join('\n')}\n`,
  };
}
