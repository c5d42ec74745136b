import { CurrentFit, Fit } from '../db/models';
import type { Deps } from '../deps';
import { codeVersion } from './codeVersion';
import { requestRefit } from './requestRefit';

/** At a start: a fit in force that other code made would stay until the next decision; it is asked for anew. */
export async function refitIfOlder(deps: Deps): Promise<void> {
  const fitIds = (await CurrentFit.findAll()).map(({ fitId }) => fitId);
  const fits = await Fit.findAll({ where: { id: fitIds }, attributes: ['codeVersion'] });
  if (fits.every((fit) => fit.codeVersion === codeVersion)) return;
  deps.logger.info('the fit in force was made by other code: a refit is asked for');
  await deps.db.transaction((transaction) => requestRefit(deps, transaction));
}
