import { defaultPlan, planKeys, type PlanText } from './planForm';

type Params = Record<string, string | string[] | undefined>;

const longest = 80;
/** The second plan's fields stand behind this in the address. */
const besidePrefix = 'beside.';
const isBeside = 'beside';

/** The plans an address holds: what it does not name is as in the default plan, and in the first plan for the second. */
export function plansOfAddress(params: Params): PlanText[] {
  const first = planOf(params, '', defaultPlan);
  return params[isBeside] === undefined ? [first] : [first, planOf(params, besidePrefix, first)];
}

function planOf(params: Params, prefix: string, base: PlanText): PlanText {
  const plan = { ...base };
  for (const key of planKeys) {
    const value = params[prefix + key];
    if (typeof value !== 'string') continue;
    if (key === 'clamped') plan.clamped = value === 'yes' ? 'yes' : 'no';
    else plan[key] = value.slice(0, longest);
  }
  return plan;
}

/** The address's part for some plans: only what differs. `undefined` takes a field out of the address. */
export function addressOfPlans([first = defaultPlan, second]: readonly PlanText[]): Record<
  string,
  string | undefined
> {
  const params: Record<string, string | undefined> = { [isBeside]: second && '1' };
  for (const key of planKeys) {
    params[key] = first[key] === defaultPlan[key] ? undefined : first[key];
    params[besidePrefix + key] = second && second[key] !== first[key] ? second[key] : undefined;
  }
  return params;
}
