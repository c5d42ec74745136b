import { CurrentFit, Fit } from '../db/models';

const mostRuns = 100;

/** The latest runs, newest first, without their curves. */
export async function findRuns(): Promise<{ runs: Fit[]; currentIds: Set<string> }> {
  const [runs, current] = await Promise.all([
    Fit.findAll({
      attributes: { exclude: ['parameters', 'covariance', 'diagnostics', 'curves'] },
      order: [
        ['createdAt', 'DESC'],
        ['id', 'ASC'],
      ],
      limit: mostRuns,
    }),
    CurrentFit.findAll(),
  ]);
  return { runs, currentIds: new Set(current.map(({ fitId }) => fitId)) };
}
