import {
  absenceSentence,
  calendarSentence,
  contributionSentence,
  forecastFigure,
  forecastTold,
  standingSentence,
  usedWords,
} from '@/components/banks/standingWords';
import type { Forecast, Pace } from '@/lib/contract/standing';

const near = (estimate: number, lower: number, upper: number) => ({ estimate, lower, upper });
const pace = (faster: [number, number, number], ratio: [number, number, number] = [0.8, 0.7, 0.9]): Pace => ({
  fasterFraction: near(...faster),
  ratio: near(...ratio),
});
const placed = (one: Pace | null, checksUsed = 4) => ({ pace: one, basis: 'cellType' as const, checksUsed });

const forecast: Forecast = {
  years: near(17.2, 13.1, 23.9),
  efc: near(3200, 2400, 4400),
  inYear: { estimate: 2037, lower: 2033, upper: 2044 },
  status: 'projected',
  support: 'shown',
  passedFraction: 0.01,
  calendarFraction: near(0.64, 0.55, 0.72),
};

describe('standingSentence', () => {
  it('counts the banks that fade faster, with the range', () => {
    expect(standingSentence(placed(pace([0.62, 0.38, 0.81])))).toBe(
      'It ages slower than 6 in 10 banks used like it (90 % range: slower than 4 to 8 in 10).',
    );
  });

  it('turns round for a bank that ages faster than most', () => {
    expect(standingSentence(placed(pace([0.12, 0.05, 0.3])))).toBe(
      'It ages faster than 9 in 10 banks used like it (90 % range: faster than 7 to 9 in 10).',
    );
  });

  it('says "a little" where its pace is within 10 % of the typical one', () => {
    expect(standingSentence(placed(pace([0.62, 0.38, 0.81], [0.94, 0.8, 1.05])))).toContain(
      'a little slower',
    );
  });

  it('says that it is too early where the range is wide, and that nothing can be said without a pace', () => {
    expect(standingSentence(placed(pace([0.55, 0.1, 0.92]), 1))).toBe(
      'Too early to tell whether it ages faster or slower than banks used like it: after one check it could age slower than 1 to 9 in 10 of them.',
    );
    expect(standingSentence(placed(null))).toBeNull();
  });

  it('names the wider company of a thin cell type', () => {
    expect(standingSentence({ ...placed(pace([0.62, 0.38, 0.81])), basis: 'pool' })).toContain(
      'banks of any cell type used like it',
    );
  });
});

describe('forecastFigure', () => {
  it('gives the year with its range', () => {
    expect(forecastFigure(forecast)).toEqual({
      value: '2037',
      words: '80 % of rated, projected; 90 % range 2033–2044',
    });
  });

  it('leaves the end of a range open that lies past the readings', () => {
    const open = { ...forecast, inYear: { ...forecast.inYear, upper: null } };
    expect(forecastFigure(open).words).toContain('from 2033, its end past the readings');
  });

  it.each([
    ['range', { status: 'extrapolated' }, '2033–2044'],
    ['beyond', { status: 'beyond' }, '–'],
    ['notMeasured', { support: 'notMeasured' }, '–'],
    ['passed', { passedFraction: 0.7 }, '2037'],
  ] as const)('tells %s', (told, change, value) => {
    const one = { ...forecast, ...change };
    expect(forecastTold(one)).toBe(told);
    expect(forecastFigure(one).value).toBe(value);
  });
});

describe('calendarSentence', () => {
  it('names what takes more, or that it can not be told', () => {
    expect(calendarSentence(forecast)).toContain('the calendar takes more than cycling');
    expect(calendarSentence({ ...forecast, calendarFraction: near(0.3, 0.2, 0.4) })).toContain(
      'cycling takes more than the calendar',
    );
    expect(calendarSentence({ ...forecast, calendarFraction: near(0.5, 0.3, 0.7) })).toContain(
      "can't be told yet",
    );
  });
});

describe('contributionSentence', () => {
  const cellType = { checks: { from: 42, to: 42 }, banks: { from: 10, to: 19 } };

  it('counts own checks among the published ones, small counts between two numbers', () => {
    expect(contributionSentence({ approved: 1, published: 1, cellType })).toBe(
      'Your approved check is one of the 42 checks published on this cell type, of 10 to 19 banks.',
    );
    expect(contributionSentence({ approved: 3, published: 2, cellType })).toBe(
      'Of your 3 approved checks 2 are among the 42 checks published on this cell type, of 10 to 19 banks.',
    );
  });

  it('says what waits, what has too few owners, and that nothing counts yet', () => {
    expect(contributionSentence({ approved: 2, published: 0, cellType })).toContain('wait to be published');
    expect(contributionSentence({ approved: 2, published: 2, cellType: null })).toContain(
      'Fewer than 5 owners',
    );
    expect(contributionSentence({ approved: 0, published: 0, cellType })).toContain('Nothing yet');
  });
});

describe('absenceSentence', () => {
  it('has words for every state but a placed bank', () => {
    expect(absenceSentence({ state: 'ready', outside: [] })).toBeNull();
    expect(absenceSentence({ state: 'noCheck', outside: [] })).toContain('no approved check');
    expect(absenceSentence({ state: 'noFit', outside: [] })).toContain('not been fitted');
    const outside = [{ condition: 'temperatureC' as const, value: 45, nearest: 33.4 }];
    expect(absenceSentence({ state: 'outside', outside })).toMatch(
      /45.°C \(the nearest it supports is 33.°C\)/,
    );
  });
});

describe('usedWords', () => {
  it('says the use in one line', () => {
    const use = { depthFraction: 0.61, dischargeIt: 0.12, temperatureC: 19.2, socMeanFraction: 0.55 };
    expect(usedWords({ ...use, isClamped: false, efcPerYear: 190.4 }).replaceAll('\u202f', ' ')).toBe(
      '61 % deep at 0.12 It, 190 full cycles a year, near 19 °C, 55 % full on average, not clamped',
    );
  });
});
