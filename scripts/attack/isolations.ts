import { minimumOwners } from '@/lib/contract/limits';
import { bandsByLever } from '@/lib/fit';
import type { View } from '@/server/fits/fitOutput';
import { groupBy } from '@/server/publicView/bankRows';
import { identityKey } from '@/server/publicView/identity';
import type { NamedBank } from '@/server/publicView/nameBanks';
import { rowSteps, type RoundedField } from '@/server/publicView/publishedRow';
import { isEnough, protections } from '@/server/publicView/protections';

import type { ModeratorNames, Shown } from './publish';

/** Something a visitor found that the threat model rules out. */
export interface Isolation {
  attack: string;
  what: string;
}

/** Every attack on what was shown, judged by who really stands behind it and by the rule of the product. */
export function findIsolations(shown: readonly Shown[], names: ModeratorNames): Isolation[] {
  return [
    ...shown.flatMap(({ release }) => [...thinClasses(release), ...finerThanPromised(release)]),
    ...shown.flatMap(({ release }) => neighbours(release)),
    ...shown.flatMap(({ views }) => [...thinViews(views), ...hiddenRests(views), ...exactCounts(views)]),
    ...pairs(shown).flatMap(([one, two]) => [
      ...releaseDifferences(one.release, two.release),
      ...viewDifferences(one.views, two.views),
    ]),
    ...linkedNames(shown, names),
  ];
}

const pairs = <T>(items: readonly T[]): [T, T][] =>
  items.slice(1).map((item, i): [T, T] => [items[i]!, item]);

const owned = (banks: readonly NamedBank[]) =>
  banks.map(({ owner, checks }) => ({ owner, weight: checks.length }));

/** Looks for a bank by what somebody who knows it knows. */
function thinClasses(release: readonly NamedBank[]): Isolation[] {
  return [...groupBy(release, ({ identity }) => identityKey(identity))].flatMap(([key, banks]) =>
    isEnough(owned(banks), protections) ? [] : [{ attack: 'rows of a class', what: key }],
  );
}

/** Dates a check, or matches figures, closer than the field policy promises. */
function finerThanPromised(release: readonly NamedBank[]): Isolation[] {
  const fields = Object.keys(rowSteps) as RoundedField[];
  return fields.flatMap((field) => {
    const { step, decimals } = rowSteps[field];
    const isCoarse = release.every(({ checks }) =>
      checks.every(({ row }) => {
        const value = row[field];
        return value === Number((Math.round(value / step) * step).toFixed(decimals));
      }),
    );
    return isCoarse ? [] : [{ attack: 'finer than promised', what: field }];
  });
}

/** Guesses that neighbours in the file are one owner's: told when all owners of several like banks stand together. */
function neighbours(release: readonly NamedBank[]): Isolation[] {
  const place = new Map(release.map(({ name }, i) => [name, i]));
  const several = [
    ...groupBy(release, ({ owner, identity }) => `${owner}|${identity.cellType}`).values(),
  ].filter(({ length }) => length > 1);
  const together = several.filter((banks) => {
    const places = banks.map(({ name }) => place.get(name)!);
    return Math.max(...places) - Math.min(...places) === banks.length - 1;
  });
  const isTold = several.length > 3 && together.length === several.length;
  return isTold ? [{ attack: 'order of the rows', what: `${several.length} owners of several banks` }] : [];
}

type SeenView = Shown['views'][number];

const ownersOf = (view: View) => Object.keys(view.owners);

/** Looks for a curve, dots or a count of few. */
function thinViews(views: readonly SeenView[]): Isolation[] {
  return views.flatMap((view) =>
    view.told && ownersOf(view).length < minimumOwners
      ? [{ attack: 'curve or dots of few', what: nameOf(view) }]
      : [],
  );
}

const nameOf = ({ cellType, bandKey }: View) => `${cellType} ${bandKey ?? 'whole'}`;

