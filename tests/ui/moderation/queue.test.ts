import { readCorrections } from '@/components/moderation/CorrectionFields';
import { readFilters, writeFilters } from '@/components/moderation/queueFilters';
import { templatesFor } from '@/components/moderation/questionTemplates';
import { nextFree } from '@/components/moderation/useQueuePlace';
import type { Finding, QueueEntry } from '@/lib/contract/moderation';

describe('the filters in the address', () => {
  it('come back as they were written', () => {
    const filters = { state: 'approved', severity: 'look', cellType: 'skerry-240', rule: 'burst' } as const;
    expect(readFilters(writeFilters(filters))).toEqual(filters);
    expect(writeFilters({ state: 'submitted' })).toEqual({});
    expect(readFilters({})).toEqual({ state: 'submitted' });
  });

  it('leave out what no queue has', () => {
    expect(readFilters({ state: 'lost', severity: 'bad', rule: ['a', 'b'], cellType: '' })).toEqual({
      state: 'submitted',
    });
  });
});

describe('the next one', () => {
  const entry = (checkId: string, more: Partial<QueueEntry> = {}) =>
    ({ checkId, isOwn: false, claimedBy: null, ...more }) as QueueEntry;

  it('is the first after this one that is free, then from the top', () => {
    const queue = [
      entry('a'),
      entry('b'),
      entry('c', { claimedBy: 'other' }),
      entry('d', { isOwn: true }),
      entry('e', { claimedBy: 'me' }),
    ];
    expect(nextFree(queue, 'b')?.checkId).toBe('e');
    expect(nextFree(queue, 'e')?.checkId).toBe('a');
    expect(nextFree(queue, 'gone')?.checkId).toBe('a');
  });

  it('is none where all others are taken or own', () => {
    expect(nextFree([entry('a'), entry('b', { isOwn: true })], 'a')).toBeUndefined();
    expect(nextFree([], 'a')).toBeUndefined();
  });
});

it('offers the questions for what was found first, and all of them', () => {
  const finding = { rule: 'counterBackwards', severity: 'doubtful' } as Finding;
  const fits = { rule: 'capacityRise', severity: 'fits' } as Finding;
  const found = templatesFor({ findings: [fits, finding] }).map(({ key }) => key);
  expect(found[0]).toBe('counter');
  expect([...found].sort()).toEqual(
    templatesFor({ findings: [] })
      .map(({ key }) => key)
      .sort(),
  );
});

describe('typed corrections', () => {
  it('are read in stored units; what is empty stays out', () => {
    const { values, errors } = readCorrections({ capacityAh: '226,4', energyWh: '11.6', durationS: ' ' });
    expect(values).toEqual({ capacityAh: 226.4, energyWh: 11_600 });
    expect(errors).toEqual({});
  });

  it('that are no numbers are named beside their field', () => {
    expect(readCorrections({ meanCurrentA: 'much' })).toEqual({
      values: {},
      errors: { 'corrections.meanCurrentA': 'Enter a number.' },
    });
  });
});
