import { convert, cRateIt, currentOfIt, pressureKPaOf } from '@/lib/units';
import { readReferenceJson } from '../support/reference';

interface UnitsReference {
  factors: Record<string, { value: number }>;
  worked: {
    force_kgf?: number;
    face_mm: [number, number];
    force_N: number;
    force_lbf: number;
    pressure_kPa: number;
    pressure_psi?: number;
    pressure_bar?: number;
  }[];
  temperature: { worked: { degC: number; K: number; degF: number }[] };
  energy_charge: { kWh_MJ: number; Wh_J: number };
}
interface Standards {
  worked: Record<string, number>[];
}

// Source of every value here: BIPM SI Brochure 9th ed. and NIST SP 811 (2008) App. B.8, as exact rationals in units.json.
const reference = readReferenceJson<UnitsReference>('units.json');
const relative = (actual: number, expected: number) => Math.abs(actual / expected - 1);

describe('unit factors of NIST SP 811', () => {
  it.each([
    ['kgf_N', 'kgf', 'N'],
    ['lbf_N', 'lbf', 'N'],
    ['kgf_lbf', 'kgf', 'lbf'],
    ['lbf_kgf', 'lbf', 'kgf'],
    ['psi_kPa', 'psi', 'kPa'],
    ['kPa_psi', 'kPa', 'psi'],
    ['bar_kPa', 'bar', 'kPa'],
  ] as const)('%s agrees to 1e-15', (name, from, to) => {
    const factor = reference.factors[name];
    expect(factor).toBeDefined();
    expect(relative(convert(1, from, to), factor?.value ?? NaN)).toBeLessThan(1e-15);
  });

  it('turns forces on a face into pressures, to 1e-14', () => {
    expect(reference.worked.length).toBeGreaterThan(5);
    for (const {
      face_mm: [width, height],
      ...row
    } of reference.worked) {
      expect(relative(pressureKPaOf(row.force_N, width * height), row.pressure_kPa)).toBeLessThan(1e-14);
      expect(relative(convert(row.force_N, 'N', 'lbf'), row.force_lbf)).toBeLessThan(1e-14);
      if (row.force_kgf !== undefined)
        expect(relative(convert(row.force_kgf, 'kgf', 'N'), row.force_N)).toBeLessThan(1e-14);
      if (row.pressure_psi !== undefined)
        expect(relative(convert(row.pressure_psi, 'psi', 'kPa'), row.pressure_kPa)).toBeLessThan(1e-14);
      if (row.pressure_bar !== undefined)
        expect(relative(convert(row.pressure_bar, 'bar', 'kPa'), row.pressure_kPa)).toBeLessThan(1e-14);
    }
  });

  it('converts temperatures, to 1e-12 of a degree', () => {
    for (const { degC, K, degF } of reference.temperature.worked) {
      expect(convert(degC, '°C', 'K')).toBeCloseTo(K, 12);
      expect(convert(K, 'K', '°C')).toBeCloseTo(degC, 12);
      expect(convert(degC, '°C', '°F')).toBeCloseTo(degF, 12);
      expect(convert(degF, '°F', '°C')).toBeCloseTo(degC, 12);
    }
  });
});

describe('It of IEC 61434', () => {
  it('is the rated capacity over one hour, as worked in standards.json', () => {
    const rows = readReferenceJson<Standards>('standards.json').worked.filter(
      (row) => row['I_t_A'] !== undefined,
    );
    expect(rows.length).toBe(2);
    for (const row of rows) {
      const ratedAh = row['C_n_Ah'] ?? NaN;
      expect(currentOfIt(1, ratedAh)).toBe(row['I_t_A']);
      expect(currentOfIt(0.2, ratedAh)).toBeCloseTo(row['0.2_It_A'] ?? NaN, 12);
      expect(currentOfIt(1 / 3, ratedAh)).toBeCloseTo(row['1/3_It_A'] ?? NaN, 12);
      expect(cRateIt(row['0.5_It_A'] ?? NaN, ratedAh)).toBe(0.5);
    }
  });
  it('makes 0.5 It on a 300 Ah cell 150 A (common practice, no source)', () => {
    expect(currentOfIt(0.5, 300)).toBe(150);
    expect(cRateIt(150, 300)).toBe(0.5);
  });
});
