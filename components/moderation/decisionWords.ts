import type { DecisionAction } from '@/lib/contract/moderation';

/** Decisions that ask for more than a press. */
export type AskedAction = Exclude<DecisionAction, 'approve'>;

interface DecisionWords {
  title: string;
  /** Of the text asked for. */
  label: string;
  hint: string;
  button: string;
  /** What was done, for the note that offers to take it back; of a bank. */
  done: string;
  /** The request's field the text goes to. */
  field: 'question' | 'reason' | 'note' | null;
}

export const decisionWords: Record<AskedAction, DecisionWords> = {
  sendBack: {
    title: 'Ask the owner',
    label: 'Question',
    hint: 'The owner gets it by e-mail and can answer or correct the figures.',
    button: 'Send back',
    done: 'sent back with your question',
    field: 'question',
  },
  turnAway: {
    title: 'Turn away',
    label: 'Reason',
    hint: 'The owner gets it by e-mail. Real failures are not turned away: they count.',
    button: 'Turn away',
    done: 'turned away with your reason',
    field: 'reason',
  },
  correct: {
    title: 'Approve with a correction',
    label: 'Reason',
    hint: 'The owner gets your figures beside their own, with the reason, and can object.',
    button: 'Approve corrected',
    done: 'approved with your correction',
    field: 'reason',
  },
  realFailure: {
    title: 'Keep as a real failure',
    label: 'Note',
    hint: 'The check is approved, counts as a failure, and no screening takes it out.',
    button: 'Keep as a failure',
    done: 'kept as a real failure',
    field: 'note',
  },
  recall: {
    title: 'Recall',
    label: 'Reason',
    hint: 'The check leaves the working fit at once and the public pool with its next step. The owner gets the reason.',
    button: 'Recall',
    done: 'recalled with your reason',
    field: 'reason',
  },
  merge: {
    title: 'Same test as another check',
    label: '',
    hint: 'The other check stays; this one is put away as its duplicate.',
    button: 'Merge',
    done: 'merged into the other check',
    field: null,
  },
};
