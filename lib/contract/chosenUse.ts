import { z } from 'zod';

import { standardUse, type Use } from './cells';

interface NumberParameter {
  key: Exclude<keyof Use, 'isClamped'>;
  name: string;
  unit: string;
  /** Limits in the unit of the address. */
  min: number;
  max: number;
  /** One unit of the address in the unit of a use. */
  scale: number;
}

/** How each part of a use is written in an address: `?depth=80&rate=0.2&clamped=yes`. */
export const useParameters = {
  depth: { key: 'depthFraction', name: 'depth', unit: '%', min: 5, max: 100, scale: 0.01 },
  rate: { key: 'dischargeIt', name: 'rate', unit: 'It', min: 0.01, max: 2, scale: 1 },
  heat: { key: 'temperatureC', name: 'temperature', unit: '°C', min: -20, max: 60, scale: 1 },
  full: { key: 'socMeanFraction', name: 'mean charge level', unit: '%', min: 5, max: 95, scale: 0.01 },
  cycles: { key: 'cyclesPerDay', name: 'cycles a day', unit: 'a day', min: 0.01, max: 5, scale: 1 },
} as const satisfies Record<string, NumberParameter>;

type NumberName = keyof typeof useParameters;
const numberNames = Object.keys(useParameters) as NumberName[];

/** A number in an address; kept to six digits, so that what was read is what is written. */
const numberText = (name: NumberName) => {
  const { min, max, scale } = useParameters[name];
  return z.codec(
    z
      .string()
      .trim()
      .regex(/^-?\d{1,6}(\.\d{1,6})?$/),
    z.number(),
    {
      decode: (text, context) => {
        const value = Number(text);
        if (value < min || value > max)
          context.issues.push({ code: 'custom', input: text, message: 'outside its limits' });
        return Number((value * scale).toPrecision(6));
      },
      encode: (value) => String(Number((value / scale).toPrecision(6))),
    },
  );
};

const yesNoText = z.codec(z.enum(['yes', 'no']), z.boolean(), {
  decode: (text) => text === 'yes',
  encode: (isSo) => (isSo ? 'yes' : 'no'),
});

/** The one codec of a use in an address: what stands at the standard use is left out of it. */
const addressedUse = z.object({
  depth: numberText('depth').optional(),
  rate: numberText('rate').optional(),
  heat: numberText('heat').optional(),
  full: numberText('full').optional(),
  cycles: numberText('cycles').optional(),
  clamped: yesNoText.optional(),
});
type AddressedName = keyof typeof addressedUse.shape;
const addressedNames = Object.keys(addressedUse.shape) as AddressedName[];

export interface ReadUse {
  use: Use;
  /** What in the address was of no sense, one sentence each; the standard use stands in for it. */
  notes: string[];
}

/** The use an address asks for. What it can't mean is told in words and taken from the standard use. */
export function readChosenUse(query: Readonly<Record<string, unknown>>): ReadUse {
  const asked = Object.fromEntries(
    addressedNames.flatMap((name) => (query[name] === undefined ? [] : [[name, query[name]]])),
  );
  const first = addressedUse.safeParse(asked);
  const refused = first.success ? [] : [...new Set(first.error.issues.map(({ path }) => String(path[0])))];
  for (const name of refused) delete asked[name];
  const { clamped, ...numbers } = addressedUse.parse(asked);
  const use = { ...standardUse, isClamped: clamped ?? standardUse.isClamped };
  for (const name of numberNames)
    use[useParameters[name].key] = numbers[name] ?? use[useParameters[name].key];
  return { use, notes: refused.map((name) => noteOf(name as AddressedName)) };
}

/** The part of an address that asks for a use; undefined takes a parameter out of it. */
export function chosenUseQuery(use: Use): Record<AddressedName, string | undefined> {
  const { isClamped } = use;
  const encoded = z.encode(addressedUse, {
    ...Object.fromEntries(numberNames.map((name) => [name, use[useParameters[name].key]] as const)),
    clamped: isClamped,
  });
  const standard = isStandard('isClamped', isClamped);
  return {
    ...(Object.fromEntries(
      numberNames.map((name) => {
        const { key } = useParameters[name];
        return [name, isStandard(key, use[key]) ? undefined : encoded[name]];
      }),
    ) as Record<NumberName, string | undefined>),
    clamped: standard ? undefined : encoded.clamped,
  };
}

/** The same as text behind a `?`, empty for the standard use: for links from page to page. */
export function chosenUseSearch(use: Use): string {
  const given = Object.entries(chosenUseQuery(use)).filter(([, value]) => value !== undefined);
  return given.length === 0 ? '' : `?${new URLSearchParams(given as [string, string][]).toString()}`;
}

export const isStandardUse = (use: Use): boolean =>
  (Object.keys(standardUse) as (keyof Use)[]).every((key) => isStandard(key, use[key]));

const isStandard = (key: keyof Use, value: number | boolean): boolean =>
  typeof value === 'number' ? Math.abs(value - Number(standardUse[key])) < 1e-9 : value === standardUse[key];

function noteOf(name: AddressedName): string {
  if (name === 'clamped')
    return 'The address asks for a clamping that is neither yes nor no; “not clamped” is shown.';
  const { name: words, unit, min, max, key, scale } = useParameters[name];
  const standing = Number((Number(standardUse[key]) / scale).toPrecision(6));
  const sign = (value: number) => String(value).replace('-', '\u2212');
  return `The address asks for a ${words} that is not a number from ${sign(min)} to ${sign(max)} ${unit}; ${sign(standing)} ${unit} is shown.`;
}
