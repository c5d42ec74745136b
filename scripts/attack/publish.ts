import type { Evidence } from '@/lib/contract/cells';
import type { ToldEvidence } from '@/lib/contract/counts';
import { holdBackChanges, holdBackRests } from '@/server/fits/holdBackChanges';
import type { View } from '@/server/fits/fitOutput';
import { stratifiedViews } from '@/server/fits/publicOutput';
import { planStep, publicBanks } from '@/server/pool/planStep';
import type { PublicPoolMember } from '@/server/pool/poolRow';
import type { PublicBank } from '@/server/publicView/bankRows';
import { inCanonicalOrder } from '@/server/publicView/canonicalOrder';
import { type NamedBank, nameBanks } from '@/server/publicView/nameBanks';
import { planRelease } from '@/server/publicView/planRelease';
import type { Protections } from '@/server/publicView/protections';
import { tellEvidence } from '@/server/publicView/tellCounts';

import type { PoolHistory } from './randomPool';

/** What the exchange shows at one time. Names of banks and owners are in it for the judge, not for the visitor. */
export interface Shown {
  release: NamedBank[];
  views: (View & { told: ToldEvidence | null })[];
}

/** Whom a view tells of does not hang on its curve, and curves take long. */
const noCurve = () => ({ ok: false, reason: 'noFade' }) as const;

/** Names moderators know the banks by. */
export type ModeratorNames = ReadonlyMap<string, string>;

/** Plays the exchange over a pool's history, by the product's own functions. */
export function publish(history: PoolHistory, protections: Protections) {
  const moderatorNames: ModeratorNames = new Map(
    [...new Set(history.flat().map(({ row }) => row.bank))].map((bank, i) => [
      bank,
      `M${String(i).padStart(4, '0')}`,
    ]),
  );
  const shown: Shown[] = [];
  let members: PublicPoolMember[] = [];
  let released: PublicBank[] = [];
  let views: View[] = [];
  for (const approved of history) {
    for (let step = planStep(approved, members, protections); step; step = next()) {
      const replaced = new Set([...step.remove, ...step.put.map(({ checkId }) => checkId)]);
      members = [...members.filter(({ checkId }) => !replaced.has(checkId)), ...step.put];
    }
    const pool = publicBanks(members);
    const rows = inCanonicalOrder(pool, protections).flatMap(({ checks }) => checks.map(({ row }) => row));
    const fresh = stratifiedViews(rows, { fit: noCurve }, protections);
    const held = protections.isHeldBack ? holdBackChanges(fresh, views) : fresh;
    views = protections.isComplementKept ? holdBackRests(held) : held;
    released = planRelease(pool, released, protections).banks;
    shown.push({
      release: nameBanks(inCanonicalOrder(released, protections), moderatorNames, protections),
      views: views.map((view) => ({ ...view, told: told(view.evidence) })),
    });

    function next() {
      return planStep(approved, members, protections);
    }
  }
  return { shown, moderatorNames };

  function told(evidence: Evidence | null): ToldEvidence | null {
    return evidence && tellEvidence(evidence, protections);
  }
}
