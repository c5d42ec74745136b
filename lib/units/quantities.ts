/** The kinds of quantity the product knows; only units of one kind convert into each other. */
type Kind =
  | 'charge'
  | 'energy'
  | 'voltage'
  | 'current'
  | 'power'
  | 'duration'
  | 'temperature'
  | 'force'
  | 'pressure'
  | 'torque'
  | 'length';

interface UnitFacts {
  kind: Kind;
  /** base = (value - offset) * numerator / denominator; integers, so that decimal factors stay exact. */
  numerator: number;
  denominator: number;
  /** Where the base unit's zero lies on this unit's scale (only temperatures). */
  offset: number;
}

const linear = (kind: Kind, numerator = 1, denominator = 1, offset = 0): UnitFacts => ({
  kind,
  numerator,
  denominator,
  offset,
});

// Exact factors: BIPM SI Brochure 9th ed. (2019) and NIST SP 811 (2008) App. B.8, from
// g_n = 9.80665 m/s², 1 lb = 0.45359237 kg, 1 in = 25.4 mm. Bases: Ah, Wh, V, A, W, s, °C, N, kPa, N·m, mm.
const unitTable = {
  Ah: linear('charge'),
  mAh: linear('charge', 1, 1000),
  Wh: linear('energy'),
  kWh: linear('energy', 1000),
  V: linear('voltage'),
  mV: linear('voltage', 1, 1000),
  A: linear('current'),
  mA: linear('current', 1, 1000),
  W: linear('power'),
  kW: linear('power', 1000),
  d: linear('duration', 86400),
  h: linear('duration', 3600),
  min: linear('duration', 60),
  s: linear('duration'),
  ms: linear('duration', 1, 1000),
  '°C': linear('temperature'),
  '°F': linear('temperature', 5, 9, 32),
  K: linear('temperature', 1, 1, 273.15),
  N: linear('force'),
  kgf: linear('force', 196133, 20000),
  lbf: linear('force', 8896443230521, 2000000000000),
  kPa: linear('pressure'),
  psi: linear('pressure', 8896443230521, 1290320000000),
  bar: linear('pressure', 100),
  'N·m': linear('torque'),
  mm: linear('length'),
  in: linear('length', 127, 5),
} as const satisfies Record<string, UnitFacts>;

/** A unit that values can be converted between; what is stored is SI plus Ah and Wh. */
export type Unit = keyof typeof unitTable;

/** Every unit, in the order of the table. */
export const units = Object.keys(unitTable) as Unit[];

/** Whether a text is one of our units. */
export function isUnit(text: string): text is Unit {
  return Object.hasOwn(unitTable, text);
}

/** Whether two units measure the same kind of quantity. */
export function isConvertible(from: Unit, to: Unit): boolean {
  return unitTable[from].kind === unitTable[to].kind;
}

/**
 * Converts a value between two units of the same kind.
 * Temperatures are converted as points on the scale, not as differences.
 * @throws RangeError when the units measure different kinds of quantity.
 * Source of the factors: BIPM SI Brochure 9th ed.; NIST SP 811 (2008), Appendix B.8.
 */
export function convert(value: number, from: Unit, to: Unit): number {
  if (from === to) return value;
  const source: UnitFacts = unitTable[from];
  const target: UnitFacts = unitTable[to];
  if (source.kind !== target.kind) {
    throw new RangeError(
      `convert requires units of one kind, got ${from} (${source.kind}) and ${to} (${target.kind})`,
    );
  }
  const scaled =
    ((value - source.offset) * (source.numerator * target.denominator)) /
    (source.denominator * target.numerator);
  return scaled + target.offset;
}

/**
 * Pressure in kPa that a force presses a face with.
 * @param forceN clamping force, N
 * @param faceAreaMm2 area of the cell's large face, mm²
 * @throws RangeError unless the area is above 0.
 */
export function pressureKPaOf(forceN: number, faceAreaMm2: number): number {
  if (!(faceAreaMm2 > 0)) throw new RangeError('pressureKPaOf requires a face area above 0 mm²');
  return (forceN * 1000) / faceAreaMm2;
}
