import { combineInQuadrature, coverageFactor, rectangularSd } from '@/lib/measure';

// JCGM 100:2008, Annex H.1 (end-gauge calibration), Table H.1: components of the combined standard uncertainty in nm,
// each already times its sensitivity. From memory only: the document is not among the shared reference files.
const endGauge = [
  { name: 'calibration of the standard', nm: 25 },
  { name: 'difference between the gauges', nm: 9.7 },
  { name: 'difference of the expansion coefficients', nm: 2.9 },
  { name: 'difference of the temperatures', nm: 16.6 },
];

describe('quadrature of JCGM 100:2008', () => {
  it('gives the 32 nm of the end gauge (H.1.4; from memory)', () => {
    const combined = combineInQuadrature(endGauge.map(({ nm }) => nm));
    expect(Math.round(combined)).toBe(32);
    // H.1.4 prints u_c² = 1002 nm² to four digits; the rounded components allow 0.5 %.
    expect(Math.abs(combined ** 2 / 1002 - 1)).toBeLessThan(0.005);
  });

  it('gives the 9.7 nm of the difference of the gauges from its own parts (H.1.3.2; from memory)', () => {
    // Repeatability 5.8 nm, random effects of the comparator 3.9 nm, systematic ones 6.7 nm.
    expect(combineInQuadrature([5.8, 3.9, 6.7])).toBeCloseTo(9.7, 1);
  });

  it('takes a limit of error as a rectangular distribution (4.3.7)', () => {
    // H.1.3.4: ±1e-6 /°C about the difference of the coefficients is 0.58e-6 /°C (from memory).
    expect(rectangularSd(1e-6)).toBeCloseTo(0.58e-6, 8);
    expect(rectangularSd(-3)).toBeCloseTo(Math.sqrt(3), 12);
  });

  it('expands by 2 (6.3.3)', () => {
    expect(coverageFactor).toBe(2);
  });
});
