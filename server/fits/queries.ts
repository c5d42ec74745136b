import { Op } from 'sequelize';

import type { PoolCheck } from '@/lib/fit/poolCheck';

import { Bank, CellType, CurrentFit, Fit } from '../db/models';
import type { BankPrice } from './pricesOf';

const mostRuns = 100;
const mostPastFits = 20;

/** The latest runs, newest first, without their curves. */
export async function findRuns(): Promise<{ runs: Fit[]; currentIds: Set<string> }> {
  const [runs, currentIds] = await Promise.all([
    Fit.findAll({
      attributes: { exclude: ['parameters', 'covariance', 'diagnostics', 'curves'] },
      order: [
        ['createdAt', 'DESC'],
        ['id', 'ASC'],
      ],
      limit: mostRuns,
    }),
    findCurrentIds(),
  ]);
  return { runs, currentIds };
}

export async function findCurrentIds(): Promise<Set<string>> {
  return new Set((await CurrentFit.findAll()).map(({ fitId }) => fitId));
}

/** A run with its findings, without its curves. */
export const findRun = (id: string): Promise<Fit | null> =>
  Fit.findByPk(id, { attributes: { exclude: ['covariance', 'curves'] } });

/** Good public fits, newest first, with what they said of lives. */
export const findPastFits = (): Promise<Fit[]> =>
  Fit.findAll({
    where: { kind: 'public', isGood: true },
    attributes: { exclude: ['covariance', 'diagnostics', 'curves'] },
    order: [
      ['createdAt', 'DESC'],
      ['id', 'ASC'],
    ],
    limit: mostPastFits,
  });

/** Pseudonym and cell type of banks, by id. */
export async function findBankNames(
  ids: readonly string[],
): Promise<Map<string, { pseudonym: string; cellType: string }>> {
  const banks = (await Bank.findAll({
    where: { id: [...ids] },
    attributes: ['id', 'pseudonym'],
    include: [{ model: CellType, as: 'cellType', attributes: ['name'] }],
  })) as (Bank & { cellType: CellType })[];
  return new Map(banks.map(({ id, pseudonym, cellType }) => [id, { pseudonym, cellType: cellType.name }]));
}

/** Names of the listed cell types, by id. */
export async function findCellTypeNames(): Promise<Map<string, string>> {
  const cellTypes = await CellType.findAll({ where: { status: 'listed' }, attributes: ['id', 'name'] });
  return new Map(cellTypes.map(({ id, name }) => [id, name]));
}

/** What was paid per cell for the banks of some rows, where their owners said so. */
export async function findBankPrices(rows: readonly PoolCheck[]): Promise<BankPrice[]> {
  const pooled = new Set(rows.map(({ bank }) => bank));
  const banks = await Bank.findAll({
    where: { priceMinor: { [Op.gt]: 0 }, priceCurrency: { [Op.ne]: null } },
    attributes: ['id', 'ownerId', 'cellTypeId', 'priceMinor', 'priceCurrency'],
    order: [['id', 'ASC']],
  });
  return banks
    .filter(({ id }) => pooled.has(id))
    .map(({ ownerId, cellTypeId, priceMinor, priceCurrency }) => ({
      ...{ owner: ownerId, cellType: cellTypeId, currency: priceCurrency!, perCellMinor: priceMinor! },
    }));
}
