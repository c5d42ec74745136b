import type { BankEventKind } from '@/lib/contract/banks';
import { screen } from '@/server/moderation/screen';

import { type ContextChanges, earlierCheck, screenContext } from './screenContext';

const event = (kind: BankEventKind, happenedOn = '2026-05-01') => ({ happenedOn, kind, note: '' });

function severity(rule: string, changes: ContextChanges) {
  return screen(screenContext(changes)).find((finding) => finding.rule === rule)?.severity;
}

describe('counterBackwards', () => {
  it('is doubtful when the counter fell', () => {
    const previousChecks = [earlierCheck({ conditions: { counterValue: 700 } })];
    expect(severity('counterBackwards', { previousChecks })).toBe('doubtful');
  });

  it('is worth a look when the meter was changed in between', () => {
    const previousChecks = [earlierCheck({ conditions: { counterValue: 700 } })];
    const bank = { events: [event('meterChanged')] };
    expect(severity('counterBackwards', { bank, previousChecks })).toBe('look');
  });

  it('fits when it grew, and when it stood still', () => {
    expect(severity('counterBackwards', { previousChecks: [earlierCheck()] })).toBe('fits');
    const stood = [earlierCheck({ conditions: { counterValue: 600 } })];
    expect(severity('counterBackwards', { previousChecks: stood })).toBe('fits');
  });

  it('says nothing without an earlier counter', () => {
    const none = [earlierCheck({ computed: { efcFromCounter: null } })];
    expect(severity('counterBackwards', { previousChecks: none })).toBeUndefined();
  });
});

describe('counterCalendar', () => {
  // 2 Nov 2025 to 2 Nov 2026: 365 days.
  it.each([
    [400 + 365 * 2 + 1, 'doubtful'],
    [400 + 365 * 2, 'fits'],
    [600, 'fits'],
  ])('with %s full cycles after 400 a year ago is %s', (counterValue, expected) => {
    const changes = { conditions: { counterValue }, previousChecks: [earlierCheck()] };
    expect(severity('counterCalendar', changes)).toBe(expected);
  });

  it('counts from first use without an earlier check', () => {
    expect(severity('counterCalendar', { conditions: { counterValue: 2300 } })).toBe('doubtful');
  });

  it('says nothing in the first month', () => {
    const bank = { firstUseMonth: '2026-11' };
    expect(severity('counterCalendar', { bank })).toBeUndefined();
  });
});

describe('typicalCycles', () => {
  // 2 Nov 2025 to 2 Nov 2026, 365 days, at a depth of a half: two such cycles a day are one full cycle.
  it.each([
    [400 + 548, 'doubtful'],
    [400 + 547, 'look'],
    [400 + 365 + 1, 'look'],
    [400 + 365, 'fits'],
    [600, 'fits'],
  ])('with %s full cycles after 400 a year ago is %s', (counterValue, expected) => {
    const conditions = { counterValue, depthFraction: 0.5 };
    expect(severity('typicalCycles', { conditions, previousChecks: [earlierCheck()] })).toBe(expected);
  });

  it('doubts a first use that was typed years too late', () => {
    // 600 in the 306 days from 1 January: 3.3 cycles of 0.6 a day.
    const conditions = { counterValue: 600, depthFraction: 0.6 };
    expect(severity('typicalCycles', { conditions, bank: { firstUseMonth: '2026-01' } })).toBe('doubtful');
  });

  it('leaves it to counterDepth where the cycles a day are given', () => {
    const computed = { efcFromDepth: 500 };
    expect(severity('typicalCycles', { conditions: { counterValue: 4000 }, computed })).toBeUndefined();
  });
});

describe('counterDepth', () => {
  // Since the last check at 400: 200 counted.
  it.each([
    [400 + 200 / 1.6, 'doubtful'],
    [400 + 200 / 1.3, 'look'],
    [400 + 200 / 1.15 + 1e-9, 'fits'],
    [600, 'fits'],
  ])('with %s figured from depth is %s', (efcFromDepth, expected) => {
    expect(severity('counterDepth', { computed: { efcFromDepth }, previousChecks: [earlierCheck()] })).toBe(
      expected,
    );
  });

  it('says nothing where only one of the two is known', () => {
    expect(severity('counterDepth', {})).toBeUndefined();
  });
});

