import { allBands, bandsByLever, fitStrata, stratumKey, type PoolCheck, type StratumCurve } from '@/lib/fit';

interface BankSpec {
  owner: string;
  cellType?: string;
  depthFraction?: number;
  dischargeIt?: number;
  temperatureC?: number;
  isClamped?: boolean;
}

const bank = (name: string, spec: BankSpec): PoolCheck[] =>
  [1, 2, 3].map((year) => ({
    bank: name,
    cellType: 'A',
    isClamped: false,
    depthFraction: 0.5,
    dischargeIt: 0.2,
    temperatureC: 22,
    ...spec,
    socMeanFraction: 0.5,
    ageYears: year,
    efc: 200 * year,
    ratedAh: 280,
    // Fade of 4 % at 500 EFC, an exponent of 0.6 and a little of the bank's own, from its name.
    capacityAh:
      280 * (1 - 0.04 * (0.4 * year) ** 0.6 - 0.0005 * ((name.charCodeAt(name.length - 1) + year) % 5)),
    relSd: 0.012,
  }));

const banks = (prefix: string, count: number, spec: Omit<BankSpec, 'owner'> = {}): PoolCheck[] =>
  Array.from({ length: count }, (_, i) => bank(`${prefix}${i}`, { owner: `${prefix}${i}`, ...spec })).flat();

function curvesOf(checks: PoolCheck[], minOwners?: number): Map<string, StratumCurve> {
  const result = fitStrata(checks, { seed: 7, bootstrap: 20, ...(minOwners ? { minOwners } : {}) });
  if (!result.ok) throw new Error(result.reason);
  return new Map(result.curves.map((curve) => [curve.key, curve]));
}

const outcome = (curves: Map<string, StratumCurve>, cellType: string | null, band: string | null) => {
  const result = curves.get(stratumKey(cellType, band))?.result;
  return result?.ok ? result.owners : result?.reason;
};

describe('bands', () => {
  it('cover every check exactly once within a lever, edges in the middle band', () => {
    const at = (spec: Partial<BankSpec>) => bank('x', { owner: 'x', ...spec })[0] as PoolCheck;
    const probes: [Partial<BankSpec>, string][] = [
      [{ depthFraction: 0.449 }, 'depth-shallow'],
      [{ depthFraction: 0.45 }, 'depth-middle'],
      [{ depthFraction: 0.65 }, 'depth-middle'],
      [{ depthFraction: 0.651 }, 'depth-deep'],
      [{ dischargeIt: 0.149 }, 'rate-slow'],
      [{ dischargeIt: 0.15 }, 'rate-middle'],
      [{ dischargeIt: 0.3 }, 'rate-middle'],
      [{ dischargeIt: 0.301 }, 'rate-fast'],
      [{ temperatureC: 17.9 }, 'heat-cool'],
      [{ temperatureC: 18 }, 'heat-middle'],
      [{ temperatureC: 28 }, 'heat-middle'],
      [{ temperatureC: 28.1 }, 'heat-warm'],
      [{ isClamped: false }, 'clamping-none'],
      [{ isClamped: true }, 'clamping-held'],
    ];
    for (const [spec, expected] of probes) {
      const check = at(spec);
      expect(allBands.filter((band) => band.includes(check)).map((band) => band.key)).toContain(expected);
      for (const bands of Object.values(bandsByLever)) {
        expect(bands.filter((band) => band.includes(check))).toHaveLength(1);
      }
    }
  });
});

