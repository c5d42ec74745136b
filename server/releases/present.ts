import type { Release as ReleaseContract } from '@/lib/contract/releases';

import type { Release, ReleaseFile } from '../db/models';
import { tellEvidence } from '../publicView/tellCounts';
import { citationOf } from './texts';

/** A release as everyone sees it. */
export function presentRelease({
  release,
  files,
}: {
  release: Release;
  files: readonly ReleaseFile[];
}): ReleaseContract {
  const { number, publishedOn, note, codeVersion, dataSha256, changes, figures, owners, banks, checks } =
    release;
  return {
    ...{ number, publishedOn, note, codeVersion, dataSha256, changes, figures },
    evidence: tellEvidence({ owners, banks, checks }),
    citation: citationOf(release),
    files: files.map(({ name, type, bytes, sha256 }) => ({ name, type, bytes, sha256 })),
  };
}
