import { formatPercent } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { trendOf } from './trendOf';
import { eventsSince, eventWord } from './history';

/** Fade in a year that needs no explanation, beside the uncertainty: common practice, no source. */
const ordinaryFadePerYear = 0.05;

/** A jump down. A real failure is asked for, never screened out. */
export const capacityDrop: Rule = (context) => {
  const trend = trendOf(context);
  if (!trend || trend.changeFraction > 0) return null;
  const { before, expandedFraction, figures, years } = trend;
  const drop = -trend.changeFraction;
  const allowed = expandedFraction + ordinaryFadePerYear * years;
  const evidence = { changeFraction: trend.changeFraction, expandedFraction, allowedFraction: allowed };
  const rule = 'capacityDrop';
  if (drop <= allowed) {
    const text = `${figures}.`;
    return {
      rule,
      title: 'Against last check',
      severity: 'fits',
      ownerText: text,
      moderatorText: text,
      evidence,
    };
  }
  const reason = eventsSince(context, before, [
    'cellFailed',
    'swollen',
    'cellReplaced',
    'retired',
    'meterChanged',
    'bmsChanged',
  ])[0];
  const title = 'Falls beyond its uncertainty';
  if (reason) {
    const isFailure = ['cellFailed', 'swollen', 'retired'].includes(reason.kind);
    return {
      rule,
      title,
      severity: 'look',
      ownerText: `${figures}. Explained by an event: ${eventWord(reason.kind)}. Failures count, thank you for giving it.`,
      moderatorText: `${figures}. Event in between: ${eventWord(reason.kind)}.${isFailure ? ' A real failure belongs in the pool.' : ''}`,
      evidence,
    };
  }
  return {
    rule,
    title,
    severity: 'doubtful',
    ownerText: `${figures}. If a cell failed or swelled, add the event: failures count as much as good years. A swollen cell means stop. Else check the figures and whether the bank was full.`,
    moderatorText: `${figures}; down by ${formatPercent(drop, 1)}. No event explains it. Ask whether something failed: a real failure is approved.`,
    evidence,
  };
};
