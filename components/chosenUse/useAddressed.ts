import { useGlobalSearchParams, useRouter } from 'expo-router';
import { useEffect, useMemo, useRef, useState } from 'react';

/** So long after the last change the address is written: a slider's drag or a typed word is one change. */
const writeAfterMs = 250;

type Query = Readonly<Record<string, unknown>>;

/** Reads and writes a part of the address; both are kept outside components. */
export interface AddressPart<Value> {
  read: (query: Query) => Value;
  /** Undefined takes a parameter out of the address. */
  write: (value: Value) => Record<string, string | undefined>;
}

/** A state of the page that lives in its address, so that a link shows the same. A change holds at once. */
export function useAddressed<Value>(part: AddressPart<Value>): [Value, (value: Value) => void] {
  const query = useGlobalSearchParams();
  const router = useRouter();
  const addressKey = JSON.stringify(query);
  const addressed = useMemo(() => part.read(JSON.parse(addressKey) as Query), [part, addressKey]);
  // A change holds until the address says it, or something else.
  const [draft, setDraft] = useState<{ value: Value; over: string } | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => () => clearTimeout(timer.current), []);
  const set = (value: Value) => {
    setDraft({ value, over: addressKey });
    clearTimeout(timer.current);
    timer.current = setTimeout(() => router.setParams(part.write(value)), writeAfterMs);
  };
  return [draft?.over === addressKey ? draft.value : addressed, set];
}
