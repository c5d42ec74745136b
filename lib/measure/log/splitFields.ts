/**
 * Splits one line into its fields, up to and including field `lastIndex`. Quoted fields may hold the delimiter and
 * doubled quotes; a line break inside quotes is not supported, because no row of numbers needs one.
 */
export function splitFields(line: string, delimiter: string, lastIndex = Infinity): string[] {
  const fields: string[] = [];
  let from = 0;
  while (fields.length <= lastIndex) {
    if (line.charCodeAt(from) === 34) {
      const [field, end] = quoted(line, from);
      const next = line.indexOf(delimiter, end);
      fields.push(field);
      if (next < 0) break;
      from = next + 1;
    } else {
      const next = line.indexOf(delimiter, from);
      fields.push(next < 0 ? line.slice(from) : line.slice(from, next));
      if (next < 0) break;
      from = next + 1;
    }
  }
  return fields;
}

/** The content of the quoted field that begins at `from`, and where the text behind its closing quote begins. */
const quoted = (line: string, from: number): [string, number] => {
  let end = line.indexOf('"', from + 1);
  while (end >= 0 && line.charCodeAt(end + 1) === 34) end = line.indexOf('"', end + 2);
  if (end < 0) return [line.slice(from + 1), line.length];
  return [line.slice(from + 1, end).replaceAll('""', '"'), end + 1];
};
