/** "3f2a 91bc 07de": easier to compare by eye. */
export const digestWords = (digest: string): string => digest.match(/.{1,4}/g)?.join(' ') ?? '';

/** The address behind which a record stands. */
export const recordAddress = (token: string): string => `${window.location.origin}/records/${token}`;
