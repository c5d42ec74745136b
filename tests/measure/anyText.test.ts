import fc from 'fast-check';
import { decodeSniff, recogniseColumns } from '@/lib/measure';
import { integrateText, plainChargeAh, plainDischarge, writeLog } from '../support/logDialects';

const text = writeLog(plainDischarge(), {
  delimiter: ';',
  decimal: ',',
  preamble: ['Gerät;7'],
  header: ['Zeit (s)', 'Spannung (V)', 'Strom (A)', 'Temperatur (°C)'],
  columns: [(row) => row.timeS, (row) => row.voltageV, (row) => row.currentA, (row) => row.temperatureC],
});

const decoded = (bytes: Uint8Array): string => {
  const sniffed = decodeSniff(bytes);
  if (!sniffed.ok) throw new Error(sniffed.message);
  return new TextDecoder(sniffed.encoding).decode(bytes.slice(sniffed.bomBytes));
};

describe('a log as bytes', () => {
  it.each(['utf8', 'utf16le', 'latin1'] as const)('in %s is decoded and integrated', (encoding) => {
    const result = integrateText(decoded(new Uint8Array(Buffer.from(text, encoding))));
    expect(result).toMatchObject({ ok: true, warnings: [] });
    if (result.ok) expect(Math.abs(result.capacityAh / plainChargeAh() - 1)).toBeLessThan(1e-9);
  });
});

describe('any text', () => {
  const outcome = (input: string) => {
    const result = integrateText(input);
    if (!result.ok) return expect(result.message.length).toBeGreaterThan(10);
    expect(Number.isFinite(result.capacityAh)).toBe(true);
    expect(result.capacityAh).toBeGreaterThan(0);
    return expect(result.durationS).toBeGreaterThan(0);
  };

  it('gives a result or a reason, never an exception', () => {
    const piece = fc.constantFrom(
      'time',
      'A',
      'V',
      '12:00:01',
      '2026-11-02',
      '1,5',
      '-3.2',
      ';',
      ',',
      '\t',
      '\n',
      '"',
      'ä',
      '=1+1',
      '',
      ' ',
    );
    fc.assert(fc.property(fc.array(piece, { maxLength: 120 }), (pieces) => outcome(pieces.join(''))));
    fc.assert(fc.property(fc.string({ unit: 'binary', maxLength: 300 }), outcome));
  });

  it('made by damaging a log gives a result or a reason', () => {
    const damage = fc.record({
      at: fc.nat(text.length - 1),
      length: fc.nat(400),
      put: fc.constantFrom('', '\n', ';', '"', '9'.repeat(50), '-', ';;;;\n', '00:00:00'),
    });
    fc.assert(
      fc.property(fc.array(damage, { minLength: 1, maxLength: 4 }), (damages) => {
        const damaged = damages.reduce(
          (whole, { at, length, put }) => whole.slice(0, at) + put + whole.slice(at + length),
          text,
        );
        outcome(damaged);
      }),
      { numRuns: 200 },
    );
  });

  it('is recognised from its first lines alone', () => {
    const [short, whole] = [recogniseColumns(text.slice(0, 600)), recogniseColumns(text)];
    expect(short).toMatchObject({ ok: true });
    if (short.ok && whole.ok) expect(short.mapping).toEqual(whole.mapping);
  });
});
