import type { CheckState } from '@/lib/contract/checks';
import type { DecisionAction } from '@/lib/contract/moderation';

interface ActionFacts {
  from: readonly CheckState[];
  to: (from: CheckState) => CheckState;
}

const open: readonly CheckState[] = ['submitted', 'sentBack'];

/** From which states a decision leads where. */
export const actions: Record<DecisionAction, ActionFacts> = {
  approve: { from: open, to: () => 'approved' },
  correct: { from: open, to: () => 'approved' },
  realFailure: { from: [...open, 'approved'], to: () => 'approved' },
  sendBack: { from: open, to: () => 'sentBack' },
  turnAway: { from: open, to: () => 'turnedAway' },
  recall: { from: ['approved'], to: () => 'recalled' },
  merge: { from: [...open, 'approved'], to: (from) => (from === 'approved' ? 'recalled' : 'turnedAway') },
};

/** What the trail calls a decision: the state it leads to, or the more that was done. */
export const trailActions: Record<DecisionAction, string> = {
  approve: 'approved',
  correct: 'corrected',
  realFailure: 'realFailure',
  sendBack: 'sentBack',
  turnAway: 'turnedAway',
  recall: 'recalled',
  merge: 'merged',
};
