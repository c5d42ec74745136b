import { comparedPart } from '@/components/compare/comparedCells';
import { probabilityWords } from '@/components/compare/OutlastPart';
import { verdictOf } from '@/components/questions/EndAnswer';
import { clampingSentence, conclusion } from '@/components/questions/questionWords';
import type { LeverEffect } from '@/lib/contract/effects';

const effect: LeverEffect = {
  lever: 'clampingHighRate',
  scenario: 'hard',
  from: false,
  to: true,
  ratio: { estimate: 1.3, lower: 1.15, upper: 1.47 },
  priorShareFraction: 0.1,
  isAtLeast: false,
  isLeaning: false,
  verdict: 'shown',
  detectableRatio: 1.1,
  evidence: null,
};

describe('conclusion', () => {
  const say = (part: Partial<LeverEffect>) => conclusion({ ...effect, ...part }, 'Going down', 'A lower one');

  it('follows from the verdict', () => {
    expect(say({})).toBe(
      'A lower one lasts longer. Going down multiplies a bank’s life by ×1.30 (×1.15 to ×1.47).',
    );
    expect(say({ isAtLeast: true })).toContain('by at least ×1.30');
    expect(say({ verdict: 'tooSmall' })).toContain('no difference that matters');
    expect(say({ verdict: 'couldBeNone' })).toContain('can’t tell yet');
    expect(say({ verdict: 'notMeasured' })).not.toMatch(/[0-9]/);
  });

  it('does not praise the change when the pool shows the reverse', () => {
    const said = say({ ratio: { estimate: 0.8, lower: 0.7, upper: 0.9 } });
    expect(said).toContain('reverse');
    expect(said).not.toContain('lasts longer');
  });
});

describe('clampingSentence', () => {
  it.each([
    [1.1, 'That pays for it.'],
    [1.6, 'That does not pay for it.'],
    [1.3, 'can not be told yet'],
  ])('against a break-even of ×%s', (ratio, words) => {
    expect(clampingSentence(effect, ratio)).toContain(words);
  });

  it('gives no number where none is measured', () => {
    expect(clampingSentence({ ...effect, verdict: 'notMeasured' }, 1.1)).toBe(
      'What clamping does above 0.3 It is not measured yet.',
    );
  });
});

it('tells time from cycles only where the range does', () => {
  expect(verdictOf({ lower: 0.55, upper: 0.8 })).toBe('time takes more');
  expect(verdictOf({ lower: 0.2, upper: 0.49 })).toBe('cycles take more');
  expect(verdictOf({ lower: 0.4, upper: 0.6 })).toBe('could be either');
});

describe('the address of a comparison', () => {
  it('takes up to four known names, and says what it leaves out', () => {
    expect(comparedPart.read({ cells: 'a-1,b-2,a-1' })).toEqual({ ids: ['a-1', 'b-2'], notes: [] });
    const many = comparedPart.read({ cells: Array.from({ length: 40 }, (_, i) => `c-${i}`).join(',') });
    expect(many.ids).toHaveLength(4);
    expect(many.notes[0]).toContain('At most 4');
    expect(comparedPart.read({ cells: '../../etc,<b>' }).ids).toEqual([]);
    expect(comparedPart.read({}).ids).toEqual([]);
    expect(comparedPart.write({ ids: ['a', 'b'], notes: [] })).toEqual({ cells: 'a,b' });
  });

  it('never prints certainty', () => {
    expect(probabilityWords(0.9999)).toBe('over 99 %');
    expect(probabilityWords(0.83)).toBe('83 %');
  });
});
