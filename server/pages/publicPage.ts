import type { Deps } from '../deps';

/** What the server says of a public page before the app has loaded: its head, its words, its first data. */
export interface PublicPage {
  /** Without the product's name. */
  title: string;
  description: string;
  /** The one address it is known by. */
  path: string;
  /** Address of a picture for previews of links. */
  picture?: string;
  /** What the page says, as HTML; shown to everyone until the app draws the same. */
  summary: string;
  /** Answers of the API that the page begins with. */
  answers: readonly { path: string; body: unknown }[];
  /** 404 where there is nothing under the address. */
  status?: number;
}

/** Makes the page of an address, or null when the address is not one of its pages. */
export type PageMaker = (deps: Deps, path: string) => Promise<PublicPage | null>;
