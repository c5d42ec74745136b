import type { Locator, Page } from 'playwright-core';

/** What a person does with their hands: fields filled or chosen from, and everything else tapped. */
export interface Actions {
  fields: string[];
  taps: string[];
  /** Stops counting. */
  stop: () => void;
}

const fieldActions = ['fill', 'selectOption'] as const;
const tapActions = ['click', 'check', 'press'] as const;

/** Counts every field filled and every tap on any page from now on, each with what it was done to. */
export function countActions(page: Page): Actions {
  const prototype = Object.getPrototypeOf(page.locator('body')) as Locator;
  const fields: string[] = [];
  const taps: string[] = [];
  const originals = [...fieldActions, ...tapActions].map((name) => [name, prototype[name]] as const);
  const wrap = (name: keyof Locator, list: string[]) => {
    const original = prototype[name] as (this: Locator, ...args: unknown[]) => unknown;
    Object.assign(prototype, {
      [name](this: Locator, ...args: unknown[]) {
        list.push(String(this));
        return original.apply(this, args);
      },
    });
  };
  for (const name of fieldActions) wrap(name, fields);
  for (const name of tapActions) wrap(name, taps);
  return {
    fields,
    taps,
    stop: () => {
      for (const [name, original] of originals) Object.assign(prototype, { [name]: original });
    },
  };
}
