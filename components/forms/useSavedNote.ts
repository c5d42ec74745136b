import { useLayout } from '../theme';
import type { LocalDraft } from './useLocalDraft';

/** The note at the head of a form whose typed values are kept. */
export function useSavedNote({ isSaved }: LocalDraft): string | undefined {
  const { isPhone } = useLayout();
  if (!isSaved) return undefined;
  return isPhone ? 'saved on this phone' : 'saved on this device';
}
