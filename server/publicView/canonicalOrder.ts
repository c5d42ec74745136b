import type { PoolCheck } from '@/lib/fit/poolCheck';

import { generalise, identityKey, type PublishedIdentity } from './identity';
import type { PublicBank } from './bankRows';
import { publishedRow, rowLine } from './publishedRow';
import type { Protections } from './protections';

/** A bank as it is published, before it gets a name. */
export interface OrderedBank {
  bank: string;
  owner: string;
  identity: PublishedIdentity;
  level: number;
  checks: { checkId: string; row: PoolCheck }[];
}

/**
 * Banks with their rows as published, in an order made from what they say alone: by cell type, class and rows. So the
 * order tells nothing of whose they are, and the same pool is the same file and the same fit, to the last digit.
 */
export function inCanonicalOrder(banks: readonly PublicBank[], protections: Protections): OrderedBank[] {
  const keyed = banks.map((bank) => {
    const identity = generalise(bank.identity, bank.level);
    const checks = bank.checks
      .map(({ checkId, row }) => ({ checkId, row: publishedRow(row, identity.cellType, protections) }))
      .map((check) => ({ ...check, line: rowLine(check.row) }))
      .sort((a, b) => a.row.ageYears - b.row.ageYears || compare(a.line, b.line));
    // First what the fit goes by, so that a coarser telling of the same rows has the same order.
    const key = [identity.cellType, ...checks.map(({ line }) => line), identityKey(identity)].join('\n');
    return {
      key: protections.isShuffled ? key : `${identity.cellType}|${bank.owner}`,
      bank: { bank: bank.bank, owner: bank.owner, identity, level: bank.level, checks },
    };
  });
  return keyed
    .sort((a, b) => compare(a.key, b.key))
    .map(({ bank }) => ({
      ...bank,
      checks: bank.checks.map(({ checkId, row }) => ({ checkId, row })),
    }));
}

/** By code units: the same on every machine. */
const compare = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0);
