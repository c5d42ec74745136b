import { readFileSync } from 'node:fs';
import { join } from 'node:path';

import { color } from '@/components/theme';

const css = readFileSync(join(__dirname, '../../../components/theme.css'), 'utf8');

const palette = (which: 0 | 1): Record<string, string> =>
  Object.fromEntries(
    [...css.matchAll(/--([a-z-]+): light-dark\((#[0-9a-f]{6}), (#[0-9a-f]{6})\)/g)].map((match) => [
      match[1] ?? '',
      match[2 + which] ?? '',
    ]),
  );

/** WCAG 2.2, "relative luminance". */
const luminance = (hex: string): number => {
  const channel = (from: number) => {
    const share = parseInt(hex.slice(from, from + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  };
  return 0.2126 * channel(1) + 0.7152 * channel(3) + 0.0722 * channel(5);
};

/** WCAG 2.2, "contrast ratio". */
const contrast = (a: string, b: string): number => {
  const [light, dark] = [luminance(a), luminance(b)].sort((one, other) => other - one) as [number, number];
  return (light + 0.05) / (dark + 0.05);
};

it('the measure itself gives 21 for black on white and 4.54 for #767676 on white', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 5);
  expect(contrast('#767676', '#ffffff')).toBeCloseTo(4.54, 2);
});

it('every token of the code has its values in theme.css', () => {
  for (const value of Object.values(color)) {
    const name = /^var\((--[a-z-]+)\)$/.exec(value)?.[1];
    expect(css).toContain(`${name}: light-dark(`);
  }
});

describe.each([
  ['light', 0],
  ['dark', 1],
] as const)('the %s theme', (_name, which) => {
  const tones = palette(which);
  const pairs = [
    ...['ink', 'quiet', 'tide', 'brass', 'moss', 'rust'].flatMap((tone) =>
      ['paper', 'surface', 'wash'].map((ground) => [tone, ground] as const),
    ),
    ...['tide', 'brass', 'moss', 'rust'].map((tone) => [tone, `${tone}-wash`] as const),
    ...['tide-wash', 'brass-wash', 'moss-wash', 'rust-wash'].map((ground) => ['ink', ground] as const),
    ['on-tide', 'tide'] as const,
    ['on-rust', 'rust'] as const,
  ];

  // WCAG 2.2, success criterion 1.4.3, level AA.
  it.each(pairs)('has %s on %s at 4.5 : 1 or more', (tone, ground) => {
    expect(contrast(tones[tone] ?? '', tones[ground] ?? '')).toBeGreaterThanOrEqual(4.5);
  });

  // WCAG 2.2, success criterion 1.4.11: borders of inputs, marks and lines that carry meaning.
  it.each([
    ['quiet', 'surface'],
    ['tide', 'surface'],
    ['brass', 'surface'],
    ['rust', 'surface'],
  ])('has marks of %s on %s at 3 : 1 or more', (tone, ground) => {
    expect(contrast(tones[tone] ?? '', tones[ground] ?? '')).toBeGreaterThanOrEqual(3);
  });
});
