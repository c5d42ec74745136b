import { z } from 'zod';

/** How the value of a field came to be known; stored beside each field that is asked. */
export const fieldSourceSchema = z.enum(['metered', 'readOff', 'estimated']);
export type FieldSource = z.infer<typeof fieldSourceSchema>;

/** `{ min, max }` of limits.ts as a number schema that names its range. */
export function within({ min, max }: { min: number; max: number }) {
  const message = `Enter a number from ${min} to ${max}.`;
  return z.number({ error: 'Enter a number.' }).min(min, message).max(max, message);
}

export function wholeWithin({ min, max }: { min: number; max: number }) {
  const message = `Enter a whole number from ${min} to ${max}.`;
  return z.number({ error: 'Enter a whole number.' }).int(message).min(min, message).max(max, message);
}

/** Text as typed, trimmed, with control characters refused. */
export function text(max: number) {
  return z
    .string({ error: 'Enter text.' })
    .trim()
    .max(max, `Keep it to ${max} characters.`)
    .refine(
      (value) => !/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/.test(value),
      'Leave out control characters.',
    );
}

export const requiredText = (max: number) => text(max).min(1, 'This is needed.');

/** A day without a time zone: 2026-11-02. */
export const calendarDateSchema = z.iso.date('Enter a date as year-month-day.');

/** A month: 2026-11. */
export const calendarMonthSchema = z
  .string()
  .regex(/^(19|20)\d\d-(0[1-9]|1[0-2])$/, 'Enter a month as year-month.');

/** A moment, UTC. */
export const instantSchema = z.iso.datetime();

export const idSchema = z.uuid();

/** The readable key of a cell type in addresses: `skerry-240`. */
export const cellIdSchema = z
  .string()
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/)
  .max(80);
