import { changeWords, effectNote, ratioWords, verdictWords } from '@/components/cells/effectWords';
import type { LeverEffect } from '@/lib/contract/effects';

const effect = (change: Partial<LeverEffect> = {}): LeverEffect => ({
  lever: 'heat',
  scenario: 'typical',
  from: 30,
  to: 20,
  ratio: { estimate: 1.388, lower: 1.33, upper: 1.47 },
  priorShareFraction: 0.03,
  isAtLeast: false,
  isLeaning: false,
  verdict: 'shown',
  detectableRatio: 1.07,
  evidence: null,
  ...change,
});

describe('an effect in words', () => {
  test('has the four verdicts in their one wording', () => {
    expect(verdictWords(effect())).toBe('shown');
    expect(verdictWords(effect({ verdict: 'tooSmall' }))).toBe('too small to matter');
    const doubtful = effect({ verdict: 'couldBeNone', ratio: { estimate: 1.04, lower: 0.98, upper: 1.1 } });
    expect(verdictWords(doubtful)).toBe('could be none, or 0.98 to 1.10');
    expect(verdictWords(effect({ verdict: 'notMeasured' }))).toBe('not measured yet');
  });

  test('shows no number while it is not measured', () => {
    expect(ratioWords(effect())).toBe('×1.39');
    expect(ratioWords(effect({ verdict: 'notMeasured' }))).toBeUndefined();
    expect(effectNote(effect({ verdict: 'notMeasured', priorShareFraction: 0.62 }))).not.toContain('1.33');
  });

  test('names what is changed to what', () => {
    expect(changeWords(effect())).toBe('30 → 20 °C');
    expect(changeWords(effect({ lever: 'depth', from: 0.8, to: 0.5 }))).toBe('80 → 50 %');
    expect(changeWords(effect({ lever: 'clampingHighRate', from: false, to: true }))).toBe('above 0.3 It');
  });

  test('says at least for guessed conditions, marks what leans, and names banks and owners of a rate class', () => {
    expect(effectNote(effect({ isAtLeast: true }))).toMatch(/^at least/);
    expect(effectNote(effect({ isLeaning: true, priorShareFraction: 0.31 }))).toMatch(
      /leans on published studies \(31.%\)/,
    );
    const evidence = { clamped: { banks: 123, owners: 120 }, unclamped: { banks: 118, owners: 115 } };
    expect(effectNote(effect({ evidence }))).toContain('123 banks clamped, 118 not, of 120 and 115 owners');
  });
});