/** Subtracts the bands that are shown from their whole. */
function hiddenRests(views: readonly SeenView[]): Isolation[] {
  const wholes = views.filter(({ bandKey, told }) => bandKey === null && told);
  return wholes.flatMap((whole) =>
    Object.entries(bandsByLever).flatMap(([lever, bands]) => {
      const shown = views.filter(
        (view) =>
          view.cellType === whole.cellType && view.told && bands.some(({ key }) => key === view.bandKey),
      );
      if (shown.length === 0) return [];
      // Whose dots are left when those of the parts are taken from those of the whole.
      const left = Object.keys(whole.counts).filter(
        (owner) => whole.counts[owner] !== shown.reduce((sum, { counts }) => sum + (counts[owner] ?? 0), 0),
      );
      const isFew = left.length > 0 && left.length < minimumOwners;
      return isFew ? [{ attack: 'whole less its parts', what: `${nameOf(whole)} by ${lever}` }] : [];
    }),
  );
}

function exactCounts(views: readonly SeenView[]): Isolation[] {
  return views.flatMap((view) =>
    view.told && Object.values(view.told).some((count) => typeof count === 'number' && count < 20)
      ? [{ attack: 'exact small count', what: nameOf(view) }]
      : [],
  );
}

/** Watches one curve from one time to the next. */
function viewDifferences(before: readonly SeenView[], after: readonly SeenView[]): Isolation[] {
  return after.flatMap((view) => {
    const was = before.find((one) => nameOf(one) === nameOf(view));
    if (!view.told && !was?.told) return [];
    const then = was?.told ? was.owners : {};
    const now = view.told ? view.owners : {};
    const changed = Object.keys({ ...then, ...now }).filter((owner) => then[owner] !== now[owner]);
    const isFew = changed.length > 0 && changed.length < minimumOwners;
    return isFew ? [{ attack: 'curve before and after', what: nameOf(view) }] : [];
  });
}

/**
 * Joins two releases by the values of their rows, and looks for the bank that came, left or was checked in between. The
 * judge grants the visitor that every match is right.
 */
function releaseDifferences(before: readonly NamedBank[], after: readonly NamedBank[]): Isolation[] {
  const then = new Map(before.map((bank) => [bank.bank, bank]));
  const now = new Map(after.map((bank) => [bank.bank, bank]));
  const changes = [...new Set([...then.keys(), ...now.keys()])].flatMap((bank) => {
    const [was, is] = [then.get(bank), now.get(bank)];
    const kind = !was ? 'came' : !is ? 'left' : kindOf(was, is);
    // The finer of the two tellings of its identity.
    const telling = was && is ? (was.level < is.level ? was : is) : (is ?? was)!;
    return kind ? [{ key: `${kind} ${identityKey(telling.identity)}`, bank: (is ?? was)! }] : [];
  });
  return [...groupBy(changes, ({ key }) => key)].flatMap(([key, group]) =>
    isEnough(owned(group.map(({ bank }) => bank)), { ...protections, maxOwnerShare: 1 })
      ? []
      : [{ attack: 'one release and the next', what: key }],
  );
}

function kindOf(was: NamedBank, is: NamedBank): string | null {
  const [then, now] = [was, is].map(({ checks }) =>
    checks.map(({ row }) => JSON.stringify({ ...row, cellType: '' })).sort(),
  );
  if (then!.join() === now!.join()) return was.level === is.level ? null : 'told more exactly';
  return then!.every((line) => now!.includes(line)) ? 'checked again' : 'changed';
}

/** Finds a name again: of another release, or of the moderators. */
function linkedNames(shown: readonly Shown[], moderatorNames: ModeratorNames): Isolation[] {
  const known = new Set(moderatorNames.values());
  return shown.flatMap(({ release }) =>
    release
      .filter(({ name }) => known.has(name))
      .slice(0, 1)
      .map(({ name }) => ({ attack: 'names', what: `${name} is the moderators’` })),
  );
}
