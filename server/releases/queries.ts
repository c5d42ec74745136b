import { Release, ReleaseBank, ReleaseFile } from '../db/models';
import type { PublicBank } from '../publicView/bankRows';

export const findLastRelease = (): Promise<Release | null> =>
  Release.findOne({ order: [['number', 'DESC']] });

/** What stands in a release, bank by bank. */
export async function findReleasedBanks(number: number): Promise<PublicBank[]> {
  const banks = await ReleaseBank.findAll({ where: { number } });
  return banks.map(({ bankId, ownerId, identity, level, rows }) => ({
    ...{ bank: bankId, owner: ownerId, identity, level, checks: rows },
  }));
}

/** Releases with their files, newest first. */
export async function findReleases(): Promise<{ release: Release; files: ReleaseFile[] }[]> {
  const [releases, files] = await Promise.all([
    Release.findAll({ order: [['number', 'DESC']] }),
    ReleaseFile.findAll({ order: [['name', 'ASC']] }),
  ]);
  return releases.map((release) => ({
    release,
    files: files.filter(({ number }) => number === release.number),
  }));
}

export const findRelease = (number: number): Promise<Release | null> => Release.findByPk(number);

export const findReleaseFile = (number: number, name: string): Promise<ReleaseFile | null> =>
  ReleaseFile.findOne({ where: { number, name } });
