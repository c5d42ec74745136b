const entities: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text as it can stand in HTML, between tags and in quoted attributes. */
export const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (sign) => entities[sign]!);

/** HTML from a template: what is put in is text and is escaped, unless it is HTML already. */
export function html(parts: TemplateStringsArray, ...values: (string | Html | Html[])[]): Html {
  return new Html(parts.reduce((whole, part, i) => `${whole}${inserted(values[i - 1]!)}${part}`));
}

/** A piece of HTML whose texts are escaped. */
export class Html {
  constructor(readonly text: string) {}
}

const inserted = (value: string | Html | Html[]): string => {
  if (Array.isArray(value)) return value.map(({ text }) => text).join('');
  return value instanceof Html ? value.text : escapeHtml(value);
};

/** Data as inert JSON inside a page: no text in it can end the element it stands in. */
export const jsonForPage = (data: unknown): string =>
  JSON.stringify(data)
    .replace(/</g, '\\u003c')
    .replace(/>/g, '\\u003e')
    .replace(/\u2028/g, '\\u2028')
    .replace(/\u2029/g, '\\u2029');
