import { computeCheck, equivalentCycles } from '@/lib/measure';
import type { CycleSources, ReadingValues, TestedBank } from '@/lib/measure';
import { formatYears, yearsBetween } from '@/lib/units';
import { readReferenceJson } from '../support/reference';

const whole = { ratedAh: 280, nominalV: 51.2 };
const none: CycleSources = {
  counterKind: null,
  counterValue: null,
  depthFraction: 0.5,
  cyclesPerDay: null,
  idleDays: null,
};
const fresh = { days: 365, efc: 0 };

describe('equivalentCycles', () => {
  it('from discharged Ah are those over the rated capacity, as worked in standards.json', () => {
    const { worked } = readReferenceJson<{ worked: { EFC_example?: Record<string, number> }[] }>(
      'standards.json',
    );
    const example = worked.flatMap((row) => (row.EFC_example ? [row.EFC_example] : []))[0]!;
    const bank = { ratedAh: example['C_N_Ah']!, nominalV: 51.2 };
    const sources = { ...none, counterKind: 'ah' as const, counterValue: example['discharged_Ah']! };
    expect(equivalentCycles(sources, bank, fresh).efc).toBe(example['EFC_discharge']);
  });

  it('from kWh go by the nominal voltage, from full cycles as they are', () => {
    const kwh = equivalentCycles({ ...none, counterKind: 'kwh', counterValue: 1433.6 }, whole, fresh);
    expect(kwh.efc).toBeCloseTo(100, 9);
    expect(equivalentCycles({ ...none, counterKind: 'efc', counterValue: 214 }, whole, fresh).efc).toBe(214);
  });

  it('from depth count the days in use since the check before', () => {
    const result = equivalentCycles({ ...none, cyclesPerDay: 1, idleDays: 65 }, whole, {
      days: 365,
      efc: 400,
    });
    expect(result).toMatchObject({
      efc: 550,
      efcFromDepth: 550,
      efcFromCounter: null,
      efcDisagreement: null,
    });
  });

  it('by both ways compare what was added since the check before', () => {
    const sources = {
      ...none,
      depthFraction: 0.55,
      cyclesPerDay: 1,
      counterKind: 'efc' as const,
      counterValue: 614,
    };
    const result = equivalentCycles(sources, whole, { days: 365.5, efc: 400 });
    // 214 against 201.0: the worked example of the interface's design says within 7 %.
    expect(result.efcDisagreement).toBeCloseTo((214 - 201.025) / 207.5125, 9);
    expect(result).toMatchObject({ efc: 614, isDisagreement: false, isCounterBackwards: false });
    const far = equivalentCycles({ ...sources, counterValue: 660 }, whole, { days: 365.5, efc: 400 });
    expect(far.isDisagreement).toBe(true);
  });

  it('see a counter that ran backwards', () => {
    const result = equivalentCycles({ ...none, counterKind: 'efc', counterValue: 300 }, whole, {
      days: 365,
      efc: 400,
    });
    expect(result.isCounterBackwards).toBe(true);
  });

  it('of an idle bank agree at nothing', () => {
    const sources = { ...none, cyclesPerDay: 0, counterKind: 'ah' as const, counterValue: 0 };
    expect(equivalentCycles(sources, whole, fresh)).toMatchObject({
      efc: 0,
      efcDisagreement: 0,
      isDisagreement: false,
    });
  });

  it('refuse a bank without capacity and conditions without cycles', () => {
    expect(() => equivalentCycles(none, whole, fresh)).toThrow(RangeError);
    expect(() =>
      equivalentCycles({ ...none, cyclesPerDay: 1 }, { ratedAh: 0, nominalV: 51.2 }, fresh),
    ).toThrow(RangeError);
  });

  it('of 1,500 full cycles, one a day, are 4.1 years (common practice, no source)', () => {
    const days = 1500;
    const sources = { ...none, depthFraction: 1, cyclesPerDay: 1 };
    expect(equivalentCycles(sources, whole, { days, efc: 0 }).efc).toBe(1500);
    // 1,500 days after 1 January 2026.
    expect(formatYears(yearsBetween('2026-01-01', '2030-02-09'))).toBe('4.1\u202fyears');
  });
});

describe('computeCheck', () => {
  const bank: TestedBank = {
    parallel: 2,
    series: 16,
    ratedAhCell: 240,
    nominalV: 3.2,
    firstUseMonth: '2022-06',
  };
  const reading: ReadingValues = {
    testedOn: '2026-11-02',
    method: 'countedDischarge',
    capacityAh: 452,
    energyWh: 23_136,
    meanCurrentA: 96,
    temperatureStartC: 25,
    temperatureEndC: 25,
    gainErrorFraction: 0.005,
    readingNoiseFraction: 0.003,
    fullChargeEndedBy: 'bms',
    lowestCellAtFullV: 3.5,
    highestCellAtFullV: 3.55,
    lowestCellAtEndV: 2.8,
    highestCellAtEndV: null,
  };
  const conditions: CycleSources = { ...none, counterKind: 'ah', counterValue: 400_000, cyclesPerDay: 1 };

  it('puts capacity, age and cycles of the whole bank together', () => {
    const computed = computeCheck({ reading, conditions }, bank, null, { testedOn: '2025-11-02', efc: 650 });
    expect(computed.sohFraction).toBeCloseTo(452 / 480, 12);
    expect(computed.ageYears).toBeCloseTo(1601 / 365.2425, 12);
    expect(computed.efcFromCounter).toBeCloseTo(400_000 / 480, 9);
    expect(computed.efcFromDepth).toBeCloseTo(650 + 0.5 * 365, 9);
    expect(computed.efc).toBe(computed.efcFromCounter);
  });

  it('counts a first check from the month of first use', () => {
    const computed = computeCheck({ reading, conditions }, bank, null, null);
    expect(computed.efcFromDepth).toBeCloseTo(0.5 * 1601, 9);
  });

  it('gives no age below zero', () => {
    const computed = computeCheck(
      { reading: { ...reading, testedOn: '2022-06-03' }, conditions },
      bank,
      null,
      null,
    );
    expect(computed.ageYears).toBe(0);
    expect(computed.efcFromDepth).toBe(0);
  });
});
