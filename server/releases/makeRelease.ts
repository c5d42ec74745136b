import { resolve } from 'node:path';

import type { Transaction } from 'sequelize';

import type { ReleaseChanges } from '@/lib/contract/releases';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { Bank, Release, ReleaseBank, ReleaseFile, User } from '../db/models';
import type { Deps } from '../deps';
import { codeVersion } from '../fits/codeVersion';
import type { JobHandler } from '../jobs/JobRunner';
import { createWorkerPool } from '../jobs/workerPool';
import { linkBase } from '../mail/linkBase';
import { queueNotice } from '../mail/queueNotice';
import { publicBanks } from '../pool/planStep';
import { publicMembers } from '../pool/publicMembers';
import type { Change } from '../publicView/admitChanges';
import type { PublicBank } from '../publicView/bankRows';
import { inCanonicalOrder } from '../publicView/canonicalOrder';
import { type NamedBank, nameBanks, releaseRows } from '../publicView/nameBanks';
import { planRelease } from '../publicView/planRelease';
import { protections } from '../publicView/protections';
import { insertMany } from '../seed/insertMany';
import { appendTrail } from '../trail/appendTrail';
import { findLastRelease, findReleasedBanks } from './queries';
import type { ReleaseOutcome, ReleaseTask } from './releaseTask';
import {
  changelogText,
  citationOf,
  dictionaryJson,
  dictionaryText,
  licenceText,
  readmeText,
  type ReleaseFacts,
} from './texts';
import { createReleaseWriter, csvLines, jsonLines, type WrittenFile } from './writeFiles';

/** A fit of a hundred times today's pool ends long before. */
const timeoutMs = 600_000;

type RunTask = (task: ReleaseTask) => Promise<ReleaseOutcome>;

/**
 * Job: makes the next release. Its files are written first; one transaction then takes them in with the release, so a
 * kill leaves no half release, and a second run finds nothing new and ends.
 */
export function createMakeRelease(deps: Deps): { handler: JobHandler; close: () => Promise<void> } {
  const pool = createWorkerPool(resolve(__dirname, 'releaseWorker.ts'), deps.logger);
  const runTask: RunTask = async (task) =>
    (await pool.run(task, { signal: AbortSignal.timeout(timeoutMs) })) as ReleaseOutcome;
  return {
    handler: ({ note, userId }) => makeRelease(deps, runTask, { note: String(note), userId: String(userId) }),
    close: () => pool.close(),
  };
}

interface Request {
  note: string;
  userId: string;
}

async function makeRelease(deps: Deps, runTask: RunTask, request: Request): Promise<void> {
  const { clock, storage } = deps;
  const last = await findLastRelease();
  const plan = planRelease(
    publicBanks(await publicMembers()),
    last ? await findReleasedBanks(last.number) : [],
  );
  if (plan.changes.length === 0) return;
  const identityOf = new Map(plan.banks.map((bank) => [bank.bank, bank]));
  const named = nameBanks(inCanonicalOrder(plan.banks, protections), await takenNames(last), protections);
  const writer = createReleaseWriter(storage.incomingDir);
  try {
    const csv = await writer.lines('checks.csv', csvLines(releaseRows(named)));
    const outcome = await runTask({ rows: fitRows(named), sha256: csv.sha256 });
    if (!outcome.ok) throw new Error(`the fit of the release failed: ${outcome.reason}`);
    const at = clock();
    const facts: ReleaseFacts = {
      number: (last?.number ?? 0) + 1,
      publishedOn: at.toISOString().slice(0, 10),
      ...{ note: request.note, codeVersion },
      banks: named.length,
      checks: named.reduce((sum, { checks }) => sum + checks.length, 0),
      changes: countChanges(plan.changes),
      figures: outcome.figures,
      figuresBefore: last?.figures ?? null,
    };
    await writer.lines('checks.jsonl', jsonLines(releaseRows(named)));
    await writeTexts(writer, facts, outcome.fitJson);
    await writer.archive(`ebbline-release-${facts.number}.zip`, `ebbline-release-${facts.number}`, at);
    const kept = await keepFiles(deps, writer.files);
    const owners = new Set(named.map(({ owner }) => owner)).size;
    await deps.db.transaction(async (transaction) => {
      const { number, publishedOn, note, banks, checks, changes, figures } = facts;
      await Release.create(
        {
          number,
          publishedOn,
          note,
          codeVersion,
          owners,
          banks,
          checks,
          changes,
          figures,
          dataSha256: csv.sha256,
          createdAt: at,
        },
        { transaction },
      );
      await ReleaseFile.bulkCreate(
        kept.map(({ path: _path, ...file }) => ({ number, ...file })),
        { transaction },
      );
      await insertMany(
        ReleaseBank,
        named.map((bank) => asReleased(number, bank, identityOf.get(bank.bank)!)),
        transaction,
      );
      await appendTrail(
        {
          actor: { userId: request.userId, role: 'steward' },
          at,
          subjectType: 'release',
          subjectId: String(number),
          action: 'released',
          details: { banks, checks, changes, dataSha256: csv.sha256, note },
        },
        transaction,
      );
      await tellFollowers(deps, facts, transaction);
    });
  } finally {
    await writer.clear();
  }
}

