import type { ReleaseChanges, ReleaseFigures } from '@/lib/contract/releases';
import { formatCount, formatNumber, formatRange } from '@/lib/units';

import { releaseFields } from '../publicView/releaseFields';

export interface ReleaseFacts {
  number: number;
  publishedOn: string;
  note: string;
  codeVersion: string;
  banks: number;
  checks: number;
  changes: ReleaseChanges;
  figures: ReleaseFigures;
  figuresBefore: ReleaseFigures | null;
}

export const citationOf = ({ number, publishedOn }: Pick<ReleaseFacts, 'number' | 'publishedOn'>): string =>
  `Ebbline (${publishedOn.slice(0, 4)}): Measured fade of home storage banks, release ${number} of ${publishedOn} [data set]. CC BY 4.0.`;

export const licenceText = `The data of this release are licensed under Creative Commons Attribution 4.0 International
(CC BY 4.0): you may copy, share and adapt them for any purpose, as long as you say where they are from, link to the
licence and say whether you changed them. https://creativecommons.org/licenses/by/4.0/legalcode
`;

export function readmeText(facts: ReleaseFacts): string {
  const { number, publishedOn, codeVersion, banks, checks } = facts;
  return `# Ebbline, release ${number} (${publishedOn})

${formatCount(checks)} capacity checks on ${formatCount(banks)} home storage banks, screened by moderators and anonymised.

| file             | what                                                              |
| ---------------- | ----------------------------------------------------------------- |
| checks.csv       | one check per row; columns as in dictionary.md                    |
| checks.jsonl     | the same, one JSON object per line                                |
| dictionary.md    | every column: meaning, unit, how coarse (also dictionary.json)    |
| fit.json         | the fit of these rows: parameters, covariance, lives, diagnostics |
| changelog.md     | what is new since the release before                              |
| SHA256SUMS       | checksums of the files                                            |
| licence.txt      | CC BY 4.0                                                         |
| citation.txt     | how to cite                                                       |

## To repeat the fit

With the program of version ${codeVersion}: \`npm run -s fit -- checks.csv --json again.json\`. The file again.json is
fit.json, to the last character. Other machines may differ in the last digits of sums.

## What to know

Values are rounded, and what could identify a bank is generalised until the banks of at least 5 owners share it. A bank
has another name in each release; rows of two releases may still be matched by their values. Whoever has published their
own figures can be recognised by them.
`;
}

export function changelogText(facts: ReleaseFacts): string {
  const { number, publishedOn, note, changes, figures, figuresBefore } = facts;
  const before = (cellType: string | null) =>
    figuresBefore?.find((figure) => figure.cellType === cellType)?.years;
  const lines = figures.map(({ cellType, years }) => {
    const was = before(cellType);
    const range = formatRange(years.lower, years.upper, { decimals: 1 });
    const moved = was ? `; was ${formatNumber(was.estimate, { decimals: 1 })}` : '';
    return `- ${cellType ?? 'average cell type'}: ${formatNumber(years.estimate, { decimals: 1 })} years (90 % range ${range})${moved}`;
  });
  return `# Release ${number}, ${publishedOn}

${note}

Banks that came: ${formatCount(changes.came)}. Banks that left: ${formatCount(changes.left)}. Banks with other checks than before: ${formatCount(changes.changed)}.

Years to 80 % at the standard use (60 % deep once a day at 0.1 It, 25 °C, half full, not clamped):

${lines.join('\n')}
`;
}

export const dictionaryJson = (): string =>
  `${JSON.stringify(
    releaseFields.map(({ name, title, unit, type, coarseness, isIdentifying }) => ({
      ...{ name, title, unit, type, coarseness, isIdentifying },
    })),
    null,
    1,
  )}\n`;

export function dictionaryText(): string {
  const rows = releaseFields.map(
    ({ name, title, unit, coarseness }) => `| ${name} | ${title} | ${unit ?? ''} | ${coarseness} |`,
  );
  return `# Columns of a release

Yes and no are 1 and 0 in checks.csv, true and false in checks.jsonl.

| column | meaning | unit | how coarse |
| --- | --- | --- | --- |
${rows.join('\n')}
`;
}
