import type { Rule } from '../screenTypes';
import { trendOf } from './trendOf';
import { eventsSince, eventWord } from './history';

/** A bank does not gain capacity by itself; a rebalance, another cell or another meter explains a rise. */
export const capacityRise: Rule = (context) => {
  const trend = trendOf(context);
  if (!trend || trend.changeFraction <= 0) return null;
  const { before, changeFraction, expandedFraction, figures } = trend;
  const evidence = { changeFraction, expandedFraction };
  const rule = 'capacityRise';
  if (changeFraction <= expandedFraction) {
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
    'rebalanced',
    'cellReplaced',
    'meterChanged',
    'bmsChanged',
    'layoutChanged',
  ])[0];
  const title = 'Rises beyond its uncertainty';
  if (reason) {
    const text = `${figures}. Explained by an event in between: ${eventWord(reason.kind)}.`;
    return { rule, title, severity: 'look', ownerText: text, moderatorText: text, evidence };
  }
  return {
    rule,
    title,
    severity: 'doubtful',
    ownerText: `${figures}. If the bank was rebalanced, or a cell or the meter replaced, add the event; else check both figures.`,
    moderatorText: `${figures}. No rebalance, replaced cell or other meter is recorded in between.`,
    evidence,
  };
};