async function writeTexts(
  writer: ReturnType<typeof createReleaseWriter>,
  facts: ReleaseFacts,
  fitJson: string,
): Promise<void> {
  await writer.text('dictionary.md', dictionaryText());
  await writer.text('dictionary.json', dictionaryJson());
  await writer.text('fit.json', fitJson);
  await writer.text('changelog.md', changelogText(facts));
  await writer.text('readme.md', readmeText(facts));
  await writer.text('licence.txt', licenceText);
  await writer.text('citation.txt', `${citationOf(facts)}\n`);
  const sums = writer.files.map(({ name, sha256 }) => `${sha256}  ${name}\n`).join('');
  await writer.text('SHA256SUMS', sums);
}

async function keepFiles({ storage }: Deps, files: readonly WrittenFile[]) {
  const kept: (WrittenFile & { storageKey: string })[] = [];
  for (const file of files) kept.push({ ...file, storageKey: await storage.save(file.path) });
  return kept;
}

/** Rows as the command line reads them from the file: a bank is its own owner there. */
const fitRows = (named: readonly NamedBank[]): PoolCheck[] =>
  named.flatMap(({ name, checks }) =>
    checks.map(({ row }): PoolCheck => ({
      ...row,
      ...{ bank: name, owner: name },
      isClampingUnclear: undefined,
      isKept: row.isKept || undefined,
      hasFailed: row.hasFailed || undefined,
    })),
  );

function asReleased(number: number, { name, bank, owner, checks, level }: NamedBank, source: PublicBank) {
  return {
    number,
    pseudonym: name,
    bankId: bank,
    ownerId: owner,
    identity: source.identity,
    level,
    rows: checks,
  };
}

/** Names that must not come again: the moderators', and those of the release before. */
async function takenNames(last: Release | null): Promise<Map<string, string>> {
  const banks = await Bank.findAll({ attributes: ['id', 'pseudonym'], raw: true });
  const names = new Map(banks.map(({ id, pseudonym }) => [id, pseudonym]));
  if (!last) return names;
  const released = await ReleaseBank.findAll({
    where: { number: last.number },
    attributes: ['pseudonym'],
    raw: true,
  });
  for (const { pseudonym } of released) names.set(`released ${pseudonym}`, pseudonym);
  return names;
}

export function countChanges(changes: readonly Change[]): ReleaseChanges {
  const count = (kinds: readonly string[]) => changes.filter(({ kind }) => kinds.includes(kind)).length;
  return { came: count(['came']), left: count(['left']), changed: count(['gained', 'changed']) };
}

async function tellFollowers(
  deps: Deps,
  { number, note }: ReleaseFacts,
  transaction: Transaction,
): Promise<void> {
  const followers = await User.findAll({ where: { noticeReleases: true, erasedAt: null }, transaction });
  for (const user of followers) {
    const text = `Release ${number} of the pool is out.\n\n${note}\n\n${linkBase(deps.config.publicUrl)}/data`;
    const subject = `Release ${number} of the pool`;
    await queueNotice(
      deps,
      user,
      { kind: 'releases', subject, text, onceKey: `release ${number} ${user.id}` },
      transaction,
    );
  }
}
