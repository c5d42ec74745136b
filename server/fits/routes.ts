import { fitDetailSchema, fitListSchema, fitParamsSchema, publicFitSchema } from '@/lib/contract/fits';

import { AppError } from '../errors';
import { route, type Route } from '../http/route';
import { presentDetail, presentRun } from './presentRun';
import { readPublicFit } from './readPublicFit';
import { findBankNames, findCurrentIds, findRun, findRuns } from './queries';
import { banksNamedIn, readDiagnostics } from './storedFit';

export const fitRoutes: Route[] = [
  route({
    method: 'get',
    path: '/fits',
    policy: 'fits.read',
    response: fitListSchema,
    async handle({ deps }) {
      const { runs, currentIds } = await findRuns();
      return {
        fits: runs.map((run) => presentRun(run, currentIds)),
        isRefitRunning: (await deps.jobs.countPending('refit')) > 0,
      };
    },
  }),
  route({
    method: 'get',
    path: '/fits/public',
    policy: 'fits.readPublic',
    response: publicFitSchema,
    handle: ({ deps }) => readPublicFit(deps),
  }),
  route({
    method: 'get',
    path: '/fits/:fitId',
    policy: 'fits.read',
    params: fitParamsSchema,
    response: fitDetailSchema,
    async handle({ params: { fitId } }) {
      const run = await findRun(fitId);
      if (!run) throw new AppError('notFound', 'There is no run of the fit under this number.');
      const diagnostics = readDiagnostics(run);
      const names = await findBankNames(diagnostics ? banksNamedIn(diagnostics) : []);
      return presentDetail(run, diagnostics, { names, currentIds: await findCurrentIds() });
    },
  }),
];
