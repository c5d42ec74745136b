/** A piece of a mail; with a path when it is a link into this product. */
export interface MailPart {
  text: string;
  path?: string;
}

const address = /(https?:\/\/\S+)/;

/** A mail's text as paragraphs of words and links. Mails hold no links but the product's own, so the path says it. */
export function mailParagraphs(text: string): MailPart[][] {
  return text
    .trim()
    .split(/\n{2,}/)
    .map((paragraph) => paragraph.split(address).filter(Boolean).map(toPart));
}

function toPart(text: string): MailPart {
  if (!address.test(text) || !URL.canParse(text)) return { text };
  const { pathname, search } = new URL(text);
  return { text, path: pathname + search };
}
