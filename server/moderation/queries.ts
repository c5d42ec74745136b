import { col, fn, literal, Op, type Sequelize, type Transaction, type WhereOptions } from 'sequelize';

import type { CheckState } from '@/lib/contract/checks';

import {
  Bank,
  BankEvent,
  CellType,
  Check,
  Decision,
  Finding,
  Proposal,
  TrailEntry,
  TrailText,
  Upload,
} from '../db/models';
import type { Deps } from '../deps';
import type { Cursor } from './cursor';

type QueueBank = Bank & { cellType: CellType };
export type QueuedCheck = Check & { bank: QueueBank; findings: Finding[] };
export type LoadedSubmission = Check & {
  bank: QueueBank & { events: BankEvent[] };
  findings: Finding[];
  upload: Upload | null;
};

/** Drafts are their owners' alone. */
const notDraft = { state: { [Op.ne]: 'draft' } } as const;

export type DecidableCheck = Check & { bank: QueueBank & { events: BankEvent[] }; upload: Upload | null };

export interface QueueFilters {
  state: CheckState;
  /** Index into severityOrder. */
  severity?: number;
  cellType?: string;
  rule?: string;
}

interface QueuePage extends QueueFilters {
  /** Checks that the reader is to look at blind. */
  hidden: ReadonlySet<string>;
  after: Cursor | null;
  limit: number;
}

/** A page of the queue, worst first, then oldest first; one more than asked where there is a next page. */
export async function findQueue(
  db: Sequelize,
  { after, limit, hidden, ...filters }: QueuePage,
): Promise<QueuedCheck[]> {
  const { cellType } = filters;
  const checks = await Check.findAll({
    where: {
      [Op.and]: [
        ...wheresOf(db, filters),
        ...(hidden.size > 0 ? [{ id: { [Op.notIn]: [...hidden] } }] : []),
        ...(after ? [laterThan(after)] : []),
      ],
    },
    include: [
      {
        model: Bank,
        as: 'bank',
        required: true,
        ...(cellType === undefined ? {} : { where: { cellTypeId: cellType } }),
        include: [{ model: CellType, as: 'cellType' }],
      },
      {
        model: Finding,
        as: 'findings',
        separate: true,
        attributes: ['checkId', 'rule', 'title', 'severity'],
      },
    ],
    attributes: ['id', 'bankId', 'state', 'version', 'severity', 'submittedAt'],
    order: [
      ['severity', 'DESC'],
      ['submittedAt', 'ASC'],
      ['id', 'ASC'],
    ],
    limit: limit + 1,
  });
  return checks as QueuedCheck[];
}

function wheresOf(db: Sequelize, { state, severity, rule }: QueueFilters): WhereOptions<Check>[] {
  return [
    { state },
    notDraft,
    ...(severity === undefined ? [] : [{ severity }]),
    ...(rule === undefined
      ? []
      : [
          {
            id: {
              [Op.in]: literal(
                `(SELECT checkId FROM findings WHERE severity > 0 AND rule = ${db.escape(rule)})`,
              ),
            },
          },
        ]),
  ];
}

interface Facets {
  severities: { severity: number; count: number }[];
  cellTypes: { id: string; name: string; count: number }[];
  rules: { rule: string; count: number }[];
}

/** Facets help to choose a filter; those of a moment ago do, and are not counted anew for each filter. */
const facetsMs = 5_000;
const facetsByState = new WeakMap<Sequelize, Map<CheckState, { at: number; facets: Promise<Facets> }>>();

/** What the checks of a state can be filtered by, with how many there are of each. */
export async function findFacets({ db, clock }: Deps, state: CheckState): Promise<Facets> {
  const known = facetsByState.get(db) ?? new Map();
  facetsByState.set(db, known);
  const at = clock().getTime();
  const last = known.get(state);
  if (last && Math.abs(at - last.at) < facetsMs) return last.facets;
  const facets = countFacets(db, state);
  known.set(state, { at, facets });
  facets.catch(() => known.delete(state));
  return facets;
}

