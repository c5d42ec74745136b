import { claimConditions } from '@/components/cells/cellWords';
import type { Claim } from '@/lib/contract/cells';

const whole: Claim = {
  ...{ id: 'a', cycles: 4000, endOfLifeFraction: 0.8, whereItStands: 'Sheet, page 2.' },
  ...{ depthFraction: 1, chargeIt: 0.5, dischargeIt: 0.05, temperatureC: 25 },
  ...{ clamping: 'clamped', clampForceN: 3000, efc: 4000, label: null, labelAbsence: 'noFit' },
};
/** A blank between figure and unit does not break. */
const plain = (claim: Claim) => claimConditions(claim).replace(/\s/g, ' ');

describe('the conditions of a claim in words', () => {
  it('are all named where all are stated', () => {
    expect(plain(whole)).toBe('100 % deep, charged at 0.5 It, discharged at 0.05 It, 25 °C, clamped');
  });

  it.each([
    ['depthFraction', null],
    ['chargeIt', null],
    ['dischargeIt', null],
    ['temperatureC', null],
    ['clamping', 'notStated'],
  ] as const)('do not look whole without %s', (field, missing) => {
    expect(plain({ ...whole, [field]: missing })).toMatch(/; others not stated$/);
  });

  it('are said not to be stated where none is', () => {
    const none = { depthFraction: null, chargeIt: null, dischargeIt: null, temperatureC: null };
    expect(plain({ ...whole, ...none, clamping: 'notStated' })).toBe('conditions not stated');
  });
});
