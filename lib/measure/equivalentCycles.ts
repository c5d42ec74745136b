/** Where full cycles come from: a counter since new, or typical use since the previous check. */
export interface CycleSources {
  counterKind: 'efc' | 'ah' | 'kwh' | null;
  /** Full cycles, Ah or kWh discharged since new, of the whole bank. */
  counterValue: number | null;
  depthFraction: number;
  cyclesPerDay: number | null;
  idleDays: number | null;
}

/** Equivalent full cycles since new, by both ways where both are known. */
export interface EquivalentCycles {
  /** By the counter where there is one, else by depth and cycles a day. */
  efc: number;
  efcFromCounter: number | null;
  efcFromDepth: number | null;
  /** (counter - depth) / their mean, of the cycles since the previous check; null where only one way is known. */
  efcDisagreement: number | null;
  /** The two ways differ by more than 15 %. */
  isDisagreement: boolean;
  /** The counter stands below the previous check's cycles. */
  isCounterBackwards: boolean;
}

/** Above this relative difference the two ways are flagged (judgement: depths are typed to the nearest 5 or 10 %). */
export const flaggedDisagreement = 0.15;

/**
 * Calculation 3: equivalent full cycles since new = charge discharged since new / rated capacity. Depth x cycles a day
 * x days in use counts only the time since the previous check and is added to that check's cycles.
 * @param bank rated capacity (Ah) and nominal voltage (V) of the whole bank
 * @param since days since the previous check (or first use) and the cycles then
 * @throws RangeError when neither a counter nor cycles a day are given, or the bank has no capacity.
 */
export function equivalentCycles(
  sources: CycleSources,
  bank: { ratedAh: number; nominalV: number },
  since: { days: number; efc: number },
): EquivalentCycles {
  if (!(bank.ratedAh > 0) || !(bank.nominalV > 0)) {
    throw new RangeError('equivalentCycles requires a rated capacity and a nominal voltage above 0');
  }
  const efcFromCounter = cyclesOfCounter(sources, bank);
  const daysInUse = Math.max(0, since.days - (sources.idleDays ?? 0));
  const added =
    sources.cyclesPerDay === null ? null : sources.depthFraction * sources.cyclesPerDay * daysInUse;
  const efcFromDepth = added === null ? null : since.efc + added;
  const efc = efcFromCounter ?? efcFromDepth;
  if (efc === null) throw new RangeError('equivalentCycles requires a counter or cycles a day');
  const counted = efcFromCounter === null ? null : efcFromCounter - since.efc;
  const efcDisagreement = counted === null || added === null ? null : disagreementOf(counted, added);
  return {
    efc,
    efcFromCounter,
    efcFromDepth,
    efcDisagreement,
    isDisagreement: efcDisagreement !== null && Math.abs(efcDisagreement) > flaggedDisagreement,
    isCounterBackwards: counted !== null && counted < 0,
  };
}

const cyclesOfCounter = (
  { counterKind, counterValue }: CycleSources,
  { ratedAh, nominalV }: { ratedAh: number; nominalV: number },
): number | null => {
  if (counterKind === null || counterValue === null) return null;
  if (counterKind === 'efc') return counterValue;
  return counterKind === 'ah' ? counterValue / ratedAh : (counterValue * 1000) / (ratedAh * nominalV);
};

const disagreementOf = (counted: number, added: number): number => {
  const mean = (Math.abs(counted) + Math.abs(added)) / 2;
  return mean === 0 ? 0 : (counted - added) / mean;
};
