const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/**
 * What was kept of a form laid over its present defaults: only fields the form still has, and only values of the same
 * kind, so that a draft of an older version can't bring in what the form does not know.
 */
export function mergeDraft<Value>(defaults: Value, kept: unknown): Value {
  if (kept === undefined) return defaults;
  if (isRecord(defaults)) {
    if (!isRecord(kept)) return defaults;
    const merged: Record<string, unknown> = {};
    for (const [key, value] of Object.entries(defaults)) {
      merged[key] = Object.hasOwn(kept, key) ? mergeDraft(value, kept[key]) : value;
    }
    return merged as Value;
  }
  if (Array.isArray(defaults)) return (Array.isArray(kept) ? kept : defaults) as Value;
  // A default that is not set yet says nothing of the kind.
  if (defaults === null || defaults === undefined) return kept as Value;
  return typeof kept === typeof defaults ? (kept as Value) : defaults;
}
