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
  const fetchPart = async () => (part ??= await load());

  function usePart() {
    const [arrived, setArrived] = useState(part);
    const [attempt, setAttempt] = useState(1);
    const [failedAttempt, setFailedAttempt] = useState(0);
    useEffect(() => {
      let isShown = true;
      fetchPart().then(
        (fetched) => isShown && setArrived(fetched),
        () => isShown && setFailedAttempt(attempt),
      );
      return () => {
        isShown = false;
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
