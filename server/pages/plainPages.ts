import { html } from './html';
import type { PageMaker } from './publicPage';

/** Public pages whose matter comes with the app: their heads alone. */
const pages: Record<string, { title: string; description: string }> = {
  '/method': {
    title: 'Method',
    description:
      'How measured lives of home storage batteries are computed from yearly capacity checks: the model, its priors, its ranges and its limits.',
  },
  '/method/diagnostics': {
    title: 'Diagnostics',
    description:
      'What the pooled fade model in force is checked by: residuals, coverage, raw readings, history.',
  },
};

export const plainPaths = Object.keys(pages);

export const plainPage: PageMaker = async (_deps, path) => {
  const page = Object.hasOwn(pages, path) ? pages[path] : undefined;
  if (!page) return null;
  const { title, description } = page;
  const summary = html`<h1>${title}</h1>
    <p>${description}</p>`.text;
  return { title, description, path, summary, answers: [] };
};
