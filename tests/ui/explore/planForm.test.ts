import { addressOfPlans, plansOfAddress } from '@/components/plan/planAddress';
import { defaultPlan, planSchema } from '@/components/plan/planForm';
import { costRange, lifeSentence, pricePerKwh, shortWords } from '@/components/plan/planWords';
import type { PlanResult } from '@/lib/plan';

describe('planSchema', () => {
  it('reads the default plan into SI units and minor units', () => {
    const { input, fixtureMinor } = planSchema.parse(defaultPlan);
    expect(input).toMatchObject({
      nightWh: 6000,
      ratedWh: 15_000,
      usableFraction: 0.9,
      cellsMinor: 180_000,
      chargingMinorPerKwh: 8,
      tariffMinorPerKwh: 30,
      discountRate: 0.03,
      isClamped: false,
    });
    expect(fixtureMinor).toBeNull();
  });

  it.each([
    ['usable', '900', /At most 100/],
    ['night', 'a lot', /Enter a number/],
    ['heat', '-40', /At least -10/],
    ['cells', '', /needed/],
  ] as const)('says beside %s what is wrong with "%s"', (key, value, message) => {
    const result = planSchema.safeParse({ ...defaultPlan, [key]: value });
    expect(result.error?.issues.map(({ path }) => path[0])).toEqual([key]);
    expect(result.error?.issues[0]?.message).toMatch(message);
  });

  it('keeps parts of a cent in a price per kWh', () => {
    expect(planSchema.parse({ ...defaultPlan, charging: '0.085' }).input.chargingMinorPerKwh).toBeCloseTo(
      8.5,
    );
  });
});

describe('the address of plans', () => {
  it('holds only what differs, and reads back the same', () => {
    const first = { ...defaultPlan, night: '8', clamped: 'yes' as const };
    const second = { ...first, size: '20' };
    const address = addressOfPlans([first, second]);
    const written = Object.fromEntries(Object.entries(address).filter(([, value]) => value !== undefined));
    expect(written).toEqual({ night: '8', clamped: 'yes', beside: '1', 'beside.size': '20' });
    expect(plansOfAddress(written)).toEqual([first, second]);
  });

  it('takes nonsense as typed text, cut to a length, so that the field can say what is wrong', () => {
    const [plan] = plansOfAddress({ night: 'x'.repeat(500), clamped: 'perhaps', usable: ['1', '2'] });
    expect(plan?.night).toHaveLength(80);
    expect(plan?.clamped).toBe('no');
    expect(plan?.usable).toBe(defaultPlan.usable);
  });
});

describe('words of a plan', () => {
  const plan = {
    years: { estimate: 21, lower: 18, upper: 21 },
    life: { status: 'projected' },
    endedBy: 'calendar',
    shortYears: null,
    isCapped: false,
  } as PlanResult;

  it('says that a capped life is at least so long', () => {
    expect(lifeSentence({ ...plan, isCapped: true })).toContain('at least these, the cost at most');
    expect(lifeSentence(plan)).toBe(
      'To 80 % of the rating, projected. Time takes more of it than cycles do.',
    );
  });

  it('gives prices per kWh in thousandths of the major unit', () => {
    expect(pricePerKwh(16.234, 'EUR')).toBe('€0.162');
    expect(costRange({ estimate: 16.2, lower: 15, upper: 18 }, 'EUR')).toBe('€0.162 (0.150–0.180)');
  });

  it('says when the night stops fitting', () => {
    expect(shortWords(plan)).toBe('fits to the end');
    expect(shortWords({ ...plan, shortYears: 0 })).toContain('from the first night');
    expect(shortWords({ ...plan, shortYears: 4.52 })).toMatch(/after 4\.5.years/);
  });
});
