import { hidePersonal } from '@/server/moderation/personalText';
import { rules } from '@/server/moderation/rules';
import { ruleOrder } from '@/server/moderation/rules/ruleOrder';
import { screen } from '@/server/moderation/screen';
import type { CurveLikeness, ScreenContext } from '@/server/moderation/screenTypes';

import { type ContextChanges, earlierCheck, screenContext } from './screenContext';

const find = (context: ScreenContext, rule: string) =>
  screen(context).find((finding) => finding.rule === rule);
const severity = (changes: ContextChanges, rule: string, more: Partial<ScreenContext> = {}) =>
  find({ ...screenContext(changes), ...more }, rule)?.severity;

describe('poolResidual', () => {
  const pool = { seenFraction: 0.95, expectedFraction: 0.9, t: 0, others: 2 };

  // Cuts of the outlier screen: listed from 3.5, set aside from 4.
  it.each([
    [3.49, 'fits'],
    [3.5, 'look'],
    [-3.99, 'look'],
    [4, 'doubtful'],
    [-6, 'doubtful'],
  ])('with t of %s is %s', (t, expected) => {
    expect(severity({}, 'poolResidual', { pool: { ...pool, t } })).toBe(expected);
  });

  it('is a look only where an event explains it, and names a real failure', () => {
    const event = (kind: 'cellFailed' | 'rebalanced', happenedOn = '2026-10-01') => ({
      bank: { events: [{ happenedOn, kind, note: '' }] },
      previousChecks: [earlierCheck()],
    });
    const low = { pool: { ...pool, t: -8 } };
    expect(severity(event('cellFailed'), 'poolResidual', low)).toBe('look');
    expect(find({ ...screenContext(event('cellFailed')), ...low }, 'poolResidual')?.moderatorText).toMatch(
      /real failure belongs in the pool/,
    );
    expect(severity(event('rebalanced'), 'poolResidual', { pool: { ...pool, t: 8 } })).toBe('look');
    // A rebalance takes no capacity away, and an event before the last check explains nothing after it.
    expect(severity(event('rebalanced'), 'poolResidual', low)).toBe('doubtful');
    expect(severity(event('cellFailed', '2025-06-01'), 'poolResidual', low)).toBe('doubtful');
  });

  it('says nothing without a working fit, and says on what it rests', () => {
    expect(severity({}, 'poolResidual')).toBeUndefined();
    const finding = find({ ...screenContext(), pool: { ...pool, t: 5.25 } }, 'poolResidual');
    expect(finding?.moderatorText).toMatch(/2 approved checks and the pool: 5\.3 standard deviations above/);
    expect(finding?.evidence).toEqual({ seenFraction: 0.95, expectedFraction: 0.9, t: 5.25, otherChecks: 2 });
    const alone = find({ ...screenContext(), pool: { ...pool, others: 0 } }, 'poolResidual');
    expect(alone?.moderatorText).toMatch(/banks used like it \(60\s% deep, 22\s°C\)/);
  });
});

describe('sameCurve', () => {
  const same: CurveLikeness = {
    ...{ voltageFraction: 0.00012, currentFraction: 0.0009, temperatureK: 0.35, durationFraction: 0.002 },
    detailCorrelation: 1,
  };
  const with_ = (changes: Partial<CurveLikeness>) =>
    severity({ log: {} }, 'sameCurve', { nearestLog: { ...same, ...changes } });

  it('is doubtful up to the edge of what rounding leaves, and no further', () => {
    expect(with_({})).toBe('doubtful');
    expect(with_({ voltageFraction: 0.00013 })).toBe('fits');
    expect(with_({ durationFraction: 0.0021 })).toBe('fits');
  });

  it('is a look for a thinned copy of the same day, and fits for another day', () => {
    const thinned = { voltageFraction: 0.0007, currentFraction: 0.004, durationFraction: 0.004 };
    expect(with_({ ...thinned, temperatureK: 0.05 })).toBe('look');
    expect(with_({ ...thinned, temperatureK: 0.06 })).toBe('fits');
  });

  it('leaves the very same bytes to their own rule, and says nothing without a log', () => {
    const others = { sameLogCheckIds: ['6f9619ff-8b86-4011-b42d-00c04fc964ff'] };
    expect(severity({ log: {}, ...others }, 'sameCurve', { nearestLog: same })).toBeUndefined();
    expect(severity({}, 'sameCurve', { nearestLog: same })).toBeUndefined();
    expect(severity({ log: {} }, 'sameCurve')).toBeUndefined();
  });
});

