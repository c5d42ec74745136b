/** What in a text can give away who or where somebody is. */
export type PersonalKind =
  'e-mail address' | 'phone number' | 'street address' | 'coordinates' | 'web address';

const patterns: [PersonalKind, RegExp][] = [
  ['e-mail address', /[\w.+-]+\s?(?:@|\(at\)|\[at\])\s?[\w-]+(?:\.[\w-]+)+/gi],
  ['web address', /\b(?:https?:\/\/|www\.)\S+/gi],
  // Decimal degrees with at least three places, or degrees and minutes with a letter of the compass.
  ['coordinates', /[-+]?\d{1,2}\.\d{3,}\s*°?\s*[NS]?\s*[,;/ ]\s*[-+]?\d{1,3}\.\d{3,}\s*°?\s*[EOW]?/gi],
  ['coordinates', /\b\d{1,3}\s*°\s*\d{1,2}(?:\.\d+)?\s*['′][^A-Za-z]{0,12}[NSEOW]\b/gi],
  // Eight digits or more in groups, with a leading + or 0: readings have units and no such groups.
  [
    'phone number',
    /(?<![\d.,])(?:\+\d{1,3}[\s./-]?|\(?0\d{1,4}\)?[\s./-])(?:\(?\d{2,4}\)?[\s./-]?){2,5}\d{2}(?!\d)/g,
  ],
  [
    'street address',
    /\b\d{1,4}[a-z]?,?\s+(?:\p{Lu}[\p{L}'-]+\s+){1,3}(?:street|st|road|rd|lane|ln|avenue|ave|drive|close|court|way|square|terrace|crescent)\b/giu,
  ],
  [
    'street address',
    /\b\p{Lu}[\p{L}'-]*(?:straße|strasse|gasse|weg|platz|gatan|vägen|veien|straat|laan)\s+\d{1,4}\s?[a-z]?\b/gu,
  ],
  ['street address', /\b(?:rue|via|calle|avenida|rua)\s+(?:\p{L}+\s+){1,4}\d{1,4}\b/giu],
];

export interface PersonalFind {
  kind: PersonalKind;
  start: number;
  end: number;
}

/** Places in a text that look like an e-mail, web or street address, a phone number or coordinates, in their order. */
export function findPersonal(text: string): PersonalFind[] {
  const finds = patterns.flatMap(([kind, pattern]) =>
    [...text.matchAll(pattern)].map((match) => ({
      kind,
      start: match.index,
      end: match.index + match[0].length,
    })),
  );
  finds.sort((a, b) => a.start - b.start || b.end - a.end);
  const apart: PersonalFind[] = [];
  for (const find of finds) if (find.start >= (apart.at(-1)?.end ?? 0)) apart.push(find);
  return apart;
}

/** The text with each of them replaced by what it was: moderators need not know. */
export function hidePersonal(text: string): string {
  return findPersonal(text).reduceRight(
    (kept, { kind, start, end }) => `${kept.slice(0, start)}[${kind} hidden]${kept.slice(end)}`,
    text,
  );
}
