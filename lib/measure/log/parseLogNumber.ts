const exact = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;
// A unit may stand behind the number: "53.2 V", "25,1 °C".
const trailingUnit = /\s*[°µa-zA-Z%²·]{1,5}$/;

/**
 * Reads a number of a log whose decimal mark is known; NaN for anything that is not one. Unlike typed numbers, those of
 * a log all follow one habit, so the other mark can only set off thousands.
 */
export function parseLogNumber(field: string, decimal: '.' | ','): number {
  const text = field.trim();
  // Longer texts are no numbers, and patterns would run over them slowly.
  if (text === '' || text.length > 40) return NaN;
  if (decimal === '.' && exact.test(text)) return Number(text);
  const stripped = /\d$/.test(text) ? text : text.replace(trailingUnit, '');
  const signed = stripped.replace(/^[\u2212\u2013]/, '-').replace(/[\s'’](?=\d{3})/g, '');
  const grouped = decimal === ',' ? /\.(?=\d{3}(?:[.,]|$))/g : /,(?=\d{3}(?:[.,]|$))/g;
  const hasBoth = signed.includes('.') && signed.includes(',');
  const ungrouped = hasBoth ? signed.replace(grouped, '') : signed;
  const normal = decimal === ',' ? ungrouped.replace(',', '.') : ungrouped;
  return exact.test(normal) ? Number(normal) : NaN;
}
