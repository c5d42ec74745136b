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

/** The check against what the working fit expects of it, from the bank's other approved checks where there are any. */
export interface PoolExpectation {
  /** Capacity over rating, as seen and as expected. */
  seenFraction: number;
  expectedFraction: number;
  /** Residual of the logarithms over its predictive sd. */
  t: number;
  /** Approved checks of the same bank that it is predicted from; 0: from the pool alone. */
  others: number;
}

/** How another log in the exchange compares with the one behind this check, as shares and kelvins. */
export interface CurveLikeness {
  /** Root mean square difference of the cell voltage over its mean. */
  voltageFraction: number;
  /** The same of the current, each over its own mean; null where one log has none. */
  currentFraction: number | null;
  /** Root mean square difference of the temperature, K; null where one log has none. */
  temperatureK: number | null;
  /** Difference of the durations over the longer one. */
  durationFraction: number;
  /** Correlation of what is left of the two voltage curves after their common shape is taken out. */
  detailCorrelation: number;
}

/** Photos in the exchange that are, or look like, the one of this check. */
export interface PhotoTwins {
  /** Other checks whose photo has the same content. */
  same: number;
  /** Of the 64 bits of how pictures look, those in which the nearest other one differs; null without another. */
  nearestBits: number | null;
}

/** What is known of the account a check came from, as counts only. */
export interface AccountFacts {
  /** Submissions from the account in the hour up to this one, this one included; a file of earlier checks is one. */
  submittedInHour: number;
  /** Other accounts that submitted a bank of the very same make-up within days. */
  alikeAccounts: number;
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
  /** Absent before the first working fit, and for banks the pool takes no checks of. */
  pool?: PoolExpectation;
  /** The log most like this one, of those with other content. */
  nearestLog?: CurveLikeness;
  /** Absent without a photo. */
  photo?: PhotoTwins;
  account?: AccountFacts;
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
