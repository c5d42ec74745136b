import { type ComponentType, createElement, type ReactNode, useEffect, useState } from 'react';

interface Meanwhile {
  loading: ReactNode;
  /** Shown when the part could not be fetched. */
  failed: (retry: { onRetry: () => void; isRetrying: boolean }) => ReactNode;
}

/**
 * A part of the program that is fetched when one of its components is first shown, so that pages without them do not
 * pay for it. `load` is an `import()`; a failure is told, with a way to ask again.
 */
export function onDemand<Part extends object>(load: () => Promise<Part>) {
  let part: Part | undefined;
  // Everything on the page that waits for the part: fetched for one, it is there for all.
  const waiting = new Set<(arrived: Part) => void>();
  const fetchPart = async () => {
    const arrived = (part ??= await load());
    for (const tell of waiting) tell(arrived);
  };

  function usePart() {
    const [arrived, setArrived] = useState(part);
    const [attempt, setAttempt] = useState(1);
    const [failedAttempt, setFailedAttempt] = useState(0);
    useEffect(() => {
      let isShown = true;
      const tell = (fetched: Part) => setArrived(fetched);
      waiting.add(tell);
      fetchPart().catch(() => isShown && setFailedAttempt(attempt));
      return () => {
        isShown = false;
        waiting.delete(tell);
      };
    }, [attempt]);
    return {
      arrived,
      hasFailed: failedAttempt > 0,
      retry: { onRetry: () => setAttempt(failedAttempt + 1), isRetrying: attempt > failedAttempt },
    };
  }

  return {
    /** Fetches the part before it is needed; does nothing when that fails. */
    prefetch: () => void fetchPart().catch(() => undefined),
    /** A component of the part, with what stands in its place until it is there. */
    component<Props extends object>(pick: (part: Part) => ComponentType<Props>, meanwhile: Meanwhile) {
      return function OnDemand(props: Props) {
        const { arrived, hasFailed, retry } = usePart();
        if (arrived) return createElement(pick(arrived), props);
        return hasFailed ? meanwhile.failed(retry) : meanwhile.loading;
      };
    },
  };
}
