import { bytesWords, runWords, shareWords, spanWords, trailWords } from '@/components/steward/healthWords';
import { readTrailFilters, trailKinds } from '@/components/steward/trailFilters';
import { actionWord, kindWord } from '@/components/steward/trailWords';
import { trailKindSchema } from '@/lib/contract/steward';

describe('words of the health page', () => {
  it('give a span in the unit that reads best', () => {
    expect(spanWords(0.5)).toEqual({ value: '30', unit: 'min' });
    expect(spanWords(1)).toEqual({ value: '1.0', unit: 'h' });
    expect(spanWords(47.9)).toEqual({ value: '47.9', unit: 'h' });
    expect(spanWords(60)).toEqual({ value: '2.5', unit: 'days' });
  });

  it('give sizes in MB and GB', () => {
    expect(bytesWords(12_345_678)).toMatch(/^12\.3\sMB$/);
    expect(bytesWords(2_000_000_000)).toMatch(/^2\.0\sGB$/);
  });

  it('give no share where nothing was decided', () => {
    expect(shareWords({ days: 30, decided: 0, approvedFraction: null })).toBe('none decided');
    expect(shareWords({ days: 30, decided: 8, approvedFraction: 0.75 })).toMatch(/^75\s?% of 8 decided$/);
  });

  it('say why a run failed, and that other code made it', () => {
    const run = { kind: 'public', fittedAt: '2026-12-01T12:00:00.000Z', durationMs: 3000 } as const;
    const good = runWords({ ...run, isGood: true, reason: null, isOfThisCode: true });
    expect(good).toMatch(/^1 Dec 2026.* took /);
    expect(good).not.toMatch(/failed|other code/);
    const bad = runWords({ ...run, isGood: false, reason: 'noData', isOfThisCode: false });
    expect(bad).toMatch(/failed: noData, made by other code$/);
  });

  it('say what is known of the trail, and no more', () => {
    const lastCheck = { at: '2026-12-01T07:00:00.000Z', entries: 12, problems: [], durationMs: 5 };
    expect(trailWords({ entries: 12, isChecking: false, lastCheck: null })).toBe('Not checked yet.');
    expect(trailWords({ entries: 12, isChecking: true, lastCheck })).toBe('Being checked now.');
    expect(trailWords({ entries: 12, isChecking: false, lastCheck })).toMatch(/whole, 12 entries\.$/);
    const problems = [{ id: 3, problem: 'x' }];
    expect(trailWords({ entries: 12, isChecking: false, lastCheck: { ...lastCheck, problems } })).toMatch(
      /1 of 12 entries are not as they were written\.$/,
    );
  });
});

describe('the trail’s filters in the address', () => {
  it('are read, and what can’t be is left out', () => {
    expect(readTrailFilters({ kind: 'check', from: '2026-11-01', to: '2026-11-30', record: ' x ' })).toEqual({
      ...{ kind: 'check', from: '2026-11-01', to: '2026-11-30', record: 'x' },
    });
    expect(readTrailFilters({ kind: 'release' })).toEqual({ kind: 'release' });
    expect(readTrailFilters({ kind: 'other', from: 'x', to: ['2026-11-30'], record: '' })).toEqual({});
  });
});

it('offers every kind of record that the trail is kept of, in words', () => {
  expect(Object.keys(trailKinds)).toEqual(trailKindSchema.options);
  expect(kindWord('release')).toBe('release');
  expect(kindWord('toString')).toBe('toString');
});

it('names of actions read as words', () => {
  expect(actionWord('recalledAtOnce')).toBe('Recalled at once');
  expect(actionWord('locked')).toBe('Locked');
});
