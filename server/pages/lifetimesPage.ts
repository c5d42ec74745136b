import { type CellEntry, type CellList, cellListSchema } from '@/lib/contract/cells';
import { lifeInShort } from '@/lib/contract/lifeWords';
import { formatCount, formatQuantity } from '@/lib/units';

import { readCells } from '../cells/read';
import { html, type Html } from './html';
import type { PageMaker } from './publicPage';
import { pictureVersion } from './pictureVersion';
import { wordsOfUse } from './wordsOfUse';

/** The list of lifetimes, at the address `/`. */
export const lifetimesPage: PageMaker = async (deps, path) => {
  if (path !== '/') return null;
  const list = cellListSchema.parse(await readCells(deps));
  return {
    title: 'Lifetimes of home battery cells',
    description: `How long LFP cells of home storage last, measured by their owners: ${countsOf(list)} Life in years and cycles beside what the label says.`,
    path: '/',
    picture: `/pictures/lifetimes.png?v=${pictureVersion(list.pool)}`,
    summary: html`<h1>How long home battery cells last, measured</h1>
      <p>${countsOf(list)}</p>
      <p>${`At the standard use: ${wordsOfUse(list.use)}`}</p>
      <ul>
        ${byLife(list.cells).map(entryItem)}
      </ul>`.text,
    answers: [{ path: '/api/cells', body: list }],
  };
};

function countsOf({ pool: { evidence } }: CellList): string {
  if (!evidence) return 'No checks are published yet.';
  return `${formatCount(evidence.checks)} checks on ${formatCount(evidence.banks)} banks, screened and pooled.`;
}

function entryItem({ cellType: { id, name, ratedAh }, life }: CellEntry): Html {
  return html`<li>
    <a href="/cells/${id}">${name}</a>, ${formatQuantity(ratedAh, 'Ah', { decimals: 0 })}:
    ${life ? lifeInShort(life) : 'no life told yet.'}
  </li>`;
}

const byLife = (cells: readonly CellEntry[]): CellEntry[] => {
  const yearsOf = ({ life }: CellEntry) => (life?.basis === 'cellType' ? life.years.estimate : -1);
  return [...cells].sort((a, b) => yearsOf(b) - yearsOf(a));
};
