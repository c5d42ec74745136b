import type { Verdict } from '@/lib/contract/agreement';

export const verdictWords: Record<Verdict, string> = {
  approve: 'Approve',
  correct: 'Approve with a correction',
  realFailure: 'Keep as a real failure',
  sendBack: 'Ask the owner',
  turnAway: 'Turn away',
};
