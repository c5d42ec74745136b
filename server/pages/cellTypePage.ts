import { type CellPage, cellPageSchema } from '@/lib/contract/cells';
import { lifeInShort } from '@/lib/contract/lifeWords';
import { cellIdSchema } from '@/lib/contract/fields';
import { formatCount, formatPercent, formatQuantity, formatRange, formatYears } from '@/lib/units';

import { readCellPage } from '../cells/read';
import { AppError } from '../errors';
import { html, type Html } from './html';
import { pictureVersion } from './pictureVersion';
import type { PageMaker, PublicPage } from './publicPage';
import { wordsOfUse } from './wordsOfUse';

const address = /^\/cells\/([^/]+)$/;

/** The page of a cell type, at `/cells/<id>`. */
export const cellTypePage: PageMaker = async (deps, path) => {
  const id = address.exec(path)?.[1];
  if (id === undefined) return null;
  const known = cellIdSchema.safeParse(decoded(id));
  if (!known.success) return missing(path);
  try {
    const page = cellPageSchema.parse(await readCellPage(deps, known.data));
    return pageOf(page, known.data);
  } catch (error) {
    if (error instanceof AppError && error.code === 'notFound') return missing(path);
    throw error;
  }
};

const decoded = (text: string): string => {
  try {
    return decodeURIComponent(text);
  } catch {
    return text;
  }
};

const missing = (path: string): PublicPage => ({
  title: 'Cell type',
  description: 'There is no cell type under this name.',
  path,
  summary: html`<h1>Cell type</h1>
    <p>There is no cell type under this name. <a href="/">All cell types</a></p>`.text,
  answers: [],
  status: 404,
});

function pageOf(page: CellPage, askedFor: string): PublicPage {
  const { cellType, view, use } = page;
  const path = `/cells/${cellType.id}`;
  const life = view.life ? lifeInShort(view.life) : 'No life told yet.';
  return {
    title: `${cellType.name}: measured life`,
    description: `${cellType.name}, ${formatQuantity(cellType.ratedAh, 'Ah', { decimals: 0 })} LFP by ${cellType.maker}: ${life} Measured fade beside what the label implies.`,
    path,
    picture: `/pictures/cells/${cellType.id}.png?v=${pictureVersion(page.pool)}`,
    summary: html`<h1>${cellType.name}</h1>
      <p>
        ${`LFP cell by ${cellType.maker}, ${formatQuantity(cellType.ratedAh, 'Ah', { decimals: 0 })}, ${formatQuantity(cellType.nominalV, 'V', { decimals: 1 })}`}
      </p>
      <p>${`At the standard use, ${wordsOfUse(use)}`}</p>
      <ul>
        ${sentencesOf(page).map((sentence) => html`<li>${sentence}</li>`)}
      </ul>
      ${relatedLinks(page)}`.text,
    answers: [{ path: `/api/cells/${askedFor}`, body: page }],
  };
}

function sentencesOf({ view: { life, evidence }, claims }: CellPage): string[] {
  if (!life) return ['No life told yet: too few owners stand behind it.'];
  const { estimate, lower, upper } = life.leftAtReachFraction;
  const range = formatRange(lower * 100, upper * 100, { decimals: 0, unit: '%' });
  const label = claims.find((claim) => claim.label)?.label;
  return [
    `${formatPercent(estimate)} of the rated capacity left at ${formatYears(life.reachYears)}, measured; 90 % range ${range}.`,
    lifeInShort(life),
    ...(label ? [`The label implies ${formatYears(label.impliedYears.estimate)} at this use.`] : []),
    evidence
      ? `${formatCount(evidence.banks)} banks of ${formatCount(evidence.owners)} owners, ${formatCount(evidence.checks)} checks.`
      : 'Fewer than 5 owners have sent checks of this cell type.',
  ];
}

function relatedLinks({ related }: CellPage): Html {
  if (related.length === 0) return html``;
  return html`<p>
    Cell types like it: ${related.map(({ id, name }) => html`<a href="/cells/${id}">${name}</a> `)}
  </p>`;
}
