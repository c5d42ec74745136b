import type { Transaction } from 'sequelize';

import type { CheckFields, Computed } from '@/lib/contract/checks';
import { computeCheck } from '@/lib/measure';

import type { LoadedBank } from '../banks/queries';
import { type Check, Finding, severityOrder, type Upload } from '../db/models';
import type { Deps } from '../deps';
import { findSurroundings } from '../moderation/findSurroundings';
import { screen, worstSeverity } from '../moderation/screen';
import type { ScreenFinding } from '../moderation/screenTypes';
import { findBareChecksOf, findSameLogCheckIds, standingStates } from './queries';

export interface Evaluation {
  computed: Computed;
  findings: ScreenFinding[];
  /** The columns of a check that follow from its fields. */
  columns: Pick<Check, 'computed' | 'ageYears' | 'efc' | 'sohFraction' | 'severity'>;
}

interface EvaluationRequest {
  bank: LoadedBank;
  fields: CheckFields;
  upload: Upload | null;
  /** Null for one not stored yet. */
  checkId: string | null;
  /** Now, for one not stored yet. */
  submittedAt?: Date;
  /** Of the file of earlier checks that one not stored yet stands in. */
  fileDigest?: string | null;
}

/** Computes and screens a check's fields against its bank, its log and the bank's other checks. */
export async function evaluateCheck(
  deps: Deps,
  { bank, fields, upload, checkId, submittedAt = deps.clock(), fileDigest = null }: EvaluationRequest,
  transaction: Transaction,
): Promise<Evaluation> {
  const log = upload?.result ?? null;
  const others = (await findBareChecksOf(bank.id, transaction)).filter(({ id }) => id !== checkId);
  const { ratedAh: ratedAhCell, nominalV } = bank.cellType;
  const { parallel, series, firstUseMonth, events } = bank;
  const described = { parallel, series, ratedAhCell, nominalV, firstUseMonth };
  const computed = computeCheck(fields, described, log, previousOf(fields, others));
  const screened = { bank, fields, computed, upload, checkId, fileDigest, submittedAt, others };
  const findings = screen({
    ...(await findSurroundings(deps, screened, transaction)),
    bank: { ...described, events },
    fields,
    computed,
    log,
    previousChecks: others.map((other) => ({
      checkId: other.id,
      testedOn: other.testedOn,
      state: other.state,
      fields: fieldsOf(other),
      computed: other.computed,
    })),
    sameLogCheckIds: upload ? await findSameLogCheckIds(upload.sha256, checkId, transaction) : [],
  });
  const { ageYears, efc, sohFraction } = computed;
  const severity = severityOrder.indexOf(worstSeverity(findings));
  return { computed, findings, columns: { computed, ageYears, efc, sohFraction, severity } };
}

/** The fields of a stored check, as they were entered. */
export function fieldsOf({ reading, conditions, uploadId, photoId, sources, note }: Check): CheckFields {
  return { reading, conditions, uploadId, photoId, sources, note };
}

/** Puts these findings in the place of those a check has. */
export async function replaceFindings(
  checkId: string,
  findings: ScreenFinding[],
  transaction: Transaction,
): Promise<void> {
  await Finding.destroy({ where: { checkId }, transaction });
  const rows = findings.map((finding) => ({
    ...finding,
    checkId,
    severity: severityOrder.indexOf(finding.severity),
  }));
  await Finding.bulkCreate(rows, { transaction });
}

/** The last check before this one that still stands: the conditions asked are those since then. */
function previousOf({ reading }: CheckFields, others: Check[]): { testedOn: string; efc: number } | null {
  const isStanding = ({ state, testedOn }: Check) =>
    standingStates.some((standing) => standing === state) && testedOn < reading.testedOn;
  return others.findLast(isStanding) ?? null;
}