describe('samePhoto', () => {
  it.each([
    [{ same: 1, nearestBits: 0 }, 'doubtful'],
    [{ same: 0, nearestBits: 2 }, 'doubtful'],
    [{ same: 0, nearestBits: 3 }, 'look'],
    [{ same: 0, nearestBits: 6 }, 'look'],
    [{ same: 0, nearestBits: 7 }, 'fits'],
    [{ same: 0, nearestBits: null }, 'fits'],
  ])('with %j is %s', (photo, expected) => {
    expect(severity({}, 'samePhoto', { photo })).toBe(expected);
  });

  it('says nothing without a photo', () => {
    expect(severity({}, 'samePhoto')).toBeUndefined();
  });
});

describe('burst and alikeAccounts', () => {
  it.each([
    [1, 'fits'],
    [12, 'fits'],
    [13, 'look'],
    [40, 'look'],
    [41, 'doubtful'],
  ])('%s checks in an hour are %s', (submittedInHour, expected) => {
    expect(severity({}, 'burst', { account: { submittedInHour, alikeAccounts: 0 } })).toBe(expected);
  });

  it.each([
    [0, 'fits'],
    [1, 'look'],
    [9, 'look'],
  ])('%s accounts of the same make-up are %s, never more', (alikeAccounts, expected) => {
    expect(severity({}, 'alikeAccounts', { account: { submittedInHour: 1, alikeAccounts } })).toBe(expected);
  });

  it('say nothing where the account is not known', () => {
    expect(severity({}, 'burst')).toBeUndefined();
    expect(severity({}, 'alikeAccounts')).toBeUndefined();
  });
});

describe('personalText', () => {
  const note = (text: string) => {
    const context = screenContext();
    return find({ ...context, fields: { ...context.fields, note: text } }, 'personalText');
  };

  it.each([
    ['Write to anna.b@example.org if unclear.', 'e-mail address'],
    ['anna (at) example.org', 'e-mail address'],
    ['Call me on +44 20 7946 0958.', 'phone number'],
    ['My number is 0171 555 12 34', 'phone number'],
    ['We are at 12 Harbour View Road, next to the quay.', 'street address'],
    ['Haus in der Lindenstraße 14', 'street address'],
    ['The shed is at 54.6012, -3.1347.', 'coordinates'],
    ["54° 36.1' N", 'coordinates'],
    ['See www.example.org/shed', 'web address'],
  ])('finds what is in %j', (text, kind) => {
    expect(note(text)).toMatchObject({ severity: 'look', evidence: { kinds: kind } });
    expect(hidePersonal(text)).toContain(`[${kind} hidden]`);
  });

  it.each([
    'Charged to 3.55 V, 452.3 Ah at 0.2 It, 24 °C; ended by cell 7 at 2.612 V after 4.75 h.',
    'Test of 2026-11-02, second of 2, counter at 104512 Ah.',
    'Cells 0301 to 0316 rebalanced on 2025-06-14, 3.600 V, 12.5 A.',
    'Inverter stops at 48.0, starts at 51.2 V. Road noise on the shunt.',
  ])('leaves %j alone', (text) => {
    expect(note(text)?.severity).toBe('fits');
    expect(hidePersonal(text)).toBe(text);
  });

  it('says nothing of nothing, and looks into event notes and the meter’s name', () => {
    const context = screenContext({ reading: { instrument: '', endedByCell: null } });
    expect(find(context, 'personalText')).toBeUndefined();
    const events = [{ happenedOn: '2025-01-01', kind: 'sold' as const, note: 'to bob@example.org' }];
    expect(severity({ bank: { events } }, 'personalText')).toBe('look');
    expect(severity({ reading: { instrument: 'Meter of bob@example.org' } }, 'personalText')).toBe('look');
  });
});

