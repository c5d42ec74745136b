import type { CellTypeChoice } from '@/lib/contract/banks';

/** Letters and digits alone, so that case, spaces and hyphens make no difference. */
const keyOf = (text: string) =>
  text
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[^\p{Letter}\p{Number}]/gu, '');

/** How alike two names have to be, 0..1, to be pointed out: one letter in four may differ. Judgement. */
const leastLikeness = 0.75;
const most = 3;

/** Cell types whose name, or maker and name, is nearly what is typed; the nearest first, three at most. */
export function similarCellTypes(
  cellTypes: readonly CellTypeChoice[],
  { maker, name }: { maker: string; name: string },
): CellTypeChoice[] {
  const [typedName, typedWhole] = [keyOf(name), keyOf(maker + name)];
  if (typedName.length < 3) return [];
  return cellTypes
    .map((cellType) => ({
      cellType,
      likeness: Math.max(
        likenessOf(typedName, keyOf(cellType.name)),
        likenessOf(typedWhole, keyOf(cellType.maker + cellType.name)),
      ),
    }))
    .filter(({ likeness }) => likeness >= leastLikeness)
    .sort((one, other) => other.likeness - one.likeness)
    .slice(0, most)
    .map(({ cellType }) => cellType);
}

/** 1 - (letters to add, leave out or change) / letters of the longer text: 1 for the same. */
function likenessOf(one: string, other: string): number {
  const longer = Math.max(one.length, other.length);
  if (longer === 0) return 0;
  return 1 - distance(one, other) / longer;
}

/** Levenshtein's distance, row by row. */
function distance(one: string, other: string): number {
  let row = Array.from({ length: other.length + 1 }, (_, index) => index);
  for (let left = 1; left <= one.length; left += 1) {
    const next = [left];
    for (let right = 1; right <= other.length; right += 1) {
      const change = row[right - 1]! + (one[left - 1] === other[right - 1] ? 0 : 1);
      next.push(Math.min(change, row[right]! + 1, next[right - 1]! + 1));
    }
    row = next;
  }
  return row[other.length]!;
}