async function countFacets(db: Sequelize, state: CheckState): Promise<Facets> {
  const select = <Row extends object>(sql: string) =>
    db.query(sql, { replacements: { state }, raw: true }).then(([rows]) => rows as Row[]);
  const [severities, cellTypes, rules] = await Promise.all([
    select<Facets['severities'][number]>(
      `SELECT severity, COUNT(*) AS count FROM checks WHERE state = :state AND state <> 'draft' GROUP BY severity`,
    ),
    select<Facets['cellTypes'][number]>(
      `SELECT cellTypes.id, cellTypes.name, COUNT(*) AS count FROM checks
       JOIN banks ON banks.id = checks.bankId JOIN cellTypes ON cellTypes.id = banks.cellTypeId
       WHERE checks.state = :state AND checks.state <> 'draft' GROUP BY cellTypes.id ORDER BY cellTypes.name`,
    ),
    select<Facets['rules'][number]>(
      // The planner would go check by check; the index holds just the findings that say something.
      `SELECT rule, COUNT(*) AS count FROM findings INDEXED BY findingsByRule
       WHERE severity > 0 AND checkId IN (SELECT id FROM checks WHERE state = :state AND state <> 'draft')
       GROUP BY rule ORDER BY count DESC, rule`,
    ),
  ]);
  return { severities, cellTypes, rules };
}

function laterThan({ severity, submittedAt, checkId }: Cursor): WhereOptions<Check> {
  return {
    [Op.or]: [
      { severity: { [Op.lt]: severity } },
      { severity, submittedAt: { [Op.gt]: submittedAt } },
      { severity, submittedAt, id: { [Op.gt]: checkId } },
    ],
  };
}

/** How many checks are in each state. */
export async function countByState(): Promise<Partial<Record<CheckState, number>>> {
  const rows = (await Check.findAll({
    attributes: ['state', [fn('COUNT', col('id')), 'count']],
    where: notDraft,
    group: ['state'],
    raw: true,
  })) as unknown as { state: CheckState; count: number }[];
  return Object.fromEntries(rows.map(({ state, count }) => [state, count]));
}

/** A submission with everything its page shows, or null; a draft is none. */
export async function findSubmission(checkId: string): Promise<LoadedSubmission | null> {
  const check = await Check.findOne({
    where: { id: checkId, ...notDraft },
    include: [
      {
        model: Bank,
        as: 'bank',
        include: [
          { model: CellType, as: 'cellType' },
          { model: BankEvent, as: 'events' },
        ],
      },
      { model: Finding, as: 'findings' },
      { model: Upload, as: 'upload' },
    ],
  });
  return check as LoadedSubmission | null;
}

/** The checks of a bank that were ever submitted, in order of their day. */
export async function findHistory(bankId: string): Promise<Check[]> {
  return Check.findAll({
    where: { bankId, ...notDraft },
    order: [
      ['testedOn', 'ASC'],
      ['submittedAt', 'ASC'],
    ],
  });
}

/** The trail of a check, oldest first. */
export async function findTrail(checkId: string): Promise<TrailEntry[]> {
  return TrailEntry.findAll({
    where: { subjectType: 'check', subjectId: checkId },
    include: [{ model: TrailText, as: 'texts', separate: true }],
    order: [['id', 'ASC']],
  });
}

/** The check to decide on, with its bank; null where there is none. */
export async function findDecidable(
  checkId: string,
  transaction: Transaction,
): Promise<DecidableCheck | null> {
  const check = await Check.findOne({
    where: { id: checkId, ...notDraft },
    include: [
      {
        model: Bank,
        as: 'bank',
        include: [
          { model: CellType, as: 'cellType' },
          { model: BankEvent, as: 'events' },
        ],
      },
      { model: Upload, as: 'upload' },
    ],
    transaction,
  });
  return check as DecidableCheck | null;
}

/** The moderator's last decision on a check, while it can be undone. */
export async function findUndoable(checkId: string, moderatorId: string, at: Date): Promise<Decision | null> {
  const decision = await Decision.findOne({ where: { checkId }, order: [['version', 'DESC']] });
  const isOpen = decision && !decision.undoneAt && decision.takesEffectAt > at;
  return isOpen && decision.moderatorId === moderatorId ? decision : null;
}

/** Of some checks, those that a moderator wants turned away or recalled. */
export async function findProposed(checkIds: string[]): Promise<Set<string>> {
  const proposals = await Proposal.findAll({ attributes: ['checkId'], where: { checkId: checkIds } });
  return new Set(proposals.map(({ checkId }) => checkId));
}
