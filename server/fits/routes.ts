import { fitListSchema } from '@/lib/contract/fits';

import { route, type Route } from '../http/route';
import { findRuns } from './queries';

export const fitRoutes: Route[] = [
  route({
    method: 'get',
    path: '/fits',
    policy: 'fits.read',
    response: fitListSchema,
    async handle({ deps }) {
      const { runs, currentIds } = await findRuns();
      return {
        fits: runs
          .map((run) => run.get())
          .map(({ owners, banks, checks, createdAt, ...run }) => ({
            ...run,
            isCurrent: currentIds.has(run.id),
            fittedAt: createdAt.toISOString(),
            evidence: { owners, banks, checks },
          })),
        isRefitRunning: (await deps.jobs.countPending('refit')) > 0,
      };
    },
  }),
];