describe('capacityRise', () => {
  // New at each check 0.8 %: the ratio is known to 2 * 0.8 % * sqrt(2) = 2.26 % at 95 %.
  const edge = 437 / (1 + 2 * Math.hypot(0.008, 0.008));

  it('is doubtful beyond the uncertainty of the two checks', () => {
    const previousChecks = [earlierCheck({ reading: { capacityAh: edge - 0.5 } })];
    expect(severity('capacityRise', { previousChecks })).toBe('doubtful');
  });

  it('fits within it', () => {
    const previousChecks = [earlierCheck({ reading: { capacityAh: edge + 0.5 } })];
    expect(severity('capacityRise', { previousChecks })).toBe('fits');
  });

  it.each<BankEventKind>(['rebalanced', 'cellReplaced', 'meterChanged'])(
    'is explained when %s in between',
    (kind) => {
      const previousChecks = [earlierCheck({ reading: { capacityAh: 400 } })];
      expect(severity('capacityRise', { bank: { events: [event(kind)] }, previousChecks })).toBe('look');
    },
  );

  it('is not explained by an event before the earlier check', () => {
    const previousChecks = [earlierCheck({ reading: { capacityAh: 400 } })];
    const bank = { events: [event('rebalanced', '2025-05-01')] };
    expect(severity('capacityRise', { bank, previousChecks })).toBe('doubtful');
  });

  it('allows for both gain errors when the instrument is another', () => {
    // 2 * hypot(.008, .008, .003, .003) = 2.42 %: wider than with the same meter.
    const capacityAh = edge - 0.5;
    const previousChecks = [earlierCheck({ reading: { capacityAh, instrument: 'BMS' } })];
    expect(severity('capacityRise', { previousChecks })).toBe('fits');
  });

  it('is silent where the figure has a slip of scale to mend first', () => {
    const changes = { reading: { capacityAh: 874 }, previousChecks: [earlierCheck()] };
    expect(severity('capacityRise', changes)).toBeUndefined();
  });

  it('does not compare with a check that was turned away', () => {
    const previousChecks = [earlierCheck({ reading: { capacityAh: 400 }, state: 'turnedAway' })];
    expect(severity('capacityRise', { previousChecks })).toBeUndefined();
  });
});

describe('capacityDrop', () => {
  // Allowed in a year: 2.26 % + 5 % x 365/365.2425.
  const allowed = 2 * Math.hypot(0.008, 0.008) + (0.05 * 365) / 365.2425;
  const edge = 446 * (1 - allowed);
  const previousChecks = [earlierCheck()];

  it('is doubtful, and asks what happened, beyond uncertainty and ordinary fade', () => {
    expect(severity('capacityDrop', { reading: { capacityAh: edge - 0.2 }, previousChecks })).toBe(
      'doubtful',
    );
  });

  it('fits just within', () => {
    expect(severity('capacityDrop', { reading: { capacityAh: edge + 0.2 }, previousChecks })).toBe('fits');
  });

  it('fits for ordinary fade', () => {
    expect(severity('capacityDrop', { previousChecks })).toBe('fits');
  });

  it.each<BankEventKind>(['cellFailed', 'swollen'])('is a real failure to keep when %s', (kind) => {
    const changes = { bank: { events: [event(kind)] }, reading: { capacityAh: 330 }, previousChecks };
    const finding = screen(screenContext(changes)).find(({ rule }) => rule === 'capacityDrop');
    expect(finding?.severity).toBe('look');
    expect(finding?.moderatorText).toMatch(/real failure belongs in the pool/);
  });
});

describe('duplicate', () => {
  it('is doubtful for a second check of the same day', () => {
    const previousChecks = [earlierCheck({ reading: { testedOn: '2026-11-02' }, state: 'submitted' })];
    expect(severity('duplicate', { previousChecks })).toBe('doubtful');
  });

  it('is doubtful for the same Ah and Wh on another day', () => {
    const previousChecks = [earlierCheck({ reading: { capacityAh: 437, energyWh: 437 * 16 * 3.2 } })];
    expect(severity('duplicate', { previousChecks })).toBe('doubtful');
  });

  it('says nothing of a day later, nor of a withdrawn check', () => {
    const dayBefore = [earlierCheck({ reading: { testedOn: '2026-11-01' } })];
    expect(severity('duplicate', { previousChecks: dayBefore })).toBeUndefined();
    const withdrawn = [earlierCheck({ reading: { testedOn: '2026-11-02' }, state: 'withdrawn' })];
    expect(severity('duplicate', { previousChecks: withdrawn })).toBeUndefined();
  });
});
