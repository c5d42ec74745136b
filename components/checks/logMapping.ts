import type { LogMapping, RecognisedLog } from '@/lib/contract/uploads';

export type Quantity = LogMapping['columns'][number]['quantity'];

/** Units a column of each quantity may be in, the plainest first; the time's unit is a part of how it is written. */
export const unitsOf: Record<Quantity, readonly string[]> = {
  time: [],
  voltage: ['V', 'mV'],
  current: ['A', 'mA'],
  power: ['W', 'kW'],
  temperature: ['°C', '°F', 'K'],
  lowestCell: ['V', 'mV'],
  highestCell: ['V', 'mV'],
  cell: ['V', 'mV'],
  counter: ['Ah', 'mAh'],
};

/** A mapping in which one column holds something else, or nothing that is used. */
export function withColumn(
  mapping: LogMapping,
  index: number,
  held: { quantity: Quantity; unit?: string } | null,
): LogMapping {
  const others = mapping.columns.filter((column) => column.index !== index);
  if (held === null) return { ...mapping, columns: others };
  const units = unitsOf[held.quantity];
  const unit = held.unit !== undefined && units.includes(held.unit) ? held.unit : (units[0] ?? '');
  const columns = [...others, { index, quantity: held.quantity, unit }];
  return { ...mapping, columns: columns.sort((one, other) => one.index - other.index) };
}

type Questions = RecognisedLog['questions'];

/**
 * Puts the owner's answers where each question says they go: "timeFormat", "dischargeSign", "unit:3" of column 3,
 * "column:current" for the one column that holds the current.
 * @param answers choice by the question's field
 */
export function withAnswers(
  mapping: LogMapping,
  questions: Questions,
  answers: Record<string, string>,
): LogMapping {
  return questions.reduce((answered, { field, choices }) => {
    const answer = answers[field];
    return answer !== undefined && choices.includes(answer) ? withAnswer(answered, field, answer) : answered;
  }, mapping);
}

function withAnswer(mapping: LogMapping, field: string, answer: string): LogMapping {
  const [kind, which = ''] = field.split(':');
  if (kind === 'timeFormat') return { ...mapping, timeFormat: answer };
  if (kind === 'dischargeSign' && (answer === 'positive' || answer === 'negative'))
    return { ...mapping, dischargeSign: answer };
  if (kind === 'unit') {
    const columns = mapping.columns.map((column) =>
      column.index === Number(which) ? { ...column, unit: answer } : column,
    );
    return { ...mapping, columns };
  }
  if (kind === 'column' && Object.hasOwn(unitsOf, which)) {
    const quantity = which as Quantity;
    const without = mapping.columns.filter((column) => column.quantity !== quantity);
    return withColumn({ ...mapping, columns: without }, Number(answer), { quantity });
  }
  return mapping;
}
