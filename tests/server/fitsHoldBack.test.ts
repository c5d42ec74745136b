import { fitPool } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';
import type { FitOutput, View } from '@/server/fits/fitOutput';
import { ownerKey } from '@/server/fits/describeRows';
import { publicOutput } from '@/server/fits/publicOutput';

/** Three checks of one owner's bank that fades as 0.06 (EFC/500)^0.8, with a little of its own. */
function owner(number: number, depthFraction: number): PoolCheck[] {
  return [1, 2, 3].map((years) => {
    const efc = (150 + 7 * number) * years;
    const wobble = 0.002 * Math.sin(number * 3 + years);
    return {
      bank: `bank-${number}`,
      owner: `owner-${number}`,
      cellType: 'a',
      isClamped: false,
      depthFraction,
      dischargeIt: 0.2,
      temperatureC: 22,
      socMeanFraction: 0.5,
      ageYears: years,
      efc,
      ratedAh: 100,
      capacityAh: 100 * (1 - 0.06 * (efc / 500) ** 0.8 + wobble),
      relSd: 0.01,
    };
  });
}

const owners = (from: number, to: number, depth: number) =>
  Array.from({ length: to - from + 1 }, (_, i) => owner(from + i, depth)).flat();

const viewOf = ({ views }: FitOutput, bandKey: string | null): View => {
  const view = views.find((candidate) => candidate.bandKey === bandKey);
  if (!view) throw new Error(`no view ${bandKey}`);
  return view;
};

function fitPublic(rows: PoolCheck[], previous: FitOutput | null, atOnce?: Set<string>): FitOutput {
  const fit = fitPool(rows);
  if (!fit.ok) throw new Error(fit.reason);
  return publicOutput(rows, fit, { previous, prices: [], atOnce });
}

const deep = 0.8;
const shallow = 0.3;

describe('publicOutput after a step', () => {
  const before = fitPublic([...owners(1, 8, shallow), ...owners(21, 28, deep)], null);

  it('keeps a band as it was when fewer than five owners of it are new', () => {
    const after = fitPublic([...owners(1, 12, shallow), ...owners(21, 29, deep)], before);
    expect(viewOf(after, null).evidence?.owners).toBe(21);
    expect(viewOf(after, 'depth-deep')).toEqual(viewOf(before, 'depth-deep'));
    expect(viewOf(after, 'depth-shallow')).toEqual(viewOf(before, 'depth-shallow'));
  });

  it('moves a band by one owner of whom a check was recalled at once, and no other band', () => {
    const left = [...owners(1, 8, shallow), ...owners(21, 28, deep)].filter(
      ({ owner: whose, ageYears }) => whose !== 'owner-3' || ageYears < 3,
    );
    const held = fitPublic(left, before);
    expect(viewOf(held, 'depth-shallow')).toEqual(viewOf(before, 'depth-shallow'));
    const after = fitPublic(left, before, new Set([ownerKey('owner-3')]));
    expect(viewOf(after, 'depth-shallow').evidence).toMatchObject({ owners: 8, checks: 23 });
    expect(viewOf(after, null).evidence).toMatchObject({ owners: 16, checks: 47 });
    expect(viewOf(after, 'depth-deep')).toEqual(viewOf(before, 'depth-deep'));
  });

  it('moves a band by five owners, but not where the rest would give one owner away', () => {
    const alone = fitPublic([...owners(1, 13, shallow), ...owners(21, 28, deep)], before);
    expect(viewOf(alone, 'depth-shallow').evidence?.owners).toBe(13);
    // Whole less shallow is deep: with one owner new there, shallow waits too.
    const withOne = fitPublic([...owners(1, 13, shallow), ...owners(21, 29, deep)], before);
    expect(viewOf(withOne, null).evidence?.owners).toBe(22);
    expect(viewOf(withOne, 'depth-shallow').evidence?.owners).toBe(8);
    expect(viewOf(withOne, 'depth-deep').evidence?.owners).toBe(8);
  });

  it('lets what was held go once it has gathered five owners', () => {
    const between = fitPublic([...owners(1, 12, shallow), ...owners(21, 29, deep)], before);
    const after = fitPublic([...owners(1, 13, shallow), ...owners(21, 33, deep)], between);
    expect(viewOf(after, 'depth-deep').evidence?.owners).toBe(13);
    expect(viewOf(after, 'depth-shallow').evidence?.owners).toBe(13);
  });

  it('takes the rows as they are where nothing changed', () => {
    const again = fitPublic([...owners(1, 8, shallow), ...owners(21, 28, deep)], before);
    expect(again).toEqual(before);
  });
});

describe('publicOutput of a small group', () => {
  it('says nothing of fewer than five owners, nor of the other part of their whole', () => {
    const output = fitPublic([...owners(1, 9, shallow), ...owners(21, 23, deep)], null);
    expect(viewOf(output, null).evidence).toEqual({ owners: 12, banks: 12, checks: 36 });
    for (const band of ['depth-deep', 'depth-shallow']) {
      expect(viewOf(output, band)).toMatchObject({ evidence: null, dots: [], owners: {} });
      expect(viewOf(output, band).result?.ok).toBe(false);
    }
  });

  it('publishes rounded dots without a key of bank or owner', () => {
    const { dots } = viewOf(fitPublic(owners(1, 6, shallow), null), null);
    expect(dots).toHaveLength(18);
    for (const [years, efc, soh] of dots) {
      expect(years * 10).toBeCloseTo(Math.round(years * 10), 9);
      expect(efc % 10).toBe(0);
      expect(soh * 1000).toBeCloseTo(Math.round(soh * 1000), 9);
    }
  });
});

describe('the diagnostic pictures', () => {
  const binsOf = (output: FitOutput, series: string) => output.bins.filter((bin) => bin.series === series);
  const byDepth = (output: FitOutput) =>
    binsOf(output, 'residual:depthFraction').map(({ from, summary }) => [
      from,
      summary?.evidence.owners ?? null,
    ]);
  const before = fitPublic([...owners(1, 8, shallow), ...owners(21, 28, deep)], null);

  it('say nothing of fewer than five owners, nor of what would give them away', () => {
    const output = fitPublic([...owners(1, 9, shallow), ...owners(21, 23, deep)], null);
    expect(byDepth(output)).toEqual([
      [0.3, null],
      [0.8, null],
    ]);
  });

  it('stay as published where fewer than five owners are new', () => {
    expect(byDepth(before)).toEqual([
      [0.3, 8],
      [0.8, 8],
    ]);
    const after = fitPublic([...owners(1, 13, shallow), ...owners(21, 29, deep)], before);
    expect(binsOf(after, 'residual:depthFraction')).toEqual(binsOf(before, 'residual:depthFraction'));
    const later = fitPublic([...owners(1, 13, shallow), ...owners(21, 33, deep)], after);
    expect(byDepth(later)).toEqual([
      [0.3, 13],
      [0.8, 13],
    ]);
  });
});
