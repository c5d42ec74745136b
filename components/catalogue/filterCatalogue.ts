import type { CatalogueEntry, CellTypeStatus } from '@/lib/contract/catalogue';

export interface CatalogueFilters {
  /** Words of maker, name or key, in any order. */
  search: string;
  /** Undefined: what is in the catalogue, listed or proposed. */
  status?: CellTypeStatus;
}

/** The entries that the filters let through, proposals first. */
export function filterCatalogue(
  entries: readonly CatalogueEntry[],
  { search, status }: CatalogueFilters,
): CatalogueEntry[] {
  const words = search.toLowerCase().split(/\s+/).filter(Boolean);
  const isWanted = (entry: CatalogueEntry) =>
    status ? entry.status === status : entry.status === 'listed' || entry.status === 'proposed';
  const hasWords = ({ maker, name, id }: CatalogueEntry) => {
    const text = `${maker} ${name} ${id}`.toLowerCase();
    return words.every((word) => text.includes(word));
  };
  const rank = (entry: CatalogueEntry) => (entry.status === 'proposed' ? 0 : 1);
  return entries.filter((entry) => isWanted(entry) && hasWords(entry)).sort((a, b) => rank(a) - rank(b));
}
