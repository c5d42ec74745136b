/**
 * The data licence that owners agree to with each check they send. A change of the words is a new version; what was
 * agreed to earlier stays as it was.
 */
export const consent = {
  version: 1,
  licence: 'CC BY 4.0',
  address: 'https://creativecommons.org/licenses/by/4.0/',
  before: 'By sending you agree that the figures are published, rounded and without you, under ',
  after:
    '. Logs, photos, dates and places are never published. You can withdraw the check later; releases that came out before keep what they held.',
} as const;
