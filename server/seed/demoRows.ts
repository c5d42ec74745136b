import { cellTypes } from '@/data/demo/cellTypes';
import { claimsOf } from '@/data/demo/claims';
import { createDraws } from '@/data/demo/random';
import type { DemoBank } from '@/data/demo/types';
import { consent } from '@/lib/contract/consent';

import { severityOrder } from '../db/models';
import type { ScreenFinding } from '../moderation/screenTypes';
import type { ComputedDemoCheck } from './demoChecks';

const listedAt = new Date('2018-06-01T08:30:00Z');
const stamped = (at: Date) => ({ createdAt: at, updatedAt: at });

/** The catalogue: every cell type is listed. */
export function cellTypeRows() {
  return cellTypes.map(({ id, maker, name, format, ratedAh, nominalV, faceAreaMm2, massKg }) => ({
    ...{ id, maker, name, format, ratedAh, nominalV, faceAreaMm2, massKg },
    status: 'listed' as const,
    ...stamped(listedAt),
  }));
}

export function claimRows(seed: number) {
  const draws = createDraws(seed, 6);
  return cellTypes.flatMap((cellType) =>
    claimsOf(cellType).map((claim) => ({
      ...{ ...claim, id: draws.uuid(), cellTypeId: cellType.id },
      ...stamped(listedAt),
    })),
  );
}

export function bankRow({ id, ownerId, pseudonym, fields, createdAt }: DemoBank) {
  return { ...fields, id, ownerId, pseudonym, ...stamped(new Date(createdAt)) };
}

export function eventRows({ id: bankId, events }: DemoBank) {
  return events.map((event) => ({
    ...event,
    bankId,
    createdAt: new Date(`${event.happenedOn}T20:00:00Z`),
  }));
}

export function checkRow(bankId: string, { check, computed, severity }: ComputedDemoCheck) {
  const { id, idempotencyKey, fields, state, submittedAt, decidedAt } = check;
  const { ageYears, efc, sohFraction } = computed;
  return {
    ...{ ...fields, id, bankId, idempotencyKey, state, testedOn: fields.reading.testedOn },
    ...{ computed, ageYears, efc, sohFraction, severity },
    version: decidedAt === null ? 1 : 2,
    consentVersion: consent.version,
    submittedAt: new Date(submittedAt),
    // A question is no decision yet.
    decidedAt: decidedAt === null || state === 'sentBack' ? null : new Date(decidedAt),
    createdAt: new Date(submittedAt),
    updatedAt: new Date(decidedAt ?? submittedAt),
  };
}

/**
 * The findings of a check. Of checks long approved only the remarks are kept, as nothing else of them is looked up;
 * banks that people meet first keep all.
 */
export function findingRows({ check, findings }: ComputedDemoCheck, isKeptWhole: boolean) {
  const kept = isKeptWhole || check.state !== 'approved' ? findings : findings.filter(isRemark);
  return kept.map((finding) => ({
    ...finding,
    checkId: check.id,
    severity: severityOrder.indexOf(finding.severity),
    createdAt: new Date(check.submittedAt),
  }));
}

const isRemark = ({ severity }: ScreenFinding) => severity !== 'fits';
