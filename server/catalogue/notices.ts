import type { CellType } from '../db/models';
import type { Deps } from '../deps';

export interface ProposalNotice {
  subject: string;
  text: string;
}

type Named = Pick<CellType, 'id' | 'maker' | 'name'>;

const greeting = 'Good day,';
const ending = 'Ebbline, the exchange of measured battery fade';
const fullName = ({ maker, name }: Named) => `${maker} ${name}`;

export function listedNotice({ config }: Deps, cellType: Named): ProposalNotice {
  return write('The cell type you proposed is listed', [
    `${fullName(cellType)}, which you proposed, is in the catalogue now. Others can choose it for their banks too.`,
    `Its page: ${config.publicUrl}/cells/${cellType.id}`,
  ]);
}

export function declinedNotice({ config }: Deps, cellType: Named, reason: string): ProposalNotice {
  return write('The cell type you proposed was not listed', [
    `a moderator did not list ${fullName(cellType)}, which you proposed, for this reason:`,
    reason,
    `If you have a bank of it, choose its cell type from the list, or propose it again with what was missing: ${config.publicUrl}/banks`,
  ]);
}

export function mergedNotice({ config }: Deps, cellType: Named, into: Named): ProposalNotice {
  return write('The cell type you proposed was there already', [
    `${fullName(cellType)}, which you proposed, is the same as ${fullName(into)}. The two are one now, and your banks of it were moved along with their checks.`,
    `Its page: ${config.publicUrl}/cells/${into.id}`,
  ]);
}

const write = (subject: string, paragraphs: string[]): ProposalNotice => ({
  subject,
  text: [greeting, ...paragraphs, ending].join('\n\n'),
});
