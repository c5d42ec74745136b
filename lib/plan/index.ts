export { capacityPath, type CapacityPath, type NightUse, type PathPoint } from './capacityPath';
export { fixtureBreakEven, type FixtureWorth } from './fixture';
export { energyOfLoads, type Load } from './loads';
export { annuityFactor, breakEvenYears, capitalRecoveryFactor, discountFactor, levelisedCost } from './money';
export { planBank } from './planBank';
export type { PlanInput, PlanResult } from './planTypes';
export { sizeCurve, type SizePoint } from './sizeCurve';
