import type { Check, CheckState } from '@/lib/contract/checks';
import { formatUncertainty } from '@/lib/units';

type Computed = Pick<Check['computed'], 'sohFraction' | 'expandedAh' | 'capacityRefAh'>;

/** ± at 95 % of what is new at each check, as a share of the rated capacity. */
export function plusMinusFraction({ sohFraction, expandedAh, capacityRefAh }: Computed): number {
  return (expandedAh / capacityRefAh) * sohFraction;
}

/** "93.8 ± 1.0 %" */
export function sohLine(computed: Computed): string {
  return formatUncertainty(computed.sohFraction * 100, plusMinusFraction(computed) * 100, '%');
}

/** What a state means for its owner, and what comes next. */
export const stateSentences: Record<CheckState, string> = {
  draft: 'Not sent yet.',
  submitted: 'A moderator looks at it next. You get an e-mail when it is decided.',
  sentBack: 'A moderator asks a question. Answer it, or correct the figures.',
  approved: 'In the pool from the next fit on. Published figures move in steps of at least 5 owners.',
  turnedAway: 'Not part of the pool. The reason stands in the conversation.',
  withdrawn: 'You took it out. It is no part of the pool.',
  recalled: 'Taken out of the pool later. The reason stands in the conversation.',
};

/** States of checks that count for nothing any more. */
export const leftOutStates: ReadonlySet<CheckState> = new Set(['turnedAway', 'withdrawn', 'recalled']);

/** States in which the owner may still change the figures. */
export const openStates: ReadonlySet<CheckState> = new Set(['submitted', 'sentBack']);

/** The question that waits for the owner's answer, if one does. */
export function openQuestion({ state, history }: Pick<Check, 'state' | 'history'>): string | undefined {
  if (state !== 'sentBack') return undefined;
  return history.findLast(({ action }) => action === 'sentBack')?.text;
}
