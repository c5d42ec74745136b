import type { AddressPart } from '@/components/chosenUse/useAddressed';

/** More than this can't be told apart in one drawing. */
export const mostCompared = 4;

const idPattern = /^[a-z0-9-]{1,80}$/;

export interface Compared {
  ids: string[];
  /** What in the address could not be used. */
  notes: string[];
}

/** The cell types compared, in the address as `?cells=one,two`. */
export const comparedPart: AddressPart<Compared> = {
  read({ cells }) {
    const text = typeof cells === 'string' ? cells : '';
    const asked = [...new Set(text.split(',').map((id) => id.trim()))].filter((id) => id !== '');
    const sound = asked.filter((id) => idPattern.test(id));
    const notes = [
      ...(sound.length < asked.length ? ['A name in it is none of a cell type.'] : []),
      ...(sound.length > mostCompared
        ? [`At most ${mostCompared} are compared; the first ones are shown.`]
        : []),
    ];
    return { ids: sound.slice(0, mostCompared), notes };
  },
  write: ({ ids }) => ({ cells: ids.length > 0 ? ids.join(',') : undefined }),
};
