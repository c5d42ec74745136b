import { isSafeGroup, type Change } from './admitChanges';
import { classOf, groupBy, type PublicBank } from './bankRows';
import type { Protections } from './protections';

/**
 * As a pool grows, banks that had to be generalised can be told of more exactly. They are in groups that go from one
 * class to the same finer one, large enough like any other change, and only while what stays behind is still safe.
 * @param finest the level at which a bank could be told of; null where its own is as fine
 */
export function refineLevels(
  banks: readonly PublicBank[],
  finest: (bank: PublicBank) => number | null,
  protections: Protections,
): Change[] {
  if (!protections.isCoarsened) return [];
  const moves = banks.flatMap((before): Change[] => {
    const level = finest(before);
    if (level === null || level >= before.level) return [];
    return [{ kind: 'changed', before, after: { ...before, level } }];
  });
  const classes = groupBy(banks, classOf);
  return [
    ...groupBy(moves, ({ before, after }) => `${classOf(before!)}>${classOf(after!)}`).values(),
  ].flatMap((group) => {
    const moving = new Set(group.map(({ before }) => before!.bank));
    const from = classOf(group[0]!.before!);
    const staying = classes.get(from)!.filter(({ bank }) => !moving.has(bank));
    const isLeftSafe = staying.length === 0 || isSafeGroup(staying, protections);
    if (
      !isSafeGroup(
        group.map(({ after }) => after!),
        protections,
      ) ||
      !isLeftSafe
    )
      return [];
    classes.set(from, staying);
    return group;
  });
}
