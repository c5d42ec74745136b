import { cellTypeOf } from '@/data/demo/cellTypes';
import type { DemoBank, DemoCheck } from '@/data/demo/types';
import type { Computed } from '@/lib/contract/checks';
import { computeCheck } from '@/lib/measure';

import { severityOrder } from '../db/models';
import { screen, worstSeverity } from '../moderation/screen';
import type { ScreenBank, ScreenFinding, ScreenPrevious } from '../moderation/screenTypes';

/** A check of the demo with what the product works out from it. */
export interface ComputedDemoCheck {
  check: DemoCheck;
  computed: Computed;
  findings: ScreenFinding[];
  severity: number;
}

/** Computes and screens the checks of a bank in their order, each as it would have been when it came in. */
export function computeBank(bank: DemoBank): ComputedDemoCheck[] {
  const { parallel, series, firstUseMonth, cellTypeId } = bank.fields;
  const { ratedAh: ratedAhCell, nominalV } = cellTypeOf(cellTypeId);
  const described: ScreenBank = {
    ...{ parallel, series, ratedAhCell, nominalV, firstUseMonth },
    events: bank.events,
  };
  const before: ScreenPrevious[] = [];
  return bank.checks.map((check) => {
    const { fields, id, state } = check;
    const { testedOn } = fields.reading;
    const standing = before.filter((other) => other.state === 'approved' && other.testedOn < testedOn).at(-1);
    const previous = standing ? { testedOn: standing.testedOn, efc: standing.computed.efc } : null;
    const computed = computeCheck(fields, described, null, previous);
    const findings = screen({
      ...{ bank: described, fields, computed, log: null },
      previousChecks: [...before],
      sameLogCheckIds: [],
    });
    before.push({ checkId: id, testedOn, state, fields, computed });
    return { check, computed, findings, severity: severityOrder.indexOf(worstSeverity(findings)) };
  });
}