describe('counterRate', () => {
  // 200 full cycles in 365 days: 0.548 a day. At 0.1 It discharging and 0.15 It charging: 5.48 h + 3.65 h.
  const hours = 200 / 365 / 0.15;
  it('fits where the day is long enough', () => {
    const finding = find(screenContext({ previousChecks: [earlierCheck()] }), 'counterRate');
    expect(finding?.severity).toBe('fits');
    expect(finding?.evidence.hoursADay).toBeCloseTo(200 / 365 / 0.1 + hours, 2);
  });

  it.each([
    // Discharging may take what charging leaves of 24 h, or of 30 h for a look.
    [200 / 365 / (24 - hours) + 1e-9, 'fits'],
    [200 / 365 / (24 - hours) - 1e-4, 'look'],
    [200 / 365 / (30 - hours) - 1e-4, 'doubtful'],
  ])('at a rate of %s It is %s', (dischargeIt, expected) => {
    const changes = { conditions: { dischargeIt }, previousChecks: [earlierCheck()] };
    expect(severity(changes, 'counterRate')).toBe(expected);
  });

  it('goes by the peak where it is given', () => {
    const changes = { conditions: { dischargeIt: 0.02, peakIt: 0.5 }, previousChecks: [earlierCheck()] };
    expect(severity(changes, 'counterRate')).toBe('fits');
  });
});

describe('counterUnit', () => {
  // A year at one cycle of 60 % a day: 219 by depth. The bank is of 460 Ah and 23.55 kWh.
  const previousChecks = [earlierCheck()];
  const efcFromDepth = 400 + 219;
  const context = (kind: 'efc' | 'ah' | 'kwh', counterValue: number, efcFromCounter: number) =>
    screenContext({
      conditions: { counterKind: kind, counterValue },
      computed: { efc: efcFromCounter, efcFromCounter, efcFromDepth },
      previousChecks,
    });

  it('reads Ah given as full cycles', () => {
    const finding = find(context('efc', 276_000, 276_000), 'counterUnit');
    expect(finding).toMatchObject({ severity: 'repairable', evidence: { repairedKind: 'ah' } });
    expect(finding?.evidence.repairedEfc).toBe(600);
  });

  it('reads Wh given as kWh', () => {
    const kwh = 600 * 23.552;
    const finding = find(context('kwh', kwh * 1000, 600_000), 'counterUnit');
    expect(finding?.evidence).toMatchObject({ repairedKind: 'kwh', repairedEfc: 600 });
  });

  it('is silent within five times the cycles by depth, and speaks beyond', () => {
    expect(severityOfCounter(400 + 219 * 4.9)).toBeUndefined();
    // 219 x 5.1 more would be found only if another unit fits: 460 times the charge does not.
    expect(severityOfCounter(400 + 219 * 5.1)).toBeUndefined();
    expect(find(context('ah', 600, 600 / 460), 'counterUnit')?.evidence.repairedKind).toBe('efc');
  });

  function severityOfCounter(efcFromCounter: number) {
    return find(context('efc', efcFromCounter, efcFromCounter), 'counterUnit')?.severity;
  }
});

describe('counterStill', () => {
  // Since 2 Nov 2025, 365 days: 0.005 a day are 1.825 full cycles.
  it.each([
    [401.8, 'doubtful'],
    [401.83, 'fits'],
    [600, 'fits'],
  ])('a counter at %s after 400 is %s', (counterValue, expected) => {
    expect(severity({ conditions: { counterValue }, previousChecks: [earlierCheck()] }, 'counterStill')).toBe(
      expected,
    );
  });

  it('takes days idle out', () => {
    const changes = { conditions: { counterValue: 401, idleDays: 340 }, previousChecks: [earlierCheck()] };
    expect(severity(changes, 'counterStill')).toBeUndefined();
  });
});

