import type { BankEventKind, BankFields } from '@/lib/contract/banks';
import type { CheckFields, CheckState } from '@/lib/contract/checks';
import type { FieldSource } from '@/lib/contract/fields';

import type { BankUse } from './bankUse';

/** An owner; the first five are the demo's accounts. */
export interface DemoOwner {
  id: string;
  banks: number;
}

/** What a pending submission is about. */
export type PendingKind =
  | 'clean'
  | 'bankForCell'
  | 'cellsAdded'
  | 'wattHours'
  | 'wrongRating'
  | 'coldAndCutShort'
  | 'duplicate'
  | 'counterBackwards'
  | 'riseAfterRebalance'
  | 'realFailure';

/** True state of a bank at one of its checks. */
export interface TrueState {
  /** Since new, prior life of a used bank included. */
  ageYears: number;
  efc: number;
  /** Counted since first use by this owner: what a counter shows. */
  countedEfc: number;
  sohFraction: number;
  /** Conditions since the previous check. */
  since: {
    depthFraction: number;
    dischargeIt: number;
    temperatureC: number;
    socMeanFraction: number;
    efcPerYear: number;
  };
}

export interface DemoCheck {
  id: string;
  idempotencyKey: string;
  fields: CheckFields;
  state: CheckState;
  submittedAt: string;
  decidedAt: string | null;
  /** Why it was turned away, or what was asked. */
  decisionText: string | null;
  pending: PendingKind | null;
  truth: TrueState;
}

export interface DemoEvent {
  id: string;
  happenedOn: string;
  kind: BankEventKind;
  note: string;
}

/** How a bank's owner knows what is reported of it, and how far off each figure stands. */
export interface Reporter {
  sources: {
    temperature: FieldSource;
    soc: FieldSource;
    rate: FieldSource;
    depth: FieldSource;
    counter: FieldSource;
  };
  temperatureErrorC: number;
  socError: number;
  rateFactor: number;
  depthFactor: number;
  counterFactor: number;
  counterKind: 'efc' | 'ah' | 'kwh' | null;
  givesWindow: boolean;
  isAir: boolean;
}

export interface Meter {
  instrument: string;
  gainErrorFraction: number;
  readingNoiseFraction: number;
  /** What the meter really reads too much or too little, ratio. */
  gain: number;
}

/** What is true of a bank and not asked. */
export interface BankTruth {
  use: BankUse;
  start: number;
  shift: number;
  /** Years and EFC it had before this owner, for banks bought used. */
  priorYears: number;
  testIt: number;
  imbalanceMvPerYear: number;
}

export interface DemoBank {
  id: string;
  ownerId: string;
  pseudonym: string;
  createdAt: string;
  fields: BankFields;
  events: DemoEvent[];
  checks: DemoCheck[];
  truth: BankTruth;
}

export interface DemoData {
  owners: DemoOwner[];
  banks: DemoBank[];
}
