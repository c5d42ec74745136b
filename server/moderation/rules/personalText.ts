import { findPersonal } from '../personalText';
import type { Rule } from '../screenTypes';

/** Free text that tells who or where the owner is. The evidence names the kind only. */
export const personalText: Rule = ({ fields: { note, reading }, bank }) => {
  const texts = [
    note,
    reading.instrument,
    reading.endedByCell ?? '',
    ...bank.events.map((event) => event.note),
  ];
  if (texts.every((text) => text === '')) return null;
  const kinds = [...new Set(texts.flatMap(findPersonal).map(({ kind }) => kind))];
  const isFine = kinds.length === 0;
  const list = kinds.join(', ');
  return {
    rule: 'personalText',
    title: isFine ? 'Notes name nobody' : 'Notes give something away',
    severity: isFine ? 'fits' : 'look',
    ownerText: isFine
      ? 'The notes tell nothing of you or your place.'
      : `The notes seem to hold: ${list}. They are never public, and moderators do not see that part; better take it out.`,
    moderatorText: isFine
      ? 'Nothing in the notes tells of a person or a place.'
      : `The notes seem to hold: ${list}. Hidden here.`,
    evidence: { kinds: list },
  };
};
