import type { TrailEntry, TrailKind } from '@/lib/contract/steward';

export const actorWords: Record<TrailEntry['actorRole'], string> = {
  owner: 'by an owner',
  moderator: 'by a moderator',
  steward: 'by a steward',
  system: 'by the exchange itself',
};

const kinds: Record<TrailKind, string> = {
  check: 'check',
  bank: 'bank',
  account: 'account',
  cellType: 'cell type',
  pool: 'public pool',
  release: 'release',
};
/** An entry of a kind that this version does not know keeps its own word. */
export const kindWord = (kind: string) => (Object.hasOwn(kinds, kind) ? kinds[kind as TrailKind] : kind);

/** Names of actions read as words: "addressChanged" is "Address changed". */
export function actionWord(action: string): string {
  const words = action.replace(/([A-Z])/g, (letter) => ` ${letter.toLowerCase()}`);
  return words.charAt(0).toUpperCase() + words.slice(1);
}
