import { useEffect, useEffectEvent } from 'react';

/** Calls once now if the device has a network, and whenever it comes back; as long as `isWanted`. */
export function useWhenOnline(isWanted: boolean, call: () => void) {
  const onOnline = useEffectEvent(call);
  useEffect(() => {
    if (!isWanted) return;
    if (navigator.onLine) onOnline();
    const listen = () => onOnline();
    window.addEventListener('online', listen);
    return () => window.removeEventListener('online', listen);
  }, [isWanted]);
}
