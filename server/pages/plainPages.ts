import { html } from './html';
import type { PageMaker } from './publicPage';

/** Public pages whose matter comes with the app: their heads alone. */
const pages: Record<string, { title: string; description: string }> = {
  '/compare': {
    title: 'Compare cell types by measured life',
    description:
      'Up to four cell types at one use: measured years to 80 %, their ranges, what the labels imply, and which one lasts longer.',
  },
  '/plan': {
    title: 'Plan a home storage bank',
    description:
      'How long a bank lasts when the night’s energy stays the same, what a kWh delivered costs, and which size is cheapest.',
  },
  '/questions': {
    title: 'Questions of the trade, answered by measurement',
    description:
      'Clamping, depth, rate, heat, charge level, years or cycles: what the pool of measured banks says, and how sure it is.',
  },
  '/questions/clamping': {
    title: 'Does clamping pay?',
    description:
      'What clamping adds to a bank’s life below and above 0.3 It, measured, and what a fixture may cost.',
  },
  '/questions/depth': {
    title: 'Shallow or deep?',
    description:
      'What a shallower cycle adds to a bank’s life, measured, with its range and what it is worth.',
  },
  '/questions/rate': {
    title: 'Fast or slow?',
    description:
      'What a slower discharge adds to a bank’s life, measured, with its range and what it is worth.',
  },
  '/questions/heat': {
    title: 'Warm or cool?',
    description: 'What a cooler place adds to a bank’s life, measured, with its range and what it is worth.',
  },
  '/questions/charge': {
    title: 'Full or half full?',
    description:
      'What a lower mean charge level adds to a bank’s life, measured, with its range and its worth.',
  },
  '/questions/end': {
    title: 'Years or cycles: which ends a bank first?',
    description:
      'How much of the fade of home storage banks time takes, and how much their cycles, use by use.',
  },
  '/data': {
    title: 'Data',
    description:
      'The anonymised checks as numbered releases, with dictionary, fit and checksums, and how to repeat the published figures.',
  },
  '/data/privacy': {
    title: 'What is kept private, and how',
    description: 'From how many owners a figure comes, what rows hold, and what that can not prevent.',
  },
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