describe('layoutSwapped', () => {
  it('is repairable where the other way round fits', () => {
    // 437 Ah and 22.4 kWh of a 2p16s bank, given as 16p2s.
    const swapped = screenContext({ bank: { parallel: 16, series: 2 } });
    const finding = find(swapped, 'layoutSwapped');
    expect(finding?.severity).toBe('repairable');
    expect(finding?.evidence.swappedSohFraction).toBeCloseTo(0.95, 6);
    expect(finding?.evidence.swappedCellV).toBeCloseTo(3.2, 6);
  });

  it('leaves one that is longer than wide to the slips of scale', () => {
    // Sixteen times the charge of a 1p16s bank could be a 16p1s one; such banks are rare at home.
    const added = { bank: { parallel: 1, ratedAhCell: 460 }, reading: { capacityAh: 437 * 16 } };
    expect(severity(added, 'layoutSwapped')).toBeUndefined();
    expect(severity(added, 'seriesAddedUp')).toBe('repairable');
  });

  it('is silent for the right layout, for one as long as wide, and where only one of the two fits', () => {
    expect(severity({}, 'layoutSwapped')).toBeUndefined();
    expect(severity({ bank: { parallel: 4, series: 4 } }, 'layoutSwapped')).toBeUndefined();
    const wrongVoltage = { bank: { parallel: 16, series: 2 }, reading: { energyWh: 437 * 16 * 4 } };
    expect(severity(wrongVoltage, 'layoutSwapped')).toBeUndefined();
  });

  it('takes the lowest share of rated that banks show as its edge', () => {
    // 0.6 of rated is plausible, and a hair less is not.
    const at = (soh: number) => {
      const capacityAh = 460 * soh;
      return severity(
        { bank: { parallel: 16, series: 2 }, reading: { capacityAh, energyWh: capacityAh * 51.2 } },
        'layoutSwapped',
      );
    };
    expect(at(0.6001)).toBe('repairable');
    expect(at(0.5999)).toBeUndefined();
  });
});

describe('units of energy, charge and temperature', () => {
  it('proposes Wh for kWh', () => {
    const finding = find(screenContext({ reading: { energyWh: 22.3744 } }), 'energyUnit');
    expect(finding).toMatchObject({ severity: 'repairable', evidence: { repairedWh: 22374.4 } });
    expect(severity({}, 'energyUnit')).toBeUndefined();
    // 3.0 V is the least a discharge shows; a hair below no factor of a thousand helps.
    expect(severity({ reading: { energyWh: 437 * 16 * 2.999 } }, 'energyUnit')).toBeUndefined();
    expect(severity({ reading: { energyWh: (437 * 16 * 3.001) / 1000 } }, 'energyUnit')).toBe('repairable');
  });

  it('proposes the charge for energy in kWh', () => {
    const finding = find(screenContext({ reading: { capacityAh: 22.3744 } }), 'kWhForAh');
    expect(finding?.evidence.repairedAh).toBeCloseTo(437, 2);
    expect(severity({}, 'kWhForAh')).toBeUndefined();
    expect(severity({ reading: { capacityAh: 224 } }, 'kWhForAh')).toBeUndefined();
  });

  it.each([
    [48, 24, undefined],
    [48.1, 24, 'repairable'],
    [77, 24, 'repairable'],
    [70, 24, 'repairable'],
    [24, 24, undefined],
  ])('a test from %s to %s °C is %s', (temperatureStartC, temperatureEndC, expected) => {
    expect(severity({ reading: { temperatureStartC, temperatureEndC } }, 'temperatureUnit')).toBe(expected);
  });

  it('does not propose what no cell lives at', () => {
    const finding = find(screenContext({ conditions: { temperatureMeanC: 110 } }), 'temperatureUnit');
    expect(finding?.severity).toBe('doubtful');
    expect(finding?.evidence).toEqual({ typedC: 110 });
  });
});

it('has a place for every rule among findings of one severity', () => {
  const found = screen({
    ...screenContext({ log: {}, previousChecks: [earlierCheck()], computed: { efcFromDepth: 600 } }),
    pool: { seenFraction: 0.95, expectedFraction: 0.95, t: 0, others: 1 },
    account: { submittedInHour: 1, alikeAccounts: 0 },
  }).map(({ rule }) => rule);
  expect(found.length).toBeGreaterThan(15);
  expect(ruleOrder).toEqual(expect.arrayContaining(found));
  expect(ruleOrder).toHaveLength(rules.length);
});