describe('fitStrata', () => {
  it('gives the whole pool, each cell type and each band of both', () => {
    const curves = curvesOf([...banks('a', 6), ...banks('b', 7, { cellType: 'B', isClamped: true })]);
    expect(curves.size).toBe(3 * (1 + allBands.length));
    expect(outcome(curves, null, null)).toBe(13);
    expect(outcome(curves, 'A', null)).toBe(6);
    expect(outcome(curves, 'B', 'clamping-held')).toBe(7);
    expect(outcome(curves, null, 'clamping-none')).toBe(6);
    expect(outcome(curves, 'A', 'clamping-held')).toBe('tooFewOwners');
  });

  it('gives no number at all of a stratum with fewer than five owners', () => {
    const curves = curvesOf([
      ...banks('a', 9),
      ...banks('b', 4, { cellType: 'B' }),
      ...banks('c', 3, { cellType: 'C' }),
    ]);
    for (const type of ['B', 'C']) {
      for (const band of [null, ...allBands.map(({ key }) => key)]) {
        expect(curves.get(stratumKey(type, band))?.result).toEqual({ ok: false, reason: 'tooFewOwners' });
      }
    }
    expect(outcome(curves, 'A', null)).toBe(9);
  });

  it('holds back a second band when the whole less the shown bands would isolate fewer owners', () => {
    const curves = curvesOf([
      ...banks('s', 6, { depthFraction: 0.3 }),
      ...banks('m', 8, { depthFraction: 0.5 }),
      ...banks('d', 2, { depthFraction: 0.8 }),
    ]);
    expect(outcome(curves, 'A', 'depth-deep')).toBe('tooFewOwners');
    expect(outcome(curves, 'A', 'depth-shallow')).toBe('protectsOthers');
    expect(outcome(curves, 'A', 'depth-middle')).toBe(8);
    expect(outcome(curves, 'A', null)).toBe(16);
  });

  it('holds back a second cell type when the pool less the shown types would isolate fewer owners', () => {
    const curves = curvesOf([
      ...banks('a', 9),
      ...banks('b', 6, { cellType: 'B' }),
      ...banks('c', 2, { cellType: 'C' }),
    ]);
    expect(outcome(curves, 'C', null)).toBe('tooFewOwners');
    expect(outcome(curves, 'B', null)).toBe('protectsOthers');
    expect(outcome(curves, 'B', 'depth-middle')).toBe('protectsOthers');
    expect(outcome(curves, 'A', null)).toBe(9);
    expect(outcome(curves, null, null)).toBe(17);
  });

  it('never lets shown counts of a division give away fewer than five owners', () => {
    const spread = Array.from({ length: 60 }, (_, i) =>
      bank(`p${i}`, {
        owner: `p${i}`,
        cellType: 'ABCDEF'[(i * i) % 6] as string,
        depthFraction: [0.3, 0.5, 0.5, 0.8][(i * 7) % 4] as number,
        dischargeIt: [0.1, 0.2, 0.4][(i * 5) % 3] as number,
        temperatureC: [15, 22, 22, 22, 32][i % 5] as number,
        isClamped: i % 3 === 0,
      }),
    ).flat();
    const curves = curvesOf(spread);
    const types = [...new Set(spread.map((check) => check.cellType))];
    const hidden = (members: (readonly [string | null, string | null])[]) => {
      const owners = new Set<string>();
      for (const [type, band] of members) {
        if (curves.get(stratumKey(type, band))?.result.ok) continue;
        const included = allBands.find(({ key }) => key === band);
        for (const check of spread) {
          if ((type === null || check.cellType === type) && (!included || included.includes(check))) {
            owners.add(check.owner);
          }
        }
      }
      return owners.size;
    };
    const sizes = [null, ...types].flatMap((type) =>
      type !== null && !curves.get(stratumKey(type, null))?.result.ok
        ? []
        : Object.values(bandsByLever).map((bands) => hidden(bands.map(({ key }) => [type, key] as const))),
    );
    for (const band of [null, ...allBands.map(({ key }) => key)]) {
      if (curves.get(stratumKey(null, band))?.result.ok)
        sizes.push(hidden(types.map((type) => [type, band] as const)));
    }
    expect(sizes.some((size) => size > 0)).toBe(true);
    for (const size of sizes) expect(size === 0 || size >= 5).toBe(true);
  });

  it('shows everything with owners behind it when one owner is enough', () => {
    const curves = curvesOf([...banks('a', 9), ...banks('b', 2, { cellType: 'B' })], 1);
    expect(outcome(curves, 'B', null)).toBe(2);
  });

  it('does not change a stratum when another cell type gains checks', () => {
    const first = curvesOf(banks('a', 9));
    const second = curvesOf([...banks('a', 9), ...banks('b', 8, { cellType: 'B' })]);
    expect(second.get('A|*')).toEqual(first.get('A|*'));
  });

  it('reports progress and stops when asked', () => {
    const checks = banks('a', 6);
    const seen: [number, number][] = [];
    fitStrata(checks, { seed: 1, bootstrap: 5, onProgress: (done, total) => seen.push([done, total]) });
    expect(seen).toEqual(Array.from({ length: 24 }, (_, i) => [i + 1, 24]));
    let asked = 0;
    const stopped = fitStrata(checks, { seed: 1, bootstrap: 5, shouldStop: () => ++asked > 3 });
    expect(stopped).toEqual({ ok: false, reason: 'stopped' });
    expect(asked).toBe(4);
  });

  it('answers for an empty pool', () => {
    const result = fitStrata([], { seed: 1 });
    expect(result.ok && result.curves.every(({ result: curve }) => !curve.ok)).toBe(true);
  });
});
