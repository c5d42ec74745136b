import { asOwned, classOf, groupBy, linesOf, type PublicBank } from './bankRows';
import { generalise } from './identity';
import { isEnough, type Protections } from './protections';

/** What became of a bank since it was last published, as far as anyone can see. */
export type ChangeKind = 'came' | 'left' | 'gained' | 'changed';

export interface Change {
  kind: ChangeKind;
  /** Null where there is none: a bank that came has no before, one that left no after. */
  before: PublicBank | null;
  after: PublicBank | null;
}

export interface Admitted {
  banks: PublicBank[];
  admitted: Change[];
  held: Change[];
}

/** The changes among which one of them would be looked for. */
export type Grouping = (change: Change) => string;

/**
 * Of rows: who knows that a bank came, left or was checked again in between looks among those of its class of which the
 * same can be seen.
 */
export const byClass: Grouping = ({ kind, before, after }) =>
  [kind, before && classOf(before), after && classOf(after)].join('>');

/** Of curves and dots: nothing is told of a bank but its cell type, and whether dots came or went. */
export const byCellType: Grouping = ({ kind, before, after }) => {
  const cellTypes = [before, after].map((bank) => bank && generalise(bank.identity, bank.level).cellType);
  return [kind === 'came' || kind === 'gained' ? 'more' : 'less', ...new Set(cellTypes.filter(Boolean))].join(
    '>',
  );
};

/**
 * What of the difference between two states may be published: changes of one group go together, when they concern
 * enough owners, or not at all. A class too small after that goes too.
 */
export function admitChanges(
  now: readonly PublicBank[],
  published: readonly PublicBank[],
  { groupOf, protections }: { groupOf: Grouping; protections: Protections },
): Admitted {
  const changes = changesBetween(now, published, protections);
  const admitted: Change[] = [];
  const held: Change[] = [];
  for (const group of groupBy(changes, groupOf).values())
    (!protections.isHeldBack || isSafeGroup(group.map(seen), protections) ? admitted : held).push(...group);
  const after = new Map(published.map((bank) => [bank.bank, bank]));
  for (const change of admitted) put(after, change);
  const thin = protections.isCoarsened ? dropThinClasses(after, protections) : new Set<string>();
  // What was public of a class too thin goes; what would have come to it waits.
  const left = published
    .filter(({ bank }) => thin.has(bank))
    .map((before): Change => ({ kind: 'left', before, after: null }));
  const isThin = (change: Change) => thin.has(seen(change).bank);
  return {
    banks: [...after.values()],
    admitted: [...admitted.filter((change) => !isThin(change)), ...left],
    held: [...held, ...admitted.filter((change) => isThin(change) && change.kind === 'came')],
  };
}

/** Whether banks that can't be told apart by their class are of enough owners. */
export const isSafeGroup = (banks: readonly PublicBank[], protections: Protections): boolean =>
  isEnough(banks.map(asOwned), protections);

const seen = ({ before, after }: Change): PublicBank => (after ?? before)!;

function put(banks: Map<string, PublicBank>, { before, after }: Change): void {
  if (after) banks.set(after.bank, after);
  else if (before) banks.delete(before.bank);
}

/** Takes classes that are not of enough owners out; answers their banks. */
function dropThinClasses(banks: Map<string, PublicBank>, protections: Protections): Set<string> {
  const thin = [...groupBy([...banks.values()], classOf).values()]
    .filter((group) => !isSafeGroup(group, protections))
    .flat();
  for (const { bank } of thin) banks.delete(bank);
  return new Set(thin.map(({ bank }) => bank));
}

function changesBetween(
  now: readonly PublicBank[],
  published: readonly PublicBank[],
  protections: Protections,
): Change[] {
  const before = new Map(published.map((bank) => [bank.bank, bank]));
  const changes: Change[] = [];
  for (const after of now) {
    const known = before.get(after.bank) ?? null;
    before.delete(after.bank);
    const kind = known ? kindOf(known, after, protections) : 'came';
    if (kind) changes.push({ kind, before: known, after });
  }
  for (const gone of before.values()) changes.push({ kind: 'left', before: gone, after: null });
  return changes;
}

/** Null where nothing that is public of the bank has changed. */
function kindOf(before: PublicBank, after: PublicBank, protections: Protections): ChangeKind | null {
  const now = linesOf(after, protections);
  const rest = [...now];
  const isAllThere = linesOf(before, protections).every((line) => {
    const place = rest.indexOf(line);
    if (place !== -1) rest.splice(place, 1);
    return place !== -1;
  });
  if (!isAllThere || classOf(before) !== classOf(after)) return 'changed';
  return rest.length > 0 ? 'gained' : null;
}
