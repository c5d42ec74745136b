import type { Transaction } from 'sequelize';

import type { LoadedBank } from '../banks/queries';
import { fieldsOf } from '../checks/evaluateCheck';
import { Bank, BankEvent, CellType, Check, Finding, severityOrder } from '../db/models';
import type { Deps } from '../deps';
import { pooledBank, pooledCheck } from '../pool/approvedRows';
import { expectFromPool } from './expectFromPool';
import { poolResidual } from './rules/poolResidual';
import type { PoolExpectation, ScreenContext, ScreenFinding } from './screenTypes';
import { findWorkingPool, type WorkingPool } from './workingPool';

/** Banks screened anew in one transaction, so that others get their turn in between. */
const banksAtOnce = 100;
const screenedStates = ['submitted', 'sentBack', 'approved'] as const;

/**
 * Holds every check that is open or approved against the working fit in force: only what the pool says of it is made
 * anew, as nothing else follows from the fit. Approved checks get a finding where they lie far out, open ones always.
 * A real failure stays as it was marked. Safe to run again.
 */
export async function rescreenAfterRefit(deps: Deps): Promise<void> {
  const working = await findWorkingPool(deps);
  if (!working) return;
  const banks = await Bank.findAll({ attributes: ['id'], where: { bought: 'new' }, order: [['id', 'ASC']] });
  const ids = banks.map(({ id }) => id);
  for (let from = 0; from < ids.length; from += banksAtOnce) {
    await deps.db.transaction((transaction) =>
      rescreenBanks(working, ids.slice(from, from + banksAtOnce), transaction),
    );
  }
}

async function rescreenBanks(
  { model, setAside }: WorkingPool,
  ids: string[],
  transaction: Transaction,
): Promise<void> {
  const banks = (await Bank.findAll({
    where: { id: ids },
    include: [
      { model: CellType, as: 'cellType', attributes: ['ratedAh', 'nominalV'] },
      { model: BankEvent, as: 'events', separate: true, order: [['happenedOn', 'ASC']] },
    ],
    transaction,
  })) as LoadedBank[];
  const checks = await Check.findAll({
    where: { bankId: ids, state: screenedStates },
    include: [
      {
        model: Finding,
        as: 'findings',
        separate: true,
        attributes: ['id', 'checkId', 'rule', 'severity', 'evidence'],
      },
    ],
    order: [
      ['testedOn', 'ASC'],
      ['id', 'ASC'],
    ],
    transaction,
  });
  for (const bank of banks) {
    const ofBank = checks.filter(({ bankId }) => bankId === bank.id);
    const approved = ofBank.filter(
      ({ id, state, isRealFailure }) => state === 'approved' && !isRealFailure && !setAside.has(id),
    );
    for (const check of ofBank) {
      if (check.isRealFailure) continue;
      const others = approved.filter(({ id }) => id !== check.id).map(pooledCheck);
      const pool = expectFromPool(model, pooledBank(bank), { check: pooledCheck(check), others });
      const finding = poolResidual(contextOf(bank, check, ofBank, pool));
      const isKept = check.state !== 'approved' || finding?.severity !== 'fits';
      await putFinding(check, isKept ? finding : null, transaction);
    }
  }
}

/** As much of a check's context as the rule looks at. */
function contextOf(bank: LoadedBank, check: Check, ofBank: Check[], pool: PoolExpectation): ScreenContext {
  const { ratedAh: ratedAhCell, nominalV } = bank.cellType;
  const { parallel, series, firstUseMonth, events } = bank;
  return {
    bank: { parallel, series, ratedAhCell, nominalV, firstUseMonth, events },
    fields: fieldsOf(check),
    computed: check.computed,
    log: null,
    previousChecks: ofBank
      .filter(({ id }) => id !== check.id)
      .map((other) => ({
        ...{ checkId: other.id, testedOn: other.testedOn, state: other.state },
        ...{ fields: fieldsOf(other), computed: other.computed },
      })),
    sameLogCheckIds: [],
    pool,
  };
}

/** Puts the finding in the place of the one before, and the check under its worst; writes nothing where nothing changes. */
async function putFinding(
  check: Check,
  finding: ScreenFinding | null,
  transaction: Transaction,
): Promise<void> {
  const before = check.findings!.find(({ rule }) => rule === 'poolResidual');
  const severity = finding ? severityOrder.indexOf(finding.severity) : 0;
  const isSame = before
    ? finding !== null && before.severity === severity && before.evidence.t === finding.evidence.t
    : finding === null;
  if (!isSame) {
    if (before) await before.destroy({ transaction });
    if (finding) await Finding.create({ ...finding, checkId: check.id, severity }, { transaction });
  }
  const others = check.findings!.filter(({ rule }) => rule !== 'poolResidual').map((one) => one.severity);
  const worst = Math.max(severity, ...others);
  // Findings of checks long approved may have been thinned to remarks; their severity still stands.
  if (worst !== check.severity) await check.update({ severity: worst }, { transaction, silent: true });
}
