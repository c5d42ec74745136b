import { stepOfCode } from '@/server/secondFactor/totp';

/**
 * RFC 6238, Appendix B, the rows for SHA-1: time (s), time step, code of eight digits. The shared secret is the ASCII
 * text 12345678901234567890. A code of six digits is the same number modulo a million (RFC 4226, 5.3), so it is the
 * last six of the eight. Exact.
 */
const vectors: [timeS: number, step: number, code: string][] = [
  [59, 0x1, '94287082'],
  [1111111109, 0x23523ec, '07081804'],
  [1111111111, 0x23523ed, '14050471'],
  [1234567890, 0x273ef07, '89005924'],
  [2000000000, 0x3f940aa, '69279037'],
  [20000000000, 0x27bc86aa, '65353130'],
];
/** 12345678901234567890 in base32 (RFC 4648). */
const secret = 'GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ';

const at = (timeS: number) => new Date(timeS * 1000);
const shorten = (code: string) => code.slice(-6);

describe('codes by time, against RFC 6238, Appendix B', () => {
  it.each(vectors)('at %d s the code is of step %d', async (timeS, step, code) => {
    expect(await stepOfCode(secret, shorten(code), at(timeS), null)).toBe(step);
  });

  it('takes a code one step early and one step late, and no more', async () => {
    const [, step, code] = vectors[3]!;
    const middle = step * 30 + 15;
    const steps = [];
    for (const shift of [-46, -45, -16, -15, 0, 14, 15, 44, 45])
      steps.push([shift, await stepOfCode(secret, shorten(code), at(middle + shift), null)]);
    expect(steps).toEqual([
      [-46, null],
      [-45, step],
      [-16, step],
      [-15, step],
      [0, step],
      [14, step],
      [15, step],
      [44, step],
      [45, null],
    ]);
  });

  it('takes no code of a step that was used, nor of one before it', async () => {
    const [timeS, step, code] = vectors[2]!;
    expect(await stepOfCode(secret, shorten(code), at(timeS), step - 1)).toBe(step);
    expect(await stepOfCode(secret, shorten(code), at(timeS), step)).toBeNull();
    expect(await stepOfCode(secret, shorten(code), at(timeS), step + 1)).toBeNull();
  });

  it.each(['', '28708', '4287082', 'abcdef', '287082 ', '２８７０８２'])('takes no %j', async (code) => {
    expect(await stepOfCode(secret, code, at(59), null)).toBeNull();
  });
});
