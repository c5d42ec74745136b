import { escapeHtml, jsonForPage } from './html';
import type { PublicPage } from './publicPage';

/** Where the app's page is cut open to put in what belongs to an address. */
export interface PageTemplate {
  beforeHead: string;
  betweenHeadAndRoot: string;
  afterRoot: string;
}

const root = '<div id="root"></div>';

/** @throws Error when the built page is not of the form that public/index.html has */
export function readTemplate(page: string): PageTemplate {
  const bare = page.replace(/<title>[^<]*<\/title>/, '').replace(/<meta\s+name="description"[^>]*>/, '');
  const head = bare.indexOf('<head>') + '<head>'.length;
  const body = bare.indexOf(root);
  if (bare.length === page.length || head < '<head>'.length || body < head)
    throw new Error('the built page has no title, head or root to put a page’s own into');
  return {
    beforeHead: bare.slice(0, head),
    betweenHeadAndRoot: bare.slice(head, body),
    afterRoot: bare.slice(body + root.length),
  };
}

/** The app's page with the head, words and first data of an address. */
export function renderPage(template: PageTemplate, page: PublicPage, origin: string): string {
  const { summary, answers } = page;
  const data =
    answers.length === 0
      ? ''
      : `<script type="application/json" id="first-answers">${jsonForPage(answers)}</script>`;
  return [
    template.beforeHead,
    headOf(page, origin),
    template.betweenHeadAndRoot,
    `<div id="root"><main class="ebb-first">${summary}</main></div>`,
    data,
    template.afterRoot,
  ].join('');
}

function headOf({ title, description, path, picture, status }: PublicPage, origin: string): string {
  const whole = escapeHtml(`${title} · Ebbline`);
  const words = escapeHtml(description);
  const address = escapeHtml(`${origin}${path}`);
  const image = picture && escapeHtml(`${origin}${picture}`);
  return [
    `<title>${whole}</title>`,
    `<meta name="description" content="${words}">`,
    ...(status === 404
      ? ['<meta name="robots" content="noindex">']
      : [`<link rel="canonical" href="${address}">`]),
    `<meta property="og:site_name" content="Ebbline">`,
    `<meta property="og:type" content="website">`,
    `<meta property="og:title" content="${whole}">`,
    `<meta property="og:description" content="${words}">`,
    `<meta property="og:url" content="${address}">`,
    ...(image
      ? [
          `<meta property="og:image" content="${image}">`,
          `<meta property="og:image:width" content="1200">`,
          `<meta property="og:image:height" content="630">`,
          `<meta name="twitter:card" content="summary_large_image">`,
        ]
      : []),
  ].join('');
}
