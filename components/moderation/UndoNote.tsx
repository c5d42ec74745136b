import { useEffect, useState } from 'react';

import { Banner, Button, useHotkeys, useToast } from '@/components/ui';
import { useUndo, useUndoOffer } from '@/lib/client/moderation';

import { useAreKeysOn } from './keys';

/** Offers to take the last decision back while that is possible. */
export function UndoNote() {
  const offer = useUndoOffer();
  const toast = useToast();
  const undo = useUndo((problem) => toast({ text: problem ?? 'Taken back. Nothing was sent.' }));
  const isAhead = useIsAhead(offer?.until);
  const areKeysOn = useAreKeysOn();
  const isOffered = offer !== null && isAhead;
  const takeBack = () => offer && undo.mutate(offer, { onError: (error) => toast({ text: error.message }) });
  useHotkeys(isOffered && areKeysOn && !undo.isPending ? { U: () => void takeBack() } : {});
  if (!isOffered) return null;
  return (
    <Banner
      kind="done"
      actions={<Button label="Undo" hotkey="U" onPress={() => void takeBack()} busy={undo.isPending} />}
    >{`${offer.what}. It takes effect within half a minute.`}</Banner>
  );
}

/** Whether an instant still lies ahead; told anew when it comes. */
function useIsAhead(instant: string | undefined): boolean {
  const [passed, setPassed] = useState<string>();
  useEffect(() => {
    if (instant === undefined) return;
    const timer = setTimeout(() => setPassed(instant), Math.max(0, Date.parse(instant) - Date.now()));
    return () => clearTimeout(timer);
  }, [instant]);
  return instant !== undefined && passed !== instant;
}
