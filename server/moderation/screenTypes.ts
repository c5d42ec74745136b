import type { BankEvent } from '@/lib/contract/banks';
import type { CheckFields, CheckState, Computed, Severity } from '@/lib/contract/checks';
import type { LogResult } from '@/lib/contract/uploads';

/** What the screening knows of the bank; nothing of its owner. */
export interface ScreenBank {
  parallel: number;
  series: number;
  /** Rated capacity of one cell, Ah. */
  ratedAhCell: number;
  /** Nominal voltage of one cell, V. */
  nominalV: number;
  /** YYYY-MM */
  firstUseMonth: string;
  events: Pick<BankEvent, 'happenedOn' | 'kind' | 'note'>[];
}

/** Another check of the same bank, in whatever state. */
export interface ScreenPrevious {
  checkId: string;
  testedOn: string;
  state: CheckState;
  fields: CheckFields;
  computed: Computed;
}

/** Everything a rule may look at. */
export interface ScreenContext {
  bank: ScreenBank;
  fields: CheckFields;
  computed: Computed;
  log: LogResult | null;
  previousChecks: ScreenPrevious[];
  /** Checks elsewhere in the exchange whose log has the same content. */
  sameLogCheckIds: string[];
}

/** One remark of the screening. `ownerText` says what to do, `moderatorText` what was found. */
export interface ScreenFinding {
  rule: string;
  title: string;
  severity: Severity;
  ownerText: string;
  moderatorText: string;
  evidence: Record<string, number | string>;
}

/** A rule answers null where it does not apply, and 'fits' where it looked and found nothing. */
export type Rule = (context: ScreenContext) => ScreenFinding | null;
