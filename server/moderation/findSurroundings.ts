import { Op, type Transaction } from 'sequelize';

import type { CheckFields, Computed } from '@/lib/contract/checks';

import type { LoadedBank } from '../banks/queries';
import { Bank, Check, LogCurve, Upload } from '../db/models';
import type { Deps } from '../deps';
import { pooledBank, pooledCheck } from '../pool/approvedRows';
import { curveOf, likenessOf, type LogCurve as Curve } from './curveLikeness';
import { expectFromPool } from './expectFromPool';
import type { AccountFacts, CurveLikeness, PhotoTwins, PoolExpectation, ScreenContext } from './screenTypes';
import { findWorkingPool } from './workingPool';

export interface ScreenedCheck {
  bank: LoadedBank;
  fields: CheckFields;
  computed: Computed;
  upload: Upload | null;
  /** Null for one not stored yet. */
  checkId: string | null;
  /** Of the file of earlier checks that one not stored yet stands in. */
  fileDigest: string | null;
  submittedAt: Date;
  /** The bank's other checks, in whatever state. */
  others: Check[];
}

const hourMs = 3_600_000;
const alikeWithinMs = 72 * hourMs;
/** Logs are compared with those whose durations differ by less. */
const durationWindow = 0.01;
/** Key of a check that is not stored yet. */
const unstored = 'new';

/** What the screening knows of a check from outside its bank: the pool, other logs, and its account as counts. */
export async function findSurroundings(
  deps: Deps,
  check: ScreenedCheck,
  transaction: Transaction,
): Promise<Pick<ScreenContext, 'pool' | 'nearestLog' | 'photo' | 'account'>> {
  return {
    pool: await findExpectation(deps, check),
    nearestLog: await findNearestLog(check, transaction),
    photo: await findPhotoTwins(check, transaction),
    account: await findAccountFacts(check, transaction),
  };
}

async function findExpectation(deps: Deps, check: ScreenedCheck): Promise<PoolExpectation | undefined> {
  const { bank, fields, computed, others } = check;
  // Of a bank bought used neither the start nor the age is known.
  if (bank.bought !== 'new') return undefined;
  const working = await findWorkingPool(deps);
  if (!working) return undefined;
  const { ageYears, efc } = computed;
  const { conditions, sources, reading } = fields;
  const columns = { testedOn: reading.testedOn, ageYears, efc, computed, conditions, sources };
  const approved = others
    .filter(
      ({ id, state, isRealFailure }) => state === 'approved' && !isRealFailure && !working.setAside.has(id),
    )
    .map(pooledCheck);
  return expectFromPool(working.model, pooledBank(bank), {
    check: pooledCheck({ ...columns, id: check.checkId ?? unstored, isRealFailure: false }),
    others: approved,
  });
}

async function findNearestLog(
  { upload }: ScreenedCheck,
  transaction: Transaction,
): Promise<CurveLikeness | undefined> {
  const curve = upload?.result ? curveOf(upload.result) : null;
  if (!upload || !curve) return undefined;
  await rememberCurve(upload.id, curve, transaction);
  const { durationS } = curve;
  const near = await LogCurve.findAll({
    where: {
      uploadId: { [Op.ne]: upload.id },
      durationS: { [Op.between]: [durationS * (1 - durationWindow), durationS * (1 + durationWindow)] },
    },
    transaction,
  });
  const likenesses = near.map((other) => likenessOf(curve, other.curve)).filter((found) => found !== null);
  return likenesses.sort((a, b) => distanceOf(a) - distanceOf(b))[0];
}

/** Orders likenesses: each part over what two tests of one bank differ by, roughly. */
const distanceOf = (likeness: CurveLikeness) =>
  likeness.voltageFraction / 0.0003 + (likeness.temperatureK ?? 0) + likeness.durationFraction / 0.005;

async function rememberCurve(uploadId: string, curve: Curve, transaction: Transaction): Promise<void> {
  await LogCurve.upsert({ uploadId, durationS: curve.durationS, curve }, { transaction });
}

async function findPhotoTwins(
  { fields: { photoId }, checkId }: ScreenedCheck,
  transaction: Transaction,
): Promise<PhotoTwins | undefined> {
  const photo = photoId === null ? null : await Upload.findByPk(photoId, { transaction });
  if (!photo) return undefined;
  const others = await Check.findAll({
    attributes: ['id', 'photoId'],
    where: {
      photoId: { [Op.not]: null },
      state: { [Op.ne]: 'withdrawn' },
      ...(checkId ? { id: { [Op.ne]: checkId } } : {}),
    },
    transaction,
  });
  const photos = await Upload.findAll({
    attributes: ['sha256', 'perceptualHash'],
    where: { id: others.map((other) => other.photoId!) },
    transaction,
  });
  const bits = photos.flatMap(({ perceptualHash: other }) =>
    other && photo.perceptualHash ? [differingBits(other, photo.perceptualHash)] : [],
  );
  return {
    same: photos.filter(({ sha256 }) => sha256 === photo.sha256).length,
    nearestBits: bits.length > 0 ? Math.min(...bits) : null,
  };
}

/** Bits in which two hexadecimal hashes differ. */
function differingBits(one: string, other: string): number {
  let rest = BigInt(`0x${one}`) ^ BigInt(`0x${other}`);
  let count = 0;
  for (; rest > 0n; rest >>= 1n) if (rest & 1n) count += 1;
  return count;
}

async function findAccountFacts(check: ScreenedCheck, transaction: Transaction): Promise<AccountFacts> {
  const { bank, checkId, fileDigest, submittedAt } = check;
  const stored = await Check.findAll({
    attributes: ['id', 'fileDigest'],
    where: { submittedAt: { [Op.gt]: new Date(submittedAt.getTime() - hourMs), [Op.lte]: submittedAt } },
    include: [{ model: Bank, as: 'bank', attributes: [], where: { ownerId: bank.ownerId }, required: true }],
    raw: true,
    transaction,
  });
  // The checks of one file were sent in one go.
  const sent = new Set(stored.map((one) => one.fileDigest ?? one.id));
  if (checkId === null) sent.add(fileDigest ?? unstored);
  return { submittedInHour: sent.size, alikeAccounts: await countAlike(check, transaction) };
}

/** Without limits that were set by hand too many banks are alike. */
async function countAlike(
  { bank, fields, submittedAt }: ScreenedCheck,
  transaction: Transaction,
): Promise<number> {
  const { ownerId, cellTypeId, parallel, series } = bank;
  const { chargeLimitV, dischargeLimitV, bmsHighTripV, bmsLowTripV } = bank;
  if (chargeLimitV === null || dischargeLimitV === null) return 0;
  const at = submittedAt.getTime();
  const makeUp = { cellTypeId, parallel, series, chargeLimitV, dischargeLimitV, bmsHighTripV, bmsLowTripV };
  const checks = await Check.findAll({
    attributes: ['reading'],
    where: {
      submittedAt: { [Op.between]: [new Date(at - alikeWithinMs), new Date(at + alikeWithinMs)] },
      state: { [Op.ne]: 'withdrawn' },
    },
    include: [
      {
        model: Bank,
        as: 'bank',
        attributes: ['ownerId'],
        where: { ...makeUp, ownerId: { [Op.ne]: ownerId } },
        required: true,
      },
    ],
    transaction,
  });
  const { instrument, gainErrorFraction } = fields.reading;
  const alike = checks.filter(
    ({ reading }) =>
      reading.instrument.toLowerCase() === instrument.toLowerCase() &&
      reading.gainErrorFraction === gainErrorFraction,
  );
  return new Set(alike.map((other) => other.bank!.ownerId)).size;
}
