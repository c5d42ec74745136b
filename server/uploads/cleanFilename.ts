const maxLength = 120;

/**
 * The name a file is shown by: its last part only, without control or direction-changing characters. It is never used
 * as a path.
 */
export function cleanFilename(name: string): string {
  const last = name.split(/[/\\]/).at(-1) ?? '';
  const printable = last.replace(/[\p{Cc}\p{Cf}\p{Cs}\p{Co}\p{Cn}]/gu, '').trim();
  return [...printable].slice(0, maxLength).join('') || 'log';
}
