import { differenceHash } from '@/server/uploads/differenceHash';

const rows = (row: number[]) => Uint8Array.from(Array.from({ length: 8 }, () => row).flat());

it.each<[string, Uint8Array, string]>([
  ['ever lighter to the right', rows([0, 1, 2, 3, 4, 5, 6, 7, 8]), 'f'.repeat(16)],
  ['ever darker', rows([8, 7, 6, 5, 4, 3, 2, 1, 0]), '0'.repeat(16)],
  ['all the same', rows(Array<number>(9).fill(77)), '0'.repeat(16)],
  // Lighter, darker, lighter ...: 10101010 a row.
  ['stripes', rows([0, 9, 0, 9, 0, 9, 0, 9, 0]), 'aa'.repeat(8)],
])('tells neighbours that grow lighter in a picture %s', (_what, greys, hash) => {
  expect(differenceHash(greys)).toBe(hash);
});

it('refuses another size', () => {
  expect(() => differenceHash(new Uint8Array(64))).toThrow(RangeError);
});
