import { type Sequelize, type Transaction } from 'sequelize';

import type { CellTypeStatus } from '@/lib/contract/catalogue';

import { CellType, QuotedClaim, TrailEntry } from '../db/models';
import { AppError } from '../errors';

/** How much depends on a cell type. Drafts and withdrawn checks count for nothing. */
export interface Dependents {
  banks: number;
  checks: number;
  approvedChecks: number;
  claims: number;
}

const none: Dependents = { banks: 0, checks: 0, approvedChecks: 0, claims: 0 };

export function statusOf({ status, closedAs }: Pick<CellType, 'status' | 'closedAs'>): CellTypeStatus {
  return closedAs ?? status;
}

/** Every cell type there ever was, by maker and name. */
export async function findCatalogue(): Promise<CellType[]> {
  return CellType.findAll({
    order: [
      ['maker', 'ASC'],
      ['name', 'ASC'],
    ],
  });
}

/** @throws AppError notFound */
export async function findEntry(id: string, transaction?: Transaction): Promise<CellType> {
  const cellType = await CellType.findByPk(id, { transaction });
  if (!cellType) throw new AppError('notFound', 'There is no cell type under this name.');
  return cellType;
}

/**
 * The entry to change, as the moderator saw it.
 * @throws AppError notFound, versionConflict, conflict (no longer in the catalogue)
 */
export async function findOpenEntry(
  id: string,
  version: number,
  transaction: Transaction,
): Promise<CellType> {
  const cellType = await findEntry(id, transaction);
  if (cellType.version !== version) throw new AppError('versionConflict');
  if (cellType.closedAs === 'merged')
    throw new AppError('conflict', 'This cell type was merged into another one.');
  return cellType;
}

export async function findClaimsOf(cellTypeId: string, transaction?: Transaction): Promise<QuotedClaim[]> {
  return QuotedClaim.findAll({ where: { cellTypeId }, order: [['cycles', 'DESC']], transaction });
}

/** What depends on each cell type, or on one. */
export async function countDependents(
  db: Sequelize,
  { cellTypeId, transaction }: { cellTypeId?: string; transaction?: Transaction } = {},
): Promise<(id: string) => Dependents> {
  const where = cellTypeId === undefined ? '' : 'WHERE cellTypes.id = :cellTypeId';
  const [rows] = await db.query(
    `SELECT cellTypes.id,
       (SELECT COUNT(*) FROM banks WHERE banks.cellTypeId = cellTypes.id) AS banks,
       (SELECT COUNT(*) FROM quotedClaims WHERE quotedClaims.cellTypeId = cellTypes.id) AS claims,
       COALESCE(used.checks, 0) AS checks, COALESCE(used.approvedChecks, 0) AS approvedChecks
     FROM cellTypes LEFT JOIN (
       SELECT banks.cellTypeId, COUNT(*) AS checks, SUM(checks.state = 'approved') AS approvedChecks
       FROM checks JOIN banks ON banks.id = checks.bankId
       WHERE checks.state NOT IN ('draft', 'withdrawn') GROUP BY banks.cellTypeId
     ) AS used ON used.cellTypeId = cellTypes.id ${where}`,
    { replacements: { cellTypeId }, transaction },
  );
  const byId = new Map((rows as ({ id: string } & Dependents)[]).map(({ id, ...counts }) => [id, counts]));
  return (id) => byId.get(id) ?? none;
}

/** What happened to a cell type, the newest first. */
export async function findCellTypeTrail(id: string): Promise<TrailEntry[]> {
  return TrailEntry.findAll({ where: { subjectType: 'cellType', subjectId: id }, order: [['id', 'DESC']] });
}
