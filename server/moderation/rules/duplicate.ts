import { formatDate } from '@/lib/units';

import type { Rule, ScreenPrevious } from '../screenTypes';

const dead = new Set(['draft', 'turnedAway', 'withdrawn', 'recalled']);

/** The same test given twice: another check of the bank on that day, or one with the very same figures. */
export const duplicate: Rule = ({ fields: { reading }, previousChecks }) => {
  const others = previousChecks.filter(({ state }) => !dead.has(state));
  const sameDay = others.find(({ testedOn }) => testedOn === reading.testedOn);
  const sameFigures = others.find(hasSameFigures);
  const other = sameDay ?? sameFigures;
  if (!other) return null;
  const what = sameDay ? 'on the same day' : 'with the very same Ah and Wh';
  const where = `Another check of this bank, ${what}, is dated ${formatDate(other.testedOn)}`;
  return {
    rule: 'duplicate',
    title: sameDay ? 'Second check of a day' : 'Same figures twice',
    severity: 'doubtful',
    ownerText: `${where}. If it is the same test, withdraw one of the two.`,
    moderatorText: `${where} (${other.state === 'approved' ? 'approved' : 'not yet approved'}).`,
    evidence: { otherCheckId: other.checkId, otherTestedOn: other.testedOn },
  };

  function hasSameFigures({ fields }: ScreenPrevious): boolean {
    return fields.reading.capacityAh === reading.capacityAh && fields.reading.energyWh === reading.energyWh;
  }
};
