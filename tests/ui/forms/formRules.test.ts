import { z } from 'zod';

import { mergeDraft } from '@/components/forms/mergeDraft';
import { convertText } from '@/components/forms/shownNumber';
import { chosen, numberText, optionalNumberText, optionalText } from '@/components/forms/textSchemas';

const messagesOf = (schema: z.ZodType, value: unknown) =>
  schema.safeParse(value).error?.issues.map((issue) => issue.message) ?? [];

describe('numberText', () => {
  const depth = numberText(
    z.number().min(0.05, 'At least 5 %.').max(1, 'At most 100 %.'),
    (typed) => typed / 100,
  );

  it('reads what people type into what is stored', () => {
    expect(depth.parse('60')).toBe(0.6);
    expect(depth.parse(' 62,5 ')).toBe(0.625);
  });

  it('asks for a number, says when it is missing and holds it to its limits', () => {
    expect(messagesOf(depth, '12abc')).toEqual(['Enter a number.']);
    expect(messagesOf(depth, ' ')).toEqual(['This is needed.']);
    expect(messagesOf(depth, '130')).toEqual(['At most 100 %.']);
  });

  it('reads an empty optional number as null and checks a filled one', () => {
    const optional = optionalNumberText(z.number().max(60, 'At most 60.'));
    expect(optional.parse('')).toBeNull();
    expect(optional.parse('25')).toBe(25);
    expect(messagesOf(optional, '61')).toEqual(['At most 60.']);
    expect(messagesOf(optional, 'warm')).toEqual(['Enter a number.']);
  });
});

it('chosen refuses what is not one of the choices, and nothing chosen', () => {
  const schema = chosen(z.enum(['none', 'rigid']));
  expect(schema.parse('rigid')).toBe('rigid');
  expect(messagesOf(schema, '')).toEqual(['Choose one.']);
  expect(messagesOf(schema, 'glued')).toEqual(['Choose one.']);
});

it('optionalText reads empty text as null', () => {
  const schema = optionalText(z.string().regex(/^\d{4}-\d\d$/, 'Enter a month.'));
  expect(schema.parse('  ')).toBeNull();
  expect(schema.parse('2026-11')).toBe('2026-11');
  expect(messagesOf(schema, 'Nov')).toEqual(['Enter a month.']);
});

describe('convertText', () => {
  it('takes a typed number into another unit', () => {
    // 77 °F = 25 °C; 1 kgf = 9.80665 N (NIST SP 811, B.8).
    expect(convertText('77', '°F', '°C')).toBe('25');
    expect(convertText('100', 'kgf', 'N')).toBe('980.665');
  });

  it('comes back to what was typed', () => {
    expect(convertText(convertText('31.7', '°C', '°F'), '°F', '°C')).toBe('31.7');
  });

  it('leaves text that is no number, and units of different kinds, as they stand', () => {
    expect(convertText('about 20', '°F', '°C')).toBe('about 20');
    expect(convertText('20', 'Ah', 'V')).toBe('20');
    expect(convertText('', '°F', '°C')).toBe('');
  });
});

describe('mergeDraft', () => {
  const defaults = {
    depth: '',
    clamping: { kind: 'none', forceN: '' },
    isWarm: false,
    tags: [] as string[],
    day: null,
  };

  it('puts back what was kept, at any depth', () => {
    const kept = { depth: '60', clamping: { forceN: '3000' }, isWarm: true, tags: ['a'], day: '2026-11-02' };
    expect(mergeDraft(defaults, kept)).toEqual({
      depth: '60',
      clamping: { kind: 'none', forceN: '3000' },
      isWarm: true,
      tags: ['a'],
      day: '2026-11-02',
    });
  });

  it.each([[null], ['text'], [[1, 2]], [42], [undefined]])(
    'falls back to the defaults when %p was kept',
    (kept) => {
      expect(mergeDraft(defaults, kept)).toEqual(defaults);
    },
  );

  it('drops fields the form no longer has and values of another kind', () => {
    const kept = JSON.parse('{"depth": 60, "gone": "x", "clamping": "rigid", "__proto__": {"isWarm": true}}');
    const merged = mergeDraft(defaults, kept);
    expect(merged).toEqual(defaults);
    expect(Object.keys(merged)).not.toContain('gone');
    expect(({} as { isWarm?: boolean }).isWarm).toBeUndefined();
  });
});
