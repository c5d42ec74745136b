import { z } from 'zod';

import type { CellEntry } from '@/lib/contract/cells';
import { leastOf } from '@/lib/contract/counts';

import { sortedRows } from '@/components/ui/sortRows';

import { carriedClaims } from './cellWords';
import { deliveredPrice } from './deliveredPrice';
import { toldOf } from './lifeWords';

/** What the list can be in order of; each with the direction that is asked for first. */
export const sortKeys = ['life', 'left', 'label', 'price', 'banks', 'reach', 'name', 'capacity'] as const;
export type SortKey = (typeof sortKeys)[number];

export const sortNames: Record<SortKey, string> = {
  life: 'Life, longest first',
  left: 'Capacity left at reach',
  label: 'Measured over label',
  price: 'Price per kWh delivered',
  banks: 'Banks behind it',
  reach: 'How far readings reach',
  name: 'Name',
  capacity: 'Rated capacity',
};

const isAscending = (key: SortKey) => key === 'name' || key === 'price' || key === 'capacity';

/** How the list is looked at, as in its address; what makes no sense there is left at its default. */
const listViewSchema = z.object({
  sort: z.enum(sortKeys).catch('life'),
  turned: z.literal('yes').optional().catch(undefined),
  find: z.string().max(80).catch(''),
  form: z.enum(['all', 'prismatic', 'cylindrical', 'pouch']).catch('all'),
  own: z.literal('yes').optional().catch(undefined),
});
export type ListView = z.infer<typeof listViewSchema>;

export const readListView = (query: Readonly<Record<string, unknown>>): ListView =>
  listViewSchema.parse(query);

/** The part of an address that says so; undefined takes a parameter out of it. */
export function listViewQuery({ sort, turned, find, form, own }: ListView) {
  return {
    sort: sort === 'life' ? undefined : sort,
    turned,
    find: find.trim() === '' ? undefined : find,
    form: form === 'all' ? undefined : form,
    own,
  };
}

/** A life past what can be told is still the longest; one that is the pool's says nothing of the cell type. */
function lifeOrder({ life }: CellEntry): number | undefined {
  return !life || life.basis === 'pool' ? undefined : life.years.estimate;
}

const valueOf: Record<SortKey, (entry: CellEntry) => number | string | null | undefined> = {
  life: lifeOrder,
  left: ({ life }) => (life?.basis === 'cellType' ? life.leftAtReachFraction.estimate : undefined),
  label: ({ claims, life }) =>
    life && toldOf(life) === 'figure' ? carriedClaims(claims)[0]?.label.ratio?.estimate : undefined,
  price: (entry) => {
    const told = deliveredPrice(entry);
    return told.ok ? told.perKwh.estimate : undefined;
  },
  banks: ({ evidence }) => evidence && leastOf(evidence.banks),
  reach: ({ life, evidence }) => (evidence ? life?.reachYears : undefined),
  name: ({ cellType }) => cellType.name,
  capacity: ({ cellType }) => cellType.ratedAh,
};

/** The cell types that are looked for, in the order asked for; those without the value last. */
export function arranged(cells: readonly CellEntry[], view: ListView): readonly CellEntry[] {
  const wanted = view.find.trim().toLocaleLowerCase('en');
  const found = cells.filter(
    ({ cellType: { name, maker, ratedAh, format }, life }) =>
      `${name} ${maker} ${ratedAh} Ah`.toLocaleLowerCase('en').includes(wanted) &&
      (view.form === 'all' || format === view.form) &&
      (view.own === undefined || life?.basis === 'cellType'),
  );
  const byName = sortedRows(found, valueOf.name, false);
  return sortedRows(byName, valueOf[view.sort], isDescending(view));
}

/** Largest first but for names, prices and capacities, unless turned round. */
export const isDescending = ({ sort, turned }: Pick<ListView, 'sort' | 'turned'>): boolean =>
  isAscending(sort) === (turned === 'yes');
